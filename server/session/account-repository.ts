import { Not, type EntityManager } from 'typeorm';
import { Account, Session } from '@database/entities';

/** Accounts and their sessions, read and written through one manager. */
export class AccountRepository {
  constructor(private readonly manager: EntityManager) {}

  all(): Promise<Account[]> {
    return this.manager.find(Account, { order: { name: 'ASC', id: 'ASC' } });
  }

  byId(id: string): Promise<Account | null> {
    return this.manager.findOneBy(Account, { id });
  }

  /** By e-mail address, whatever its letters' case. */
  byEmail(email: string): Promise<Account | null> {
    return this.manager
      .createQueryBuilder(Account, 'account')
      .where('lower(account.email) = lower(:email)', { email: email.trim() })
      .getOne();
  }

  byGoogleSubject(googleSubject: string): Promise<Account | null> {
    return this.manager.findOneBy(Account, { googleSubject });
  }

  /** How many active owners there are besides the given account. */
  otherOwners(id: string): Promise<number> {
    return this.manager.countBy(Account, { role: 'owner', active: true, id: Not(id) });
  }

  async save(account: Account): Promise<void> {
    await this.manager.save(Account, account);
  }

  /** Ends the sessions of an account, but for the one whose id is given. */
  async endSessions(accountId: string, exceptSid: string | null): Promise<void> {
    await this.manager
      .createQueryBuilder()
      .delete()
      .from(Session)
      .where(`sess->'passport'->>'user' = :accountId`, { accountId })
      .andWhere('sid is distinct from :exceptSid', { exceptSid })
      .execute();
  }
}
