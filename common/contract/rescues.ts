import { z } from 'zod';
import { MEASURE_KINDS } from '../domain/measure-kind';
import type { Measure, RescueTerms } from '../rescue/measure';
import { ById, endpoint, OFFICE } from './endpoint';
import { Day, Id, Instant, Minor, MinuteStamp } from './primitives';

/** A change that may save a key date; see `common/rescue`. */
export const MeasureWire = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('overtime'), makerId: Id, from: Day, until: Day, minutesADay: z.int() }),
  z.object({
    kind: z.literal('weekend-shift'),
    makerId: Id,
    day: Day,
    startMinuteOfDay: z.int(),
    minutes: z.int(),
  }),
  z.object({ kind: z.literal('freelancer'), makerId: Id, craftId: Id, from: Day, days: z.int() }),
  z.object({ kind: z.literal('heat'), bayId: Id, celsius: z.number(), from: MinuteStamp, until: MinuteStamp }),
  z.object({ kind: z.literal('second-mould'), bayId: Id }),
  z.object({
    kind: z.literal('faster-material'),
    stageId: Id,
    materialId: Id,
    milestone: z.string(),
    minutes: z.int(),
  }),
  z.object({ kind: z.literal('earlier-sign-off'), stageId: Id, replyMinutes: z.int() }),
  z.object({ kind: z.literal('part-delivery'), keyDateId: Id, pieceIds: z.array(Id) }),
  z.object({ kind: z.literal('later-date'), keyDateId: Id, at: MinuteStamp }),
]) satisfies z.ZodType<Measure>;

/** What the studio allows to be proposed for a date at risk, how much of it, and at which prices. */
export const RescueSettings = z.object({
  allowed: z.array(z.enum(MEASURE_KINDS)).max(MEASURE_KINDS.length),
  eveningMinutes: z.int().min(15).max(360, 'An evening longer than 6 h leaves no night.'),
  eveningDays: z.int().min(1).max(60),
  weekendMinutes: z.int().min(60).max(600),
  freelancerDayMinor: Minor,
  freelancerDays: z.int().min(1).max(60),
  heatCelsius: z.number().min(10).max(60, 'Nobody works at more than 60 °C; use an oven.'),
  heatHourMinor: Minor,
  mouldMinor: Minor,
  materialMinor: Minor,
  signOffMinor: Minor,
  partDeliveryMinor: Minor,
  laterDayMinor: Minor,
  laterDays: z.int().min(1).max(120),
  goalPermille: z.int().min(1).max(900),
}) satisfies z.ZodType<RescueTerms>;
export type RescueSettings = z.infer<typeof RescueSettings>;

export const SEARCH_STATES = ['waiting', 'running', 'found', 'cancelled', 'failed'] as const;

/** How a search in the background stands. What was cancelled keeps what it had found. */
export const SearchView = z.object({
  id: Id,
  state: z.enum(SEARCH_STATES),
  weighed: z.int(),
  of: z.int(),
  startedAt: Instant,
  failure: z.string().nullable(),
  /** Whether the studio or its plan has changed since it began: it can be read, but not taken. */
  stale: z.boolean(),
});
export type SearchView = z.infer<typeof SearchView>;

const DateOdds = z.object({
  keyDateId: Id,
  name: z.string(),
  missChance: z.number().min(0).max(1),
  p80: MinuteStamp,
});

/** One thing that could be done for a date, with what it would bring. */
export const RescueView = z.object({
  measures: z.array(z.object({ measure: MeasureWire, sentence: z.string(), caution: z.string() })),
  priceMinor: Minor,
  missChance: z.number().min(0).max(1),
  p80: MinuteStamp,
  /** Whether the chance comes down to the studio's goal. */
  saves: z.boolean(),
  /** Other dates whose chance moves, as they would fare; `missChanceBefore` as they fare now. */
  others: z.array(DateOdds.extend({ missChanceBefore: z.number() })),
});
export type RescueView = z.infer<typeof RescueView>;

export const RescueSearchView = SearchView.extend({
  keyDateId: Id,
  before: z.object({ missChance: z.number(), p80: MinuteStamp }).nullable(),
  /** The best first. */
  rescues: z.array(RescueView),
});
export type RescueSearchView = z.infer<typeof RescueSearchView>;

/** A measure that the working plan counts on. */
export const TakenMeasure = z.object({ measure: MeasureWire, sentence: z.string(), caution: z.string() });
export type TakenMeasure = z.infer<typeof TakenMeasure>;

export const rescueEndpoints = {
  startRescue: endpoint({
    method: 'POST',
    path: '/api/rescues',
    who: OFFICE,
    summary: 'Look for what would save a key date, in the background; the plan stays as it is',
    body: z.object({ keyDateId: Id }),
    response: RescueSearchView,
    status: 202,
  }),
  readRescue: endpoint({
    method: 'GET',
    path: '/api/rescues/:id',
    who: OFFICE,
    summary: 'How such a search stands, and what it found',
    params: ById,
    response: RescueSearchView,
  }),
  cancelRescue: endpoint({
    method: 'POST',
    path: '/api/rescues/:id/cancel',
    who: OFFICE,
    summary: 'Stop; what was found so far can still be taken',
    params: ById,
    response: RescueSearchView,
  }),
  takeRescue: endpoint({
    method: 'POST',
    path: '/api/rescues/:id/take',
    who: OFFICE,
    summary: 'Let the working plan count on it; undo takes it back',
    params: ById,
    body: z.object({ revision: z.int(), rescue: z.int().min(0).max(100) }),
    response: z.object({ revision: z.int() }),
  }),
  listMeasures: endpoint({
    method: 'GET',
    path: '/api/plan/measures',
    who: OFFICE,
    summary: 'Measures that the working plan counts on',
    response: z.array(TakenMeasure),
  }),
  dropMeasure: endpoint({
    method: 'POST',
    path: '/api/plan/measures/drop',
    who: OFFICE,
    summary: 'Count on a measure no longer; what hung on it is laid out anew at the next levelling',
    body: z.object({ revision: z.int(), measure: z.int().min(0).max(200) }),
    response: z.object({ revision: z.int() }),
  }),
};
