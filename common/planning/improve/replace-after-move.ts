import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { Move, MoveResult } from './move';

export function replaceAfterMove(_problem: Problem, _plan: Plan, _move: Move): MoveResult {
  throw new Error('Not written yet.');
}
