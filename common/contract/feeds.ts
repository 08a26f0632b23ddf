import { z } from 'zod';
import { endpoint, EVERYBODY, ById } from './endpoint';
import { Id, Instant } from './primitives';

/** What a calendar address shows: one maker's work, one production's key dates and stages, or the whole studio. */
export const FeedScope = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('maker'), makerId: Id }),
  z.object({ kind: z.literal('production'), productionId: Id }),
  z.object({ kind: z.literal('studio') }),
]);
export type FeedScope = z.infer<typeof FeedScope>;

export const FeedView = z.object({
  id: Id,
  scope: FeedScope,
  name: z.string(),
  createdAt: Instant,
  lastReadAt: Instant.nullable(),
  revokedAt: Instant.nullable(),
});
export type FeedView = z.infer<typeof FeedView>;

/** Shown once, at creation: the secret address in its two spellings. */
export const NewFeed = FeedView.extend({ httpsUrl: z.string(), webcalUrl: z.string() });

export const feedEndpoints = {
  listFeeds: endpoint({
    method: 'GET',
    path: '/api/feeds',
    who: EVERYBODY,
    summary: "One's own calendar addresses",
    response: z.array(FeedView),
  }),
  createFeed: endpoint({
    method: 'POST',
    path: '/api/feeds',
    who: EVERYBODY,
    summary:
      'Make a calendar address; a maker for their own work, a client for their own production, the office for any',
    body: z.object({ scope: FeedScope }),
    response: NewFeed,
    status: 201,
  }),
  revokeFeed: endpoint({
    method: 'DELETE',
    path: '/api/feeds/:id',
    who: EVERYBODY,
    summary: 'Close a calendar address for good',
    params: ById,
  }),
};
