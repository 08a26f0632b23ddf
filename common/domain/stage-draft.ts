import type { HandsOn } from './hands-on';

/** `make` is hands-on work; `sign-off` a client's decision; `check` a competent person's inspection or a load test. */
export const STAGE_KINDS = ['make', 'sign-off', 'check', 'transport'] as const;
export type StageKind = (typeof STAGE_KINDS)[number];

/**
 * How work may be interrupted: `session` not at all, `shifts` only where the crew's shift ends, `free` also to make way,
 * `clock` runs on day and night without hands.
 */
export const CONTINUITIES = ['session', 'shifts', 'free', 'clock'] as const;
export type Continuity = (typeof CONTINUITIES)[number];

/** How far a stage has come. */
export const STAGE_STATES = ['to-do', 'started', 'paused', 'finished'] as const;
export type StageState = (typeof STAGE_STATES)[number];

/** How many makers with a craft a stage wants at once. */
export interface CrewWanted {
  readonly craftId: string;
  readonly least: number;
  readonly most: number;
}

/** Where work is done: one of `bayIds`, held through the work, through its dwell too, or until a later stage has ended. */
export interface PlaceWanted {
  readonly bayIds: readonly string[];
  readonly units: number;
  readonly hold: 'work' | 'dwell' | 'until-stage';
  readonly untilStageId: string | null;
}

/** The latest end of a dwell by which followers start, in minutes at the reference climate, and what a soft miss costs. */
export interface DwellWindow {
  readonly kind: 'hard' | 'soft';
  readonly minutes: number;
  readonly extraMinutes: number;
  readonly costMinor: number;
}

/** Time by the clock after the work, from a material of the library, or in plain minutes where `materialId` is null. */
export interface StageDwell {
  readonly materialId: string | null;
  readonly milestone: string | null;
  readonly minutes: number;
  readonly attendedMinutes: number;
  readonly window: DwellWindow | null;
}

/** What a recipe or a person says of a stage before it belongs to a piece. The instant of a visit is written ISO 8601, UTC. */
export interface StageDraft {
  readonly name: string;
  readonly kind: StageKind;
  readonly handsOn: HandsOn;
  readonly crew: readonly CrewWanted[];
  readonly crewLossPermille: number;
  readonly continuity: Continuity;
  readonly places: readonly PlaceWanted[];
  readonly dwell: StageDwell | null;
  readonly cautions: readonly string[];
  readonly note: string;
  readonly visitAt: string | null;
  /** Usual time to a client's answer by message, in minutes by the clock. */
  readonly replyMinutes: number;
}

/** How one stage follows another; gaps in minutes, by the clock or in working time. */
export interface LinkDraft {
  readonly kind: 'finish-start' | 'start-start' | 'finish-finish' | 'start-finish';
  readonly after: 'dwell' | 'work';
  readonly minGapMinutes: number;
  readonly maxGapMinutes: number | null;
  readonly time: 'clock' | 'working';
}

/** The plain link: the next starts when the first and its dwell have ended. */
export const PLAIN_LINK: LinkDraft = {
  kind: 'finish-start',
  after: 'dwell',
  minGapMinutes: 0,
  maxGapMinutes: null,
  time: 'clock',
};
