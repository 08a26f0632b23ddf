import { z } from 'zod';
import { ById, endpoint, OFFICE } from './endpoint';
import { Day, Id, Minutes, MinuteStamp } from './primitives';
import { SearchView } from './rescues';

const ShortWeekView = z.object({
  id: Id,
  name: z.string(),
  monday: Day,
  loadMinutes: Minutes,
  ownMinutes: Minutes,
  capacityMinutes: Minutes,
});

/** What the studio could promise one way: `behind` all other work, or `among` it. Instants in minutes UTC. */
export const PromisedView = z.object({
  way: z.enum(['behind', 'among']),
  planned: MinuteStamp,
  p50: MinuteStamp,
  p80: MinuteStamp,
  p90: MinuteStamp,
  unplacedStages: z.array(z.string()),
  pushed: z.array(
    z.object({
      keyDateId: Id,
      name: z.string(),
      missChanceBefore: z.number(),
      missChance: z.number(),
      laterMinutes: z.int(),
    }),
  ),
  shortCrafts: z.array(ShortWeekView),
  shortBays: z.array(ShortWeekView),
});
export type PromisedView = z.infer<typeof PromisedView>;

export const PromiseSearchView = SearchView.extend({ productionId: Id, ways: z.array(PromisedView) });
export type PromiseSearchView = z.infer<typeof PromiseSearchView>;

export const promiseEndpoints = {
  startPromise: endpoint({
    method: 'POST',
    path: '/api/promises',
    who: OFFICE,
    summary: 'Ask when a production could be ready, in the background; the plan stays as it is',
    body: z.object({ productionId: Id }),
    response: PromiseSearchView,
    status: 202,
  }),
  listPromises: endpoint({
    method: 'GET',
    path: '/api/promises',
    who: OFFICE,
    summary: 'The newest answer for each production',
    response: z.array(PromiseSearchView),
  }),
  readPromise: endpoint({
    method: 'GET',
    path: '/api/promises/:id',
    who: OFFICE,
    summary: 'How such a question stands, and the answer',
    params: ById,
    response: PromiseSearchView,
  }),
  cancelPromise: endpoint({
    method: 'POST',
    path: '/api/promises/:id/cancel',
    who: OFFICE,
    summary: 'Stop; what was found so far can be read',
    params: ById,
    response: PromiseSearchView,
  }),
};
