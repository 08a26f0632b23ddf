import { z } from 'zod';
import { CONTINUITIES, STAGE_KINDS, STAGE_STATES } from '../domain/stage-draft';
import { Id, Instant, Minutes, Name, Note, Version } from './primitives';

/** Hands-on person-minutes: low, likely, high. */
export const HandsOn = z
  .object({ lowMinutes: Minutes, likelyMinutes: Minutes, highMinutes: Minutes })
  .refine((h) => h.lowMinutes <= h.likelyMinutes && h.likelyMinutes <= h.highMinutes, {
    message: 'Low, likely and high hours must stand in that order.',
    path: ['likelyMinutes'],
  });
export type HandsOn = z.infer<typeof HandsOn>;

export const CrewWanted = z
  .object({ craftId: Id, least: z.int().min(1).max(12), most: z.int().min(1).max(12) })
  .refine((c) => c.least <= c.most, { message: 'The most makers can not be fewer than the least.', path: ['most'] });

/** Dwell after the work: from a material of the library, or in minutes of its own. */
export const StageDwell = z.object({
  materialId: Id.nullable(),
  milestone: z.string().max(40).nullable(),
  /** At the material's reference temperature, or plain minutes where there is no material. */
  minutes: Minutes,
  attendedMinutes: Minutes,
  window: z
    .object({ kind: z.enum(['hard', 'soft']), minutes: Minutes, extraMinutes: Minutes, costMinor: z.int().min(0) })
    .nullable(),
});
export type StageDwell = z.infer<typeof StageDwell>;

/** Where the work is done: one of `bayIds`; held through the work, its own dwell, or until a later stage has ended. */
export const PlaceWanted = z.object({
  bayIds: z.array(Id).min(1, 'Name at least one bay.').max(20),
  units: z.int().min(1).max(50),
  hold: z.enum(['work', 'dwell', 'until-stage']),
  untilStageId: Id.nullable(),
});

export { CONTINUITIES, STAGE_KINDS, STAGE_STATES };

/** What a recipe or a person says of a stage before it belongs to a piece. */
export const StageDraft = z.object({
  name: Name,
  kind: z.enum(STAGE_KINDS),
  handsOn: HandsOn,
  crew: z.array(CrewWanted).max(6),
  crewLossPermille: z.int().min(0).max(500),
  continuity: z.enum(CONTINUITIES),
  places: z.array(PlaceWanted).max(6),
  dwell: StageDwell.nullable(),
  cautions: z.array(z.string().max(400)).max(20),
  note: Note,
  /** For a sign-off: the visit's instant if one is agreed, and the usual time to an answer by message. */
  visitAt: Instant.nullable(),
  replyMinutes: Minutes,
});
export type StageDraft = z.infer<typeof StageDraft>;

export const StageView = StageDraft.extend({
  id: Id,
  pieceId: Id,
  productionId: Id,
  position: z.int(),
  /** Which repeat it is: "3 of 8"; null where it stands alone. */
  nth: z.int().nullable(),
  of: z.int().nullable(),
  state: z.enum(STAGE_STATES),
  startedAt: Instant.nullable(),
  finishedAt: Instant.nullable(),
  spentMinutes: Minutes,
  remainingMinutes: Minutes.nullable(),
  version: Version,
});
export type StageView = z.infer<typeof StageView>;

/** How a stage follows another; gaps in minutes. */
export const StageLink = z.object({
  id: Id,
  fromStageId: Id,
  toStageId: Id,
  kind: z.enum(['finish-start', 'start-start', 'finish-finish', 'start-finish']),
  after: z.enum(['dwell', 'work']),
  minGapMinutes: z.int().min(-100_000).max(1_000_000),
  maxGapMinutes: z.int().min(-100_000).max(1_000_000).nullable(),
  time: z.enum(['clock', 'working']),
});
export type StageLink = z.infer<typeof StageLink>;
