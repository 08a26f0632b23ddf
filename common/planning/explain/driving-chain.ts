import type { DrivingChain } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';

export function drivingChain(_problem: Problem, _plan: Plan, _keyDateId: string): DrivingChain {
  throw new Error('Not written yet.');
}
