import type { Transactions } from '../storage/transactions';
import { actorOf } from './account-mapper';
import { AccountRepository } from './account-repository';
import type { Actor } from './actor';

/** What Google says of somebody. */
export interface GoogleIdentity {
  /** Names the Google account for good; e-mail addresses come and go. */
  readonly subject: string;
  readonly email: string | null;
  /** Whether Google has seen that the address is theirs. */
  readonly isEmailVerified: boolean;
}

/** Why somebody whom Google knows is not let in. */
export type GoogleRefusal = 'unverified' | 'unknown' | 'other-account';

/**
 * The account of somebody whom Google vouches for. Nobody is made a new one: the owner makes accounts. The first time, an account is
 * found by its verified e-mail address and tied to the Google account; from then on only that one opens it, whatever its address.
 */
export function findByGoogle(
  transactions: Transactions,
  { subject, email, isEmailVerified }: GoogleIdentity,
): Promise<Actor | GoogleRefusal> {
  return transactions.write(null, async (unit) => {
    const accounts = new AccountRepository(unit.manager);
    const tied = await accounts.byGoogleSubject(subject);
    if (tied) return tied.active ? actorOf(tied) : 'unknown';
    if (email === null || !isEmailVerified) return 'unverified';
    const account = await accounts.byEmail(email);
    if (!account?.active) return 'unknown';
    if (account.googleSubject !== null) return 'other-account';
    account.googleSubject = subject;
    await accounts.save(account);
    const sentence = `Tied the account of ${account.name} to a Google account.`;
    await unit.record({ action: 'tied', subject: { kind: 'account', id: account.id }, sentence });
    return actorOf(account);
  });
}
