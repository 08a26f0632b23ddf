import { Strategy, type Profile, type StrategyOptions, type VerifyCallback } from 'passport-google-oauth20';
import type { GoogleSettings } from '../config';
import type { Transactions } from '../storage/transactions';
import { findByGoogle } from './google-account';

export const GOOGLE_CALLBACK = '/api/session/google/callback';

type Verify = (accessToken: string, refreshToken: string, profile: Profile, done: VerifyCallback) => void;

/** Shows the access token in a header; the library's own way puts it into an address, where it would be logged (RFC 6750, 2.3). */
class HeaderStrategy extends Strategy {
  constructor(options: StrategyOptions, verify: Verify) {
    super(options, verify);
    this._oauth2.useAuthorizationHeaderforGET(true);
  }
}

/**
 * OAuth 2.0 with Google: a state that is bound to the session, and PKCE (RFC 7636). `publicUrl` is where Google sends the browser back;
 * null for whatever host it came from.
 */
export function googleStrategy(
  settings: GoogleSettings,
  publicUrl: string | null,
  transactions: Transactions,
): Strategy {
  const { clientId, clientSecret, standInUrl } = settings;
  return new HeaderStrategy(
    {
      clientID: clientId,
      clientSecret,
      callbackURL: `${publicUrl ?? ''}${GOOGLE_CALLBACK}`,
      state: true,
      pkce: true,
      ...(standInUrl !== null && {
        authorizationURL: `${standInUrl}/auth`,
        tokenURL: `${standInUrl}/token`,
        userProfileURL: `${standInUrl}/userinfo`,
      }),
    },
    (_accessToken: string, _refreshToken: string, profile: Profile, done: VerifyCallback) => {
      const [email] = profile.emails ?? [];
      // Google says true, or "true" in some of its answers.
      const isEmailVerified = String(email?.verified) === 'true';
      findByGoogle(transactions, { subject: profile.id, email: email?.value ?? null, isEmailVerified }).then(
        (found) => (typeof found === 'string' ? done(null, false, { message: found }) : done(null, found)),
        (error: unknown) => done(error),
      );
    },
  );
}
