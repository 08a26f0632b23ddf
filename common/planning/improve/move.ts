import type { Minute } from '../../time/span';
import type { Plan } from '../problem/plan';
import type { Unmet } from '../problem/result';

/** What a hand did to one stage: dragged in time, onto makers, onto bays. Null leaves that part to the engine. */
export interface Move {
  readonly stageId: string;
  readonly start: Minute | null;
  readonly makerIds: readonly string[] | null;
  /** One bay for each of the stage's places, in their order. */
  readonly bayIds: readonly string[] | null;
}

/** The plan after a move, what the checker says of it, and every stage that stands otherwise than before. */
export interface MoveResult {
  readonly plan: Plan;
  readonly unmet: readonly Unmet[];
  readonly moved: readonly string[];
}
