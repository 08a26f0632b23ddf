import { z } from 'zod';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { ObjectiveWire, PlanWire, ProblemWire, UnmetWire } from './engine-wire';
import { Id, Instant, MinuteStamp } from './primitives';
import { KEY_DATE_KINDS } from './productions';
import { STAGE_KINDS, STAGE_STATES } from './stage';

/** Names for every id that a plan uses, so that the timeline and the sentences need no further reads. */
export const Directory = z.object({
  productions: z.array(
    z.object({ id: Id, name: z.string(), mark: z.string(), hue: z.int(), state: z.string(), clientName: z.string() }),
  ),
  pieces: z.array(z.object({ id: Id, productionId: Id, name: z.string(), position: z.int() })),
  stages: z.array(
    z.object({
      id: Id,
      pieceId: Id,
      productionId: Id,
      name: z.string(),
      position: z.int(),
      kind: z.enum(STAGE_KINDS),
      state: z.enum(STAGE_STATES),
      nth: z.int().nullable(),
      of: z.int().nullable(),
      materialName: z.string().nullable(),
      milestone: z.string().nullable(),
      cautions: z.array(z.string()),
      version: z.int(),
    }),
  ),
  makers: z.array(z.object({ id: Id, name: z.string(), initials: z.string() })),
  crafts: z.array(z.object({ id: Id, key: z.string(), name: z.string() })),
  bays: z.array(z.object({ id: Id, name: z.string(), kind: z.string(), pieceId: Id.nullable() })),
  keyDates: z.array(z.object({ id: Id, productionId: Id, kind: z.enum(KEY_DATE_KINDS) })),
});
export type Directory = z.infer<typeof Directory>;

/** The working plan, whole: the problem it answers, where everything stands, and what is unmet. */
export const WorkingPlanView = z.object({
  /** Counts up with every change, undo and redo; sent back with each to catch two people at once. */
  revision: z.int(),
  label: z.string(),
  changedAt: Instant,
  changedBy: z.string().nullable(),
  canUndo: z.boolean(),
  canRedo: z.boolean(),
  undoLabel: z.string().nullable(),
  redoLabel: z.string().nullable(),
  /** Whether stages, makers or dates changed since it was laid out: level or move to bring it up to date. */
  stale: z.boolean(),
  fingerprint: z.string(),
  zone: z.string(),
  now: MinuteStamp,
  problem: ProblemWire,
  plan: PlanWire,
  unmet: z.array(UnmetWire),
  objective: ObjectiveWire,
  directory: Directory,
  issued: z.object({ number: z.int(), at: Instant, by: z.string().nullable(), differs: z.boolean() }).nullable(),
});
export type WorkingPlanView = z.infer<typeof WorkingPlanView>;

/** Put one stage elsewhere, and hold it there: null leaves that side to the engine. */
export const StageMove = z.object({
  revision: z.int(),
  stageId: Id,
  start: MinuteStamp.nullable(),
  makerIds: z.array(Id).max(12).nullable(),
  bayIds: z.array(Id).max(6).nullable(),
});
export type StageMove = z.infer<typeof StageMove>;

export const Revised = z.object({ revision: z.int() });

export const LevelRequest = z.object({
  revision: z.int(),
  mode: z.enum(['dates', 'within-dates']).default('dates'),
  seconds: z.number().min(0.2).max(120).default(3),
  seed: z.int().min(0).max(2_147_483_647).default(1),
});

export const LEVEL_STATES = ['waiting', 'running', 'found', 'taken', 'left', 'cancelled', 'failed'] as const;
export const LevelRun = z.object({
  id: Id,
  state: z.enum(LEVEL_STATES),
  mode: z.enum(['dates', 'within-dates']),
  revision: z.int(),
  startedAt: Instant,
  seconds: z.number(),
  schedules: z.int(),
  objective: ObjectiveWire.nullable(),
  bound: z.record(z.string(), z.int().nullable()).nullable(),
  stop: z.string().nullable(),
  failure: z.string().nullable(),
});
export type LevelRun = z.infer<typeof LevelRun>;

/** One change between two plans, told in a sentence, and for whom it matters. */
export const PlanChange = z.object({
  stageId: Id,
  sentence: z.string(),
  makerIds: z.array(Id),
  fromStart: MinuteStamp.nullable(),
  toStart: MinuteStamp.nullable(),
});
export type PlanChange = z.infer<typeof PlanChange>;

/** How one key date fares in two plans; margin in minutes by the clock, negative when missed. */
export const KeyDateEffect = z.object({
  keyDateId: Id,
  marginBefore: z.int().nullable(),
  marginAfter: z.int().nullable(),
});

export const LevelProposal = z.object({
  run: LevelRun,
  before: ObjectiveWire,
  after: ObjectiveWire,
  plan: PlanWire,
  unmet: z.array(UnmetWire),
  changes: z.array(PlanChange),
  keyDates: z.array(KeyDateEffect),
});
export type LevelProposal = z.infer<typeof LevelProposal>;

export const IssuePreview = z.object({
  revision: z.int(),
  changes: z.array(PlanChange),
  forMakers: z.array(z.object({ makerId: Id, changes: z.int() })),
  keyDates: z.array(KeyDateEffect),
  /** Reasons that forbid issuing; empty when it may be issued. */
  obstacles: z.array(z.string()),
  warnings: z.array(z.string()),
});
export type IssuePreview = z.infer<typeof IssuePreview>;

export const IssuedPlanSummary = z.object({
  number: z.int(),
  at: Instant,
  by: z.string().nullable(),
  note: z.string(),
  stages: z.int(),
  changes: z.int(),
});
export type IssuedPlanSummary = z.infer<typeof IssuedPlanSummary>;

/** A key date ahead: margin in the working plan, and the chain of stages and waits that leads to it, first cause first. */
export const DateRisk = z.object({
  keyDateId: Id,
  productionId: Id,
  kind: z.enum(KEY_DATE_KINDS),
  strength: z.enum(['hard', 'wished']),
  at: Instant,
  readyAt: Instant.nullable(),
  marginMinutes: z.int().nullable(),
  workingMarginMinutes: z.int().nullable(),
  state: z.enum(['met', 'close', 'missed', 'unplanned']),
  /** One sentence: why it is missed or what it hangs on. */
  sentence: z.string(),
  drivers: z.array(
    z.object({ stageId: Id, productionId: Id, name: z.string(), start: Instant, end: Instant, sentence: z.string() }),
  ),
});
export type DateRisk = z.infer<typeof DateRisk>;

/** Load against capacity by craft, maker or bay, a cell a day. */
export const LoadView = z.object({
  days: z.array(z.string()),
  rows: z.array(
    z.object({
      id: Id,
      name: z.string(),
      loadMinutes: z.array(z.int()),
      tentativeMinutes: z.array(z.int()),
      capacityMinutes: z.array(z.int()),
    }),
  ),
});
export type LoadView = z.infer<typeof LoadView>;

export const planningEndpoints = {
  readPlan: endpoint({
    method: 'GET',
    path: '/api/plan',
    who: OFFICE,
    summary: 'The working plan',
    response: WorkingPlanView,
  }),
  moveStage: endpoint({
    method: 'POST',
    path: '/api/plan/moves',
    who: OFFICE,
    summary: 'Put a stage elsewhere and hold it there',
    body: StageMove,
    response: Revised,
  }),
  releasePin: endpoint({
    method: 'POST',
    path: '/api/plan/releases',
    who: OFFICE,
    summary: 'Let a held stage go',
    body: z.object({ revision: z.int(), stageId: Id }),
    response: Revised,
  }),
  undo: endpoint({
    method: 'POST',
    path: '/api/plan/undo',
    who: OFFICE,
    summary: 'Take the last change back',
    body: z.object({ revision: z.int() }),
    response: Revised,
  }),
  redo: endpoint({
    method: 'POST',
    path: '/api/plan/redo',
    who: OFFICE,
    summary: 'Make the change again',
    body: z.object({ revision: z.int() }),
    response: Revised,
  }),
  startLevel: endpoint({
    method: 'POST',
    path: '/api/plan/level',
    who: OFFICE,
    summary: 'Level all productions in the background',
    body: LevelRequest,
    response: LevelRun,
    status: 202,
  }),
  readLevel: endpoint({
    method: 'GET',
    path: '/api/plan/level/:id',
    who: OFFICE,
    summary: 'How a levelling stands',
    params: ById,
    response: LevelRun,
  }),
  cancelLevel: endpoint({
    method: 'POST',
    path: '/api/plan/level/:id/cancel',
    who: OFFICE,
    summary: 'Stop; what was found so far can still be taken',
    params: ById,
    response: LevelRun,
  }),
  readProposal: endpoint({
    method: 'GET',
    path: '/api/plan/level/:id/proposal',
    who: OFFICE,
    summary: 'What a levelling found, compared with the working plan',
    params: ById,
    response: LevelProposal,
  }),
  takeLevel: endpoint({
    method: 'POST',
    path: '/api/plan/level/:id/take',
    who: OFFICE,
    summary: 'Take what was found into the working plan',
    params: ById,
    body: z.object({ revision: z.int() }),
    response: Revised,
  }),
  leaveLevel: endpoint({
    method: 'POST',
    path: '/api/plan/level/:id/leave',
    who: OFFICE,
    summary: 'Leave what was found',
    params: ById,
    response: LevelRun,
  }),
  previewIssue: endpoint({
    method: 'GET',
    path: '/api/plan/issue',
    who: OFFICE,
    summary: 'What issuing would change, and for whom',
    response: IssuePreview,
  }),
  issue: endpoint({
    method: 'POST',
    path: '/api/plan/issue',
    who: OFFICE,
    summary: 'Issue the working plan',
    body: z.object({ revision: z.int(), note: z.string().trim().max(400).default('') }),
    response: IssuedPlanSummary,
    status: 201,
  }),
  listIssued: endpoint({
    method: 'GET',
    path: '/api/issued-plans',
    who: WORKSHOP,
    summary: 'Issued plans, newest first',
    response: z.array(IssuedPlanSummary),
  }),
  readDates: endpoint({
    method: 'GET',
    path: '/api/dates',
    who: OFFICE,
    summary: 'Every key date ahead with its margin and what drives it',
    response: z.array(DateRisk),
  }),
  readLoad: endpoint({
    method: 'GET',
    path: '/api/load',
    who: OFFICE,
    summary: 'Hours against capacity',
    query: z.object({ by: z.enum(['craft', 'maker', 'bay']).default('craft') }),
    response: LoadView,
  }),
};
