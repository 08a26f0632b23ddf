import type { Request } from 'express';
import { endpoints, type SessionView } from '@common/contract';
import { Studio } from '@database/entities';
import type { Config } from '../config';
import type { Api } from '../http/api';
import { formTokenOf } from '../http/form-token';
import { Problem } from '../http/problem';
import { limitSignIns } from '../http/rate-limits';
import type { Transactions } from '../storage/transactions';
import type { Accounts } from './accounts';
import type { Actor } from './actor';
import { authenticateByPassword, beginSession, endSession, type Authenticator } from './sign-in';

/** What the session's routes work with. */
export interface SessionParts {
  readonly config: Config;
  readonly passport: Authenticator;
  readonly transactions: Transactions;
  readonly accounts: Accounts;
}

/** Signing in and out, and the accounts of those who may. */
export function mountSession(api: Api, { config, passport, transactions, accounts }: SessionParts): void {
  const viewOf = (request: Request, actor: Actor | null) => sessionView(transactions, config, request, actor);

  api.onOpen(endpoints.readSession, ({ request, actor }) => viewOf(request, actor));
  api.onOpen(
    endpoints.signIn,
    async ({ request, response }) => {
      const actor = await authenticateByPassword(passport, request, response);
      if (!actor) {
        throw new Problem('wrong-credentials', 'Check both; if you forgot the password, the owner can set a new one.');
      }
      await beginSession(transactions, request, actor);
      return viewOf(request, actor);
    },
    limitSignIns(config.limits),
  );
  api.on(endpoints.signOut, ({ request }) => endSession(request));

  api.on(endpoints.listAccounts, () => accounts.list());
  api.on(endpoints.createAccount, ({ actor, body }) => accounts.create(actor, body));
  api.on(endpoints.changeAccount, ({ actor, params, body, request }) =>
    accounts.change(actor, params.id, body, request.sessionID),
  );
}

async function sessionView(
  transactions: Transactions,
  config: Config,
  request: Request,
  actor: Actor | null,
): Promise<SessionView> {
  const { name, zone, currency } = await transactions.read((manager) =>
    manager.findOneOrFail(Studio, { where: { single: true } }),
  );
  return {
    account: actor && {
      id: actor.accountId,
      name: actor.name,
      email: actor.email,
      role: actor.role,
      makerId: actor.makerId,
      clientId: actor.clientId,
    },
    formToken: formTokenOf(request),
    googleSignIn: config.google !== null,
    studio: { name, zone, currency },
  };
}
