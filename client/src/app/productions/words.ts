import type { ProductionSummary, StageLink, StageView } from '@common/contract';

/** How a production's state is written. */
export const PRODUCTION_STATE_WORDS: Readonly<Record<ProductionSummary['state'], string>> = {
  tentative: 'Tentative',
  committed: 'Committed',
  delivered: 'Delivered',
  declined: 'Declined',
};

/** What a production's state means for the plan. */
export const PRODUCTION_STATE_HINTS: Readonly<Record<ProductionSummary['state'], string>> = {
  tentative: 'Planned, but promised to nobody yet.',
  committed: 'Promised: its key dates count.',
  delivered: 'Done; it has left the plan.',
  declined: 'Not taken; it has left the plan.',
};

/** How a stage's kind is written. */
export const STAGE_KIND_WORDS: Readonly<Record<StageView['kind'], string>> = {
  make: 'Making',
  'sign-off': 'Sign-off',
  check: 'Check or load test',
  transport: 'Transport',
};

/** How far a stage is. */
export const STAGE_STATE_WORDS: Readonly<Record<StageView['state'], string>> = {
  'to-do': 'To do',
  started: 'Started',
  paused: 'Paused',
  finished: 'Finished',
};

/** How work may be interrupted, as a maker would say it. */
export const CONTINUITY_WORDS: Readonly<Record<StageView['continuity'], string>> = {
  session: 'Once begun, finished without leaving it',
  shifts: 'Goes on next shift with the same crew',
  free: 'May also make way for other work',
  clock: 'Runs by the clock, without hands',
};

/** How long a stage keeps its place. */
export const HOLD_WORDS: Readonly<Record<StageView['places'][number]['hold'], string>> = {
  work: 'while it is worked on',
  dwell: 'until its dwell is over',
  'until-stage': 'until a later stage has ended',
};

/** How one stage follows another. */
export const LINK_WORDS: Readonly<Record<StageLink['kind'], string>> = {
  'finish-start': 'begins after it has ended',
  'start-start': 'begins after it has begun',
  'finish-finish': 'ends after it has ended',
  'start-finish': 'ends after it has begun',
};

/** "Hull: laminate (3 of 8)": a stage's name with which repeat it is. */
export function stageTitle(stage: Pick<StageView, 'name' | 'nth' | 'of'>): string {
  return stage.nth === null || stage.of === null ? stage.name : `${stage.name} (${stage.nth} of ${stage.of})`;
}
