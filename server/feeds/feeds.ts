import { randomUUID } from 'node:crypto';
import type { FeedScope, FeedView } from '@common/contract/feeds';
import { FeedToken } from '@database/entities';
import { notFound, Problem } from '../http/problem';
import type { Actor } from '../session/actor';
import type { Transactions } from '../storage/transactions';
import { mayRead } from './feed-access';
import { feedView, scopeColumns, scopeOf } from './feed-mapper';
import { calendarName } from './feed-names';
import { FeedRepository } from './feed-repository';
import { digestOfToken, newFeedToken } from './feed-token';

/** How many open addresses one account may have: enough for every device, and a bound. */
const MOST_OPEN = 40;

/** Calendar addresses: made, listed and closed by those to whom they belong. */
export class Feeds {
  constructor(private readonly transactions: Transactions) {}

  list(actor: Actor): Promise<FeedView[]> {
    return this.transactions.read(async (manager) => {
      const repository = new FeedRepository(manager);
      const studio = await repository.studio();
      const views: FeedView[] = [];
      for (const feed of await repository.ofAccount(actor.accountId)) {
        views.push(feedView(feed, await calendarName(repository, scopeOf(feed), studio.name)));
      }
      return views;
    });
  }

  /** Makes an address; its secret is in the answer and nowhere else. */
  create(actor: Actor, scope: FeedScope): Promise<FeedView & { readonly token: string }> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new FeedRepository(unit.manager);
      await requireRight(repository, actor, scope);
      const name = await calendarName(repository, scope, (await repository.studio()).name);
      const open = (await repository.ofAccount(actor.accountId)).filter((feed) => feed.revokedAt === null);
      if (open.length >= MOST_OPEN) {
        throw new Problem(
          'still-in-use',
          `You have ${open.length} open calendar addresses. Close one you no longer use.`,
        );
      }
      const token = newFeedToken();
      const feed = unit.manager.create(FeedToken, {
        ...scopeColumns(scope),
        id: randomUUID(),
        tokenHash: Buffer.from(digestOfToken(token), 'hex'),
        accountId: actor.accountId,
        createdAt: unit.at,
        lastReadAt: null,
        revokedAt: null,
      });
      await repository.save(feed);
      const view = feedView(feed, name);
      const sentence = `Made a calendar address for ${name}.`;
      await unit.record({ action: 'created', subject: { kind: 'feed', id: feed.id }, sentence, after: view });
      return { ...view, token };
    });
  }

  /** Closes an address for good; closing it again changes nothing. */
  revoke(actor: Actor, id: string): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new FeedRepository(unit.manager);
      const feed = await repository.byId(id, actor.accountId);
      if (!feed) throw notFound('calendar address');
      if (feed.revokedAt !== null) return;
      feed.revokedAt = unit.at;
      await repository.save(feed);
      const sentence = 'Closed a calendar address.';
      await unit.record({ action: 'removed', subject: { kind: 'feed', id }, sentence });
    });
  }
}

/** Refuses a scope that is not the actor's; a client is not told whether another's production is there. */
async function requireRight(repository: FeedRepository, actor: Actor, scope: FeedScope): Promise<void> {
  const production = scope.kind === 'production' ? await repository.production(scope.productionId) : null;
  if (mayRead(actor, scope, production)) return;
  if (scope.kind === 'production' && actor.role === 'client') throw notFound('production');
  const own = actor.role === 'client' ? 'your own productions' : 'your own work';
  throw new Problem('not-allowed', `You can have a calendar of ${own}.`);
}
