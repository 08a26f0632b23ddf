import type { FeedScope, FeedView } from '@common/contract/feeds';
import type { FeedToken } from '@database/entities';

/** The scope of a stored address; the database sees to it that the id that belongs to it is there. */
export function scopeOf(feed: Pick<FeedToken, 'scope' | 'makerId' | 'productionId'>): FeedScope {
  if (feed.scope === 'maker' && feed.makerId !== null) {
    return { kind: 'maker', makerId: feed.makerId };
  }
  if (feed.scope === 'production' && feed.productionId !== null) {
    return { kind: 'production', productionId: feed.productionId };
  }
  return { kind: 'studio' };
}

/** The columns of a scope. */
export function scopeColumns(scope: FeedScope): Pick<FeedToken, 'scope' | 'makerId' | 'productionId'> {
  return {
    scope: scope.kind,
    makerId: scope.kind === 'maker' ? scope.makerId : null,
    productionId: scope.kind === 'production' ? scope.productionId : null,
  };
}

/** An address as its owner sees it again: without its secret. */
export function feedView(feed: FeedToken, name: string): FeedView {
  return {
    id: feed.id,
    scope: scopeOf(feed),
    name,
    createdAt: feed.createdAt.toISOString(),
    lastReadAt: feed.lastReadAt?.toISOString() ?? null,
    revokedAt: feed.revokedAt?.toISOString() ?? null,
  };
}
