import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { LiveEvent } from '@common/contract';
import { AuditEntry } from '@database/entities';
import type { Actor } from '../session/actor';
import { LIVE_CHANNEL } from './live-channel';

/** One line for the audit trail. */
export interface Deed {
  /** A word for what was done, such as `created`. */
  readonly action: string;
  readonly subject: { readonly kind: string; readonly id: string | null };
  /** What was done, in a sentence. */
  readonly sentence: string;
  readonly before?: object;
  readonly after?: object;
}

/** One transaction: the manager that all of it goes through, who acts, and when. */
export class Unit {
  constructor(
    readonly manager: EntityManager,
    readonly actor: Actor | null,
    readonly at: Date,
  ) {}

  /** Writes the audit trail, and tells open pages that the record changed. */
  async record(deed: Deed): Promise<void> {
    await this.manager.insert(AuditEntry, {
      id: randomUUID(),
      at: this.at,
      accountId: this.actor?.accountId ?? null,
      accountName: this.actor?.name ?? null,
      action: deed.action,
      subjectKind: deed.subject.kind,
      subjectId: deed.subject.id,
      sentence: deed.sentence,
      before: deed.before ?? null,
      after: deed.after ?? null,
    });
    await this.announce({ kind: 'record-changed', subject: deed.subject.kind, id: deed.subject.id });
  }

  /** Tells open pages, on every server process, once the transaction stands; nothing is said if it does not. */
  async announce(event: LiveEvent): Promise<void> {
    await this.manager.query('select pg_notify($1, $2)', [LIVE_CHANNEL, JSON.stringify(event)]);
  }
}
