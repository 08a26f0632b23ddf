import type { LoadCell } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';

/** Load against capacity of one craft, maker or bay, a cell for each studio day of the problem in order. */
export interface LoadRow {
  readonly id: string;
  readonly cells: readonly LoadCell[];
}

export function craftLoad(_problem: Problem, _plan: Plan): LoadRow[] {
  throw new Error('Not written yet.');
}
export function makerLoad(_problem: Problem, _plan: Plan): LoadRow[] {
  throw new Error('Not written yet.');
}
export function bayLoad(_problem: Problem, _plan: Plan): LoadRow[] {
  throw new Error('Not written yet.');
}
