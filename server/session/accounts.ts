import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { AccountChange, AccountCreate, AccountView, FieldFault } from '@common/contract';
import { Account, Client, Maker } from '@database/entities';
import { invalidField, invalidFields, notFound, Problem } from '../http/problem';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { accountView } from './account-mapper';
import { AccountRepository } from './account-repository';
import type { Actor } from './actor';
import { hashPassword } from './passwords';

type NewAccount = z.output<typeof AccountCreate>;
type ChangedAccount = z.output<typeof AccountChange>;

/** The people who may sign in. */
export class Accounts {
  constructor(private readonly transactions: Transactions) {}

  async list(): Promise<AccountView[]> {
    return this.transactions.read(async (manager) => (await new AccountRepository(manager).all()).map(accountView));
  }

  async create(actor: Actor, { password, ...fields }: NewAccount): Promise<AccountView> {
    const passwordHash = password === null ? null : await hashPassword(password);
    return this.transactions.write(actor, async (unit) => {
      const accounts = new AccountRepository(unit.manager);
      const account = unit.manager.create(Account, {
        ...fields,
        id: randomUUID(),
        passwordHash,
        active: true,
        version: 1,
      });
      await requireSound(unit, accounts, account);
      await accounts.save(account);
      const view = accountView(account);
      const sentence = `Let ${account.name} sign in as ${account.role}.`;
      await unit.record({ action: 'created', subject: { kind: 'account', id: account.id }, sentence, after: view });
      return view;
    });
  }

  /** Changes an account; a new password or being closed ends its sessions, but for the one that asks (`ownSid`). */
  async change(actor: Actor, id: string, change: ChangedAccount, ownSid: string): Promise<AccountView> {
    const { password, version: _version, ...fields } = change;
    const passwordHash = password === undefined ? undefined : await hashPassword(password);
    return this.transactions.write(actor, async (unit) => {
      const accounts = new AccountRepository(unit.manager);
      const account = await accounts.byId(id);
      if (!account) throw notFound('account');
      const before = accountView(account);
      requireVersion(before, withoutPassword(change));
      Object.assign(account, sentMembers(fields), passwordHash && { passwordHash }, { version: account.version + 1 });
      await requireSound(unit, accounts, account);
      await accounts.save(account);
      if (passwordHash || !account.active) await accounts.endSessions(id, account.active ? ownSid : null);
      const view = accountView(account);
      const what = [changedFields(before, view), ...(passwordHash ? ['password'] : [])].filter(
        (it) => it !== 'nothing',
      );
      const sentence = `Changed the account of ${account.name}: ${what.join(', ') || 'nothing'}.`;
      await unit.record({ action: 'changed', subject: { kind: 'account', id }, sentence, before, after: view });
      return view;
    });
  }
}

function withoutPassword({ password: _password, ...rest }: ChangedAccount): Omit<ChangedAccount, 'password'> {
  return rest;
}

/** What holds for every account: a maker's names a maker, a client's a client, its address is its own, and an owner remains. */
async function requireSound(unit: Unit, accounts: AccountRepository, account: Account): Promise<void> {
  const faults: FieldFault[] = [];
  if (account.role === 'maker' && account.makerId === null) {
    faults.push({ pointer: '/makerId', detail: 'Choose which of the makers this person is.' });
  }
  if (account.makerId !== null && !(await unit.manager.existsBy(Maker, { id: account.makerId }))) {
    faults.push({ pointer: '/makerId', detail: 'There is no such maker.' });
  }
  if ((account.role === 'client') !== (account.clientId !== null)) {
    const detail =
      account.role === 'client' ? 'Choose which client this person is.' : 'Only a client belongs to a client.';
    faults.push({ pointer: '/clientId', detail });
  } else if (account.clientId !== null && !(await unit.manager.existsBy(Client, { id: account.clientId }))) {
    faults.push({ pointer: '/clientId', detail: 'There is no such client.' });
  }
  if (faults.length > 0) throw invalidFields(faults);
  const namesake = await accounts.byEmail(account.email);
  if (namesake && namesake.id !== account.id) {
    const detail = 'Somebody signs in with that e-mail address already.';
    throw new Problem('already-exists', detail, { errors: [{ pointer: '/email', detail }] });
  }
  const mayOwn = account.role === 'owner' && account.active;
  if (!mayOwn && (await accounts.otherOwners(account.id)) === 0) {
    const pointer = account.role === 'owner' ? '/active' : '/role';
    throw invalidField(pointer, 'The studio needs an owner who can sign in. Make somebody else owner first.');
  }
}
