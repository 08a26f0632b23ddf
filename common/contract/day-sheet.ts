import { z } from 'zod';
import { endpoint, WORKSHOP } from './endpoint';
import { Day, Id, Instant, Minutes, Version } from './primitives';
import { STAGE_KINDS, STAGE_STATES } from './stage';

/** One stretch of a maker's issued day. */
export const DaySheetEntry = z.object({
  stageId: Id,
  pieceName: z.string(),
  productionName: z.string(),
  mark: z.string(),
  hue: z.int(),
  name: z.string(),
  kind: z.enum(STAGE_KINDS),
  nth: z.int().nullable(),
  of: z.int().nullable(),
  start: Instant,
  end: Instant,
  bayName: z.string().nullable(),
  withMakers: z.array(z.string()),
  cautions: z.array(z.string()),
  note: z.string(),
  state: z.enum(STAGE_STATES),
  spentMinutes: Minutes,
  handsOnMinutes: Minutes,
  /** When the piece may be touched after this stage; null without a dwell. */
  dwellUntil: Instant.nullable(),
  /** Whether it has to be begun before going home so that it cures overnight. */
  beforeGoingHome: z.boolean(),
  version: Version,
});
export type DaySheetEntry = z.infer<typeof DaySheetEntry>;

export const DaySheet = z.object({
  day: Day,
  makerId: Id,
  makerName: z.string(),
  zone: z.string(),
  issuedNumber: z.int().nullable(),
  entries: z.array(DaySheetEntry),
  dwells: z.array(
    z.object({ stageId: Id, pieceName: z.string(), name: z.string(), mark: z.string(), hue: z.int(), until: Instant }),
  ),
});
export type DaySheet = z.infer<typeof DaySheet>;

export const daySheetEndpoints = {
  readDaySheet: endpoint({
    method: 'GET',
    path: '/api/day-sheet',
    who: WORKSHOP,
    summary: "A maker's issued work for one day; makers see their own",
    query: z.object({ day: Day.optional(), makerId: Id.optional() }),
    response: DaySheet,
  }),
};
