import { z } from 'zod';
import { KEY_DATE_KINDS } from '../domain/key-date';
import { ById, endpoint, OFFICE } from './endpoint';
import { Day, Id, Instant, MinuteStamp } from './primitives';
import { SearchView } from './rescues';

const Share = z.number().min(0).max(1);
const Earliest = MinuteStamp.nullable();

/** What becomes of one key date of another production; margins in minutes by the clock, negative when missed. */
const PushedDateView = z.object({
  keyDateId: Id,
  productionName: z.string(),
  kind: z.enum(KEY_DATE_KINDS),
  strength: z.enum(['hard', 'wished']),
  marginBefore: z.int(),
  marginAfter: z.int(),
  missChanceBefore: Share,
  missChanceAfter: Share,
});

/** One way of laying the enquiry into the plan. Instants are minutes since 1970-01-01T00:00Z; null is beyond the horizon. */
const PromiseWayView = z.object({
  p50: Earliest,
  p80: Earliest,
  p90: Earliest,
  plannedReady: Earliest,
  drivers: z.array(z.object({ stageId: Id, name: z.string(), share: Share })),
  asked: z.array(z.object({ keyDateId: Id, missChance: Share })),
  others: z.array(PushedDateView),
});
export type PromiseWayView = z.infer<typeof PromiseWayView>;

/** One craft or bay by week: what the plan takes, what the enquiry asks on top, what there is, and by how much it is short. */
const ShortRowView = z.object({
  id: Id,
  name: z.string(),
  takenMinutes: z.array(z.int()),
  askedMinutes: z.array(z.int()),
  capacityMinutes: z.array(z.int()),
  shortMinutes: z.array(z.int()),
});
export type ShortRowView = z.infer<typeof ShortRowView>;

export const PromiseAnswer = z.object({
  draws: z.int(),
  seed: z.int(),
  behind: PromiseWayView,
  among: PromiseWayView,
  shortages: z.object({ weeks: z.array(Day), crafts: z.array(ShortRowView), bays: z.array(ShortRowView) }),
});
export type PromiseAnswer = z.infer<typeof PromiseAnswer>;

/** A question with its answer, once there is one; nothing is kept of what was stopped. */
export const PromiseSearchView = SearchView.extend({ productionId: Id, answer: PromiseAnswer.nullable() });
export type PromiseSearchView = z.infer<typeof PromiseSearchView>;

export const PromiseRequest = z.object({
  productionId: Id,
  /** How many times each way is lived through; absent for as often as the settings say. */
  draws: z.int().min(100, 'Under 100 draws the chances are worth little.').max(5000).optional(),
  /** The enquiry is not begun before; absent for as soon as can be. */
  earliestStart: Instant.nullable().default(null),
});

export const promiseEndpoints = {
  startPromise: endpoint({
    method: 'POST',
    path: '/api/promises',
    who: OFFICE,
    summary: 'Ask when a tentative production could be delivered, in the background; the plan stays as it is',
    body: PromiseRequest,
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
    summary: 'Stop; nothing is kept of it',
    params: ById,
    response: PromiseSearchView,
  }),
};
