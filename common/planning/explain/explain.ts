import type { StageReasons } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';

export function explain(_problem: Problem, _plan: Plan): StageReasons[] {
  throw new Error('Not written yet.');
}
