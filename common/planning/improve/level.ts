import type { Problem } from '../problem/problem';
import type { LevelResult } from '../problem/result';
import type { LevelOptions } from './level-options';

export function level(_problem: Problem, _options: LevelOptions): LevelResult {
  throw new Error('Not written yet.');
}
