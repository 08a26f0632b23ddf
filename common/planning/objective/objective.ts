import type { Plan } from '../problem/plan';
import type { Problem, Weights } from '../problem/problem';
import type { Objective, Unmet } from '../problem/result';

export function measure(_problem: Problem, _plan: Plan, _unmet: readonly Unmet[]): Objective {
  throw new Error('Not written yet.');
}
export function compareObjectives(_a: Objective, _b: Objective, _weights: Weights): number {
  throw new Error('Not written yet.');
}
export function isBetter(a: Objective, b: Objective, weights: Weights): boolean {
  return compareObjectives(a, b, weights) < 0;
}
