import type { AccountView } from '@common/contract';
import type { Account } from '@database/entities';
import type { Actor } from './actor';

/** An account as the office sees it; neither its hash nor its Google account leaves the server. */
export function accountView(account: Account): AccountView {
  return {
    id: account.id,
    name: account.name,
    email: account.email,
    role: account.role,
    makerId: account.makerId,
    clientId: account.clientId,
    active: account.active,
    lastSignInAt: account.lastSignInAt?.toISOString() ?? null,
    version: account.version,
  };
}

/** An account as the one who acts. */
export function actorOf(account: Account): Actor {
  return {
    accountId: account.id,
    name: account.name,
    email: account.email,
    role: account.role,
    makerId: account.makerId,
    clientId: account.clientId,
  };
}
