import type { Plan } from '../problem/plan';
import type { Problem, Weights } from '../problem/problem';
import type { Objective, Unmet } from '../problem/result';
import { countChanges } from './changes';
import { planCost } from './cost';
import { finishSum } from './finish-sum';
import { weightedLateness } from './lateness';
import { unevenness } from './unevenness';

/** The parts of the objective of a plan, given what the checker says of it. */
export function measure(problem: Problem, plan: Plan, unmet: readonly Unmet[]): Objective {
  const placed = new Map(
    plan.placements.filter((placement) => placement.work.length > 0).map((placement) => [placement.stageId, placement]),
  );
  return {
    unplaced: unmet.filter((one) => one.rule !== 'key-date').length,
    hardLateness: weightedLateness(problem, placed, 'hard'),
    wishedLateness: weightedLateness(problem, placed, 'wished'),
    costMinor: planCost(problem, placed),
    unevenness: unevenness(problem, placed),
    changes: countChanges(problem, placed),
    finishSum: finishSum(problem, placed),
  };
}

/**
 * Negative where `a` is better, positive where `b` is, 0 where neither. Parts are compared in their order; changes are weighed
 * into the cost at their penalty, and parts whose weight is 0 are passed over.
 */
export function compareObjectives(a: Objective, b: Objective, weights: Weights): number {
  return (
    a.unplaced - b.unplaced ||
    a.hardLateness - b.hardLateness ||
    a.wishedLateness - b.wishedLateness ||
    a.costMinor - b.costMinor + (a.changes - b.changes) * weights.changePenaltyMinor ||
    (weights.unevenness > 0 ? a.unevenness - b.unevenness : 0) ||
    a.changes - b.changes ||
    (weights.earliness > 0 ? a.finishSum - b.finishSum : 0)
  );
}

/** Whether `a` is strictly better than `b`. */
export function isBetter(a: Objective, b: Objective, weights: Weights): boolean {
  return compareObjectives(a, b, weights) < 0;
}
