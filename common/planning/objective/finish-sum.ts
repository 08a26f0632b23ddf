import type { Placement } from '../problem/plan';
import type { Problem } from '../problem/problem';

/** Sum over productions of the last dwell end, in minutes from the horizon's start; the horizon's end where a stage has no place. */
export function finishSum(problem: Problem, placed: ReadonlyMap<string, Placement>): number {
  const finish = new Map<string, number>();
  for (const stage of problem.stages) {
    const end = placed.get(stage.id)?.dwellEnd ?? problem.horizon.end;
    finish.set(stage.productionId, Math.max(finish.get(stage.productionId) ?? problem.horizon.start, end));
  }
  let sum = 0;
  for (const end of finish.values()) sum += end - problem.horizon.start;
  return sum;
}
