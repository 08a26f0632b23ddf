import type { Placement } from '../problem/plan';
import type { KeyDate, Problem } from '../problem/problem';

/**
 * Minutes past the key dates of one strength, each times its weight. A date is as late as the last of its stages' dwell ends;
 * a stage without a place counts as ending with the horizon.
 */
export function weightedLateness(
  problem: Problem,
  placed: ReadonlyMap<string, Placement>,
  strength: KeyDate['strength'],
): number {
  let sum = 0;
  for (const date of problem.keyDates) {
    if (date.strength !== strength) continue;
    let finish = -Infinity;
    for (const id of date.stageIds) finish = Math.max(finish, placed.get(id)?.dwellEnd ?? problem.horizon.end);
    if (finish > date.at) sum += (finish - date.at) * date.weight;
  }
  return sum;
}
