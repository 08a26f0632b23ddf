import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { Unmet } from '../problem/result';

export function check(_problem: Problem, _plan: Plan): Unmet[] {
  throw new Error('Not written yet.');
}
