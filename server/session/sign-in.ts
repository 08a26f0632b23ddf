import type { Request, Response } from 'express';
import type { EntityManager } from 'typeorm';
import { Passport } from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import { Account } from '@database/entities';
import type { Transactions } from '../storage/transactions';
import { actorOf } from './account-mapper';
import { AccountRepository } from './account-repository';
import type { Actor } from './actor';
import { isPassword } from './passwords';

/** Passport, but one for each application instead of one for the process. */
export type Authenticator = InstanceType<typeof Passport>;

/** An authenticator of this application alone: accounts by id in the session, signing in by e-mail address and password. */
export function createPassport(manager: EntityManager): Authenticator {
  const accounts = new AccountRepository(manager);
  const passport = new Passport();
  passport.serializeUser<string>((user, done) => done(null, user.accountId));
  // Read anew with each request, so that a closed account or a new role counts at once.
  passport.deserializeUser<string>((id, done) => {
    accounts.byId(id).then(
      (account) => done(null, account?.active ? actorOf(account) : false),
      (error: unknown) => done(error),
    );
  });
  passport.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      findByPassword(accounts, email, password).then(
        (actor) => done(null, actor ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  return passport;
}

async function findByPassword(accounts: AccountRepository, email: string, password: string): Promise<Actor | null> {
  const account = await accounts.byEmail(email);
  // Whether there is an account and whether it is closed must not show in how long this takes.
  const isRight = await isPassword(password, account?.passwordHash ?? null);
  return account && isRight && account.active ? actorOf(account) : null;
}

/** Who the request's e-mail address and password belong to; null for nobody. */
export function authenticateByPassword(
  passport: Authenticator,
  request: Request,
  response: Response,
): Promise<Actor | null> {
  return new Promise((resolve, reject) => {
    const decide = (error: unknown, actor: Actor | false | null) => {
      if (error) reject(asError(error));
      else resolve(actor || null);
    };
    const middleware = passport.authenticate('local', decide) as (...given: unknown[]) => void;
    middleware(request, response, reject);
  });
}

/** Begins a session for the actor, under a new id so that one planted before is worth nothing, and writes down that it began. */
export async function beginSession(transactions: Transactions, request: Request, actor: Actor): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.logIn(actor, (error: unknown) => {
      if (error) reject(asError(error));
      else resolve();
    });
  });
  await transactions.write(actor, async (unit) => {
    await unit.manager.update(Account, { id: actor.accountId }, { lastSignInAt: unit.at });
    await unit.record({
      action: 'signed-in',
      subject: { kind: 'account', id: actor.accountId },
      sentence: `${actor.name} signed in.`,
    });
  });
}

/** Ends the session; what follows has a new one. */
export function endSession(request: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logOut((error: unknown) => {
      if (error) reject(asError(error));
      else resolve();
    });
  });
}

function asError(thrown: unknown): Error {
  return thrown instanceof Error ? thrown : new Error('Signing in or out failed.', { cause: thrown });
}
