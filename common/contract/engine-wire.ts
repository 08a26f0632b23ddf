import { z } from 'zod';
import type { Problem } from '../planning/problem/problem';
import type { Plan } from '../planning/problem/plan';
import type { Objective, Unmet } from '../planning/problem/result';
import { MinuteStamp } from './primitives';

/** The engine's own shapes as they cross the wire and the worker's door. Instants are minutes since 1970-01-01T00:00Z. */
const SpanWire = z.object({ start: MinuteStamp, end: MinuteStamp });

export const PlanWire = z.object({
  placements: z.array(
    z.object({
      stageId: z.string(),
      work: z.array(SpanWire),
      crew: z.array(z.object({ makerId: z.string(), craftId: z.string() })),
      bayIds: z.array(z.string()),
      dwellEnd: MinuteStamp,
    }),
  ),
}) satisfies z.ZodType<Plan>;

const WindowWire = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('hard'), minutes: z.int() }),
  z.object({ kind: z.literal('soft'), minutes: z.int(), extraMinutes: z.int(), costMinor: z.int() }),
]);

const HoldWire = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('work') }),
  z.object({ kind: z.literal('dwell') }),
  z.object({ kind: z.literal('until-stage'), stageId: z.string() }),
]);

const ProgressWire = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('to-do') }),
  z.object({
    kind: z.literal('started'),
    start: MinuteStamp,
    makerIds: z.array(z.string()),
    bayIds: z.array(z.string()),
    remainingMinutes: z.int(),
  }),
  z.object({
    kind: z.literal('finished'),
    start: MinuteStamp,
    end: MinuteStamp,
    makerIds: z.array(z.string()),
    bayIds: z.array(z.string()),
  }),
]);

const StageWire = z.object({
  id: z.string(),
  pieceId: z.string(),
  productionId: z.string(),
  effort: z.object({ kind: z.enum(['person-minutes', 'duration']), minutes: z.int() }),
  crew: z.array(z.object({ craftId: z.string(), least: z.int(), most: z.int() })),
  crewLossPermille: z.int(),
  continuity: z.enum(['session', 'shifts', 'free', 'clock']),
  places: z.array(z.object({ bayIds: z.array(z.string()), units: z.int(), hold: HoldWire })),
  dwell: z
    .object({
      minutes: z.int(),
      advance: z.record(z.string(), z.string()),
      attendedMinutes: z.int(),
      window: WindowWire.nullable(),
    })
    .nullable(),
  earliestStart: MinuteStamp,
  latestEnd: MinuteStamp.nullable(),
  fixedStart: MinuteStamp.nullable(),
  pin: z
    .object({
      start: MinuteStamp.nullable(),
      makerIds: z.array(z.string()).nullable(),
      bayIds: z.array(z.string()).nullable(),
    })
    .nullable(),
  progress: ProgressWire,
});

export const ProblemWire = z.object({
  horizon: SpanWire,
  makers: z.array(
    z.object({
      id: z.string(),
      crafts: z.array(z.object({ craftId: z.string(), pacePermille: z.int() })),
      shifts: z.array(SpanWire),
      overtime: z.array(SpanWire),
      hourCostMinor: z.int(),
      overtimeHourCostMinor: z.int(),
      limits: z.object({ dayMinutes: z.int(), weekMinutes: z.int(), restBetweenMinutes: z.int() }).nullable(),
    }),
  ),
  bays: z.array(z.object({ id: z.string(), capacity: z.int(), open: z.array(SpanWire).nullable() })),
  stages: z.array(StageWire),
  links: z.array(
    z.object({
      fromStageId: z.string(),
      toStageId: z.string(),
      kind: z.enum(['finish-start', 'start-start', 'finish-finish', 'start-finish']),
      after: z.enum(['dwell', 'work']),
      minGapMinutes: z.int(),
      maxGapMinutes: z.int().nullable(),
      time: z.enum(['clock', 'working']),
    }),
  ),
  keyDates: z.array(
    z.object({
      id: z.string(),
      productionId: z.string(),
      at: MinuteStamp,
      strength: z.enum(['hard', 'wished']),
      weight: z.int(),
      stageIds: z.array(z.string()),
    }),
  ),
  advances: z.array(z.object({ id: z.string(), from: z.array(MinuteStamp), permille: z.array(z.int()) })),
  days: z.array(SpanWire.extend({ day: z.string() })),
  workingTime: z.array(SpanWire),
  freezeUntil: MinuteStamp,
  issued: PlanWire.nullable(),
  weights: z.object({ changePenaltyMinor: z.int(), unevenness: z.int(), earliness: z.int() }),
}) satisfies z.ZodType<Problem>;

export const ObjectiveWire = z.object({
  unplaced: z.int(),
  hardLateness: z.int(),
  wishedLateness: z.int(),
  costMinor: z.int(),
  unevenness: z.int(),
  changes: z.int(),
  finishSum: z.int(),
}) satisfies z.ZodType<Objective>;

export const UnmetWire = z.object({
  rule: z.enum([
    'placed-once',
    'effort',
    'crew-size',
    'crew-craft',
    'crew-shift',
    'continuity',
    'maker-double-booked',
    'bay-choice',
    'bay-open',
    'bay-capacity',
    'dwell',
    'attended',
    'window',
    'link-min',
    'link-max',
    'link-cycle',
    'earliest',
    'latest',
    'fixed',
    'pin',
    'progress',
    'freeze',
    'limits',
    'horizon',
    'key-date',
  ]),
  stageIds: z.array(z.string()),
  keyDateId: z.string().nullable(),
  makerIds: z.array(z.string()),
  bayIds: z.array(z.string()),
  craftIds: z.array(z.string()),
  by: z.int(),
}) satisfies z.ZodType<Unmet>;
