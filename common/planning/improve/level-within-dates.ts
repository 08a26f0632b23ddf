import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { LevelResult } from '../problem/result';
import type { LevelOptions } from './level-options';

export function levelWithinDates(_problem: Problem, _plan: Plan, _options: LevelOptions): LevelResult {
  throw new Error('Not written yet.');
}
