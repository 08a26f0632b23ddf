import type { Plan } from './plan';

/** The rules that a plan can break, one word each; the checker and the engine's unmet requirements share them. */
export type Rule =
  | 'placed-once'
  | 'effort'
  | 'crew-size'
  | 'crew-craft'
  | 'crew-shift'
  | 'continuity'
  | 'maker-double-booked'
  | 'bay-choice'
  | 'bay-open'
  | 'bay-capacity'
  | 'dwell'
  | 'attended'
  | 'window'
  | 'link-min'
  | 'link-max'
  | 'link-cycle'
  | 'earliest'
  | 'latest'
  | 'fixed'
  | 'pin'
  | 'progress'
  | 'freeze'
  | 'limits'
  | 'horizon'
  | 'key-date';

/** A broken requirement: which rule, whose, by how much, and what it collides with. */
export interface Unmet {
  readonly rule: Rule;
  readonly stageIds: readonly string[];
  readonly keyDateId: string | null;
  readonly makerIds: readonly string[];
  readonly bayIds: readonly string[];
  readonly craftIds: readonly string[];
  /** How far off, in minutes (or units of capacity for `bay-capacity`); 0 where no amount applies. */
  readonly by: number;
}

/**
 * The parts of the objective in their order, all integers, less is better: a plan is better where the first part that
 * differs is smaller. Changes are weighed into cost at `Weights.changePenaltyMinor` each; a part whose weight is 0 is passed over.
 */
export interface Objective {
  /** Stages that could not be placed, and requirements broken other than hard key dates. */
  readonly unplaced: number;
  /** Minutes past hard key dates, weighted. */
  readonly hardLateness: number;
  /** Minutes past wished key dates, weighted. */
  readonly wishedLateness: number;
  /** Overtime, freelancers and missed soft windows, in minor units. */
  readonly costMinor: number;
  /** Sum over days and crafts of squared load in quarter hours. */
  readonly unevenness: number;
  /** Stages that begin or are crewed otherwise than in the issued plan. */
  readonly changes: number;
  /** Sum over productions of the finish, in minutes from the horizon's start. */
  readonly finishSum: number;
}

/** Why the search ended. */
export type StopReason = 'budget' | 'cancelled' | 'proven-best' | 'nothing-to-improve';

/** What levelling returns. Nothing in it has been stored, and `unmet` is what the checker says of `plan`. */
export interface LevelResult {
  readonly plan: Plan;
  readonly objective: Objective;
  /** Proven lower bounds for the same parts; null for a part without one. */
  readonly bound: { readonly [Part in keyof Objective]: number | null };
  readonly unmet: readonly Unmet[];
  readonly schedules: number;
  readonly stop: StopReason;
}

/** What the search says while it runs. */
export interface LevelProgress {
  readonly schedules: number;
  readonly objective: Objective;
  readonly bound: LevelResult['bound'];
}
