import type { Express, Request, RequestHandler, Response } from 'express';
import type { Config } from '../config';
import type { Log } from '../http/log';
import { Problem } from '../http/problem';
import type { Transactions } from '../storage/transactions';
import type { Actor } from './actor';
import { GOOGLE_CALLBACK, googleStrategy } from './google-strategy';
import { beginSession, type Authenticator } from './sign-in';

const LONGEST_RETURN = 500;

/** What signing in through Google works with. */
export interface GoogleParts {
  readonly app: Express;
  readonly config: Config;
  readonly log: Log;
  readonly passport: Authenticator;
  readonly transactions: Transactions;
}

/** Why the browser is sent back to the sign-in page; the page's address carries it as `problem`. */
type SignInProblem =
  'google-denied' | 'google-unverified' | 'google-unknown' | 'google-other-account' | 'google-failed';

interface Outcome {
  readonly actor: Actor | null;
  readonly problem: SignInProblem;
}

/** Signing in through Google: out to it, and back. Both are addresses that a browser goes to, so they answer with redirections. */
export function mountGoogle({ app, config, log, passport, transactions }: GoogleParts): void {
  const { google, publicUrl } = config;
  if (google === null) {
    for (const path of ['/api/session/google', GOOGLE_CALLBACK]) {
      app.get(path, () => {
        throw new Problem('not-configured', 'Signing in through Google is not set up here. Use your password.');
      });
    }
    return;
  }
  passport.use(googleStrategy(google, publicUrl, transactions));
  const leave = passport.authenticate('google', {
    scope: ['openid', 'email', 'profile'],
    prompt: 'select_account',
  } as object) as RequestHandler;
  app.get('/api/session/google', (request, response, next) => {
    request.session.googleReturn = localPath(request.query['return']) ?? '/';
    leave(request, response, next);
  });
  app.get(GOOGLE_CALLBACK, async (request, response) => {
    // Signing in begins a new session, so what the old one held is taken out first.
    const back = request.session.googleReturn ?? '/';
    const { actor, problem } = await comeBack(passport, log, request, response);
    if (!actor) {
      response.redirect(303, `/sign-in?${new URLSearchParams({ problem, return: back }).toString()}`);
      return;
    }
    await beginSession(transactions, request, actor);
    response.redirect(303, back);
  });
}

function comeBack(passport: Authenticator, log: Log, request: Request, response: Response): Promise<Outcome> {
  return new Promise((resolve, reject) => {
    const decide = (error: unknown, actor: Actor | false | null, info: { readonly message?: string } | undefined) => {
      if (error) log.warn({ err: error }, 'Google did not answer as it should');
      if (error || actor) resolve({ actor: error ? null : actor || null, problem: 'google-failed' });
      else resolve({ actor: null, problem: problemOf(request, info?.message) });
    };
    const middleware = passport.authenticate('google', decide) as (...given: unknown[]) => void;
    middleware(request, response, reject);
  });
}

function problemOf(request: Request, message: string | undefined): SignInProblem {
  switch (message) {
    case 'unverified':
    case 'unknown':
    case 'other-account':
      return `google-${message}`;
    default:
      return request.query['error'] === 'access_denied' ? 'google-denied' : 'google-failed';
  }
}

/** An address on this server; null for one that could lead elsewhere. */
function localPath(value: unknown): string | null {
  return typeof value === 'string' && value.length <= LONGEST_RETURN && /^\/(?![/\\])[\x21-\x7e]*$/.test(value)
    ? value
    : null;
}
