import { createHash } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { FeedScope } from '@common/contract/feeds';
import { FeedState, FeedToken } from '@database/entities';
import { actorOf } from '../session/account-mapper';
import type { Transactions } from '../storage/transactions';
import { calendarText } from './calendar-text';
import type { Validators } from './conditional';
import { mayRead } from './feed-access';
import { scopeKey } from './feed-event';
import { EMPTY_HISTORY, FeedHistory, withView } from './feed-history';
import { scopeOf } from './feed-mapper';
import { calendarName } from './feed-names';
import { FeedRepository } from './feed-repository';
import { digestOfToken, isFeedToken } from './feed-token';

const READ_NOTED_EVERY_MS = 60_000;

/** What a calendar address answers. `closed` was revoked for good; `unknown` never was, or may not be read at present. */
export type FeedAnswer =
  | { readonly kind: 'unknown' }
  | { readonly kind: 'closed' }
  | { readonly kind: 'calendar'; readonly bytes: Buffer; readonly validators: Validators };

interface Draft {
  readonly history: FeedHistory;
  readonly bytes: Buffer;
  readonly hash: Buffer;
  readonly state: FeedState | null;
}

/** Answers calendar addresses. */
export class FeedReader {
  constructor(private readonly transactions: Transactions) {}

  async read(token: string): Promise<FeedAnswer> {
    if (!isFeedToken(token)) return { kind: 'unknown' };
    const found = await this.transactions.read((manager) => this.#find(manager, token));
    if (found.kind !== 'open') return found;
    const { feed, scope, draft } = found;
    await this.#noteReading(feed);
    const { state } = draft;
    if (state?.textHash.equals(draft.hash)) {
      return answer(draft, Math.floor(state.changedAt.getTime() / 1000));
    }
    return this.transactions.write(null, async (unit) => {
      // Drawn again, because another reading may have come first.
      const newest = await this.#draw(unit.manager, scope);
      return answer(newest, await remember(unit.manager, scope, newest, unit.at));
    });
  }

  async #find(
    manager: EntityManager,
    token: string,
  ): Promise<
    Exclude<FeedAnswer, { kind: 'calendar' }> | { kind: 'open'; feed: FeedToken; scope: FeedScope; draft: Draft }
  > {
    const repository = new FeedRepository(manager);
    const feed = await repository.byDigest(digestOfToken(token));
    if (!feed) return { kind: 'unknown' };
    if (feed.revokedAt !== null) return { kind: 'closed' };
    const scope = scopeOf(feed);
    const production = scope.kind === 'production' ? await repository.production(scope.productionId) : null;
    const allowed = feed.account.active && mayRead(actorOf(feed.account), scope, production);
    return allowed ? { kind: 'open', feed, scope, draft: await this.#draw(manager, scope) } : { kind: 'unknown' };
  }

  async #draw(manager: EntityManager, scope: FeedScope): Promise<Draft> {
    const repository = new FeedRepository(manager);
    const [studio, state, view] = [
      await repository.studio(),
      await repository.state(scope),
      await repository.issuedView(),
    ];
    const before = state ? FeedHistory.parse(state.history) : EMPTY_HISTORY;
    const nowSeconds = Math.floor(this.transactions.clock().getTime() / 1000);
    const history = withView(before, scope, view, studio.zone, nowSeconds);
    const name = await calendarName(repository, scope, studio.name);
    const bytes = Buffer.from(calendarText({ scope, name, zone: studio.zone }, history));
    return { history, bytes, hash: createHash('sha256').update(bytes).digest(), state };
  }

  /** Notes that the address is in use, not more than once a minute. */
  async #noteReading(feed: FeedToken): Promise<void> {
    const now = this.transactions.clock();
    if (feed.lastReadAt !== null && now.getTime() - feed.lastReadAt.getTime() < READ_NOTED_EVERY_MS) return;
    await this.transactions.write(null, async (unit) => {
      await unit.manager.update(FeedToken, { id: feed.id }, { lastReadAt: now });
    });
  }
}

/**
 * Keeps what is about to be shown, and says when it changed. A second change inside one second is shown but not yet kept: two texts
 * with one Last-Modified would freeze a reader who asks by date.
 */
async function remember(manager: EntityManager, scope: FeedScope, draft: Draft, at: Date): Promise<number | null> {
  const seconds = Math.floor(at.getTime() / 1000);
  const { state, history, hash } = draft;
  if (state) {
    const lastChange = Math.floor(state.changedAt.getTime() / 1000);
    if (state.textHash.equals(hash)) return lastChange;
    if (lastChange >= seconds) return null;
  }
  const changedAt = new Date(seconds * 1000);
  const kept = manager.create(FeedState, { scope: scopeKey(scope), history, textHash: hash, changedAt });
  await new FeedRepository(manager).saveState(kept);
  return seconds;
}

function answer({ bytes, hash }: Draft, lastModifiedSeconds: number | null): FeedAnswer {
  const validators = { etag: `"${hash.toString('base64url')}"`, lastModifiedSeconds };
  return { kind: 'calendar', bytes, validators };
}
