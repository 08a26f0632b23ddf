import type { Placement } from '../problem/plan';
import type { Problem } from '../problem/problem';

/**
 * Sum over studio days and crafts of squared load in quarter hours, the measure of Burgess & Killebrew 1962. A day's load of a
 * craft is the person-minutes worked in it, to the nearest quarter hour.
 */
export function unevenness(problem: Problem, placed: ReadonlyMap<string, Placement>): number {
  const byCraft = new Map<string, Float64Array>();
  for (const stage of problem.stages) {
    const placement = placed.get(stage.id);
    if (!placement || stage.progress.kind === 'finished') continue;
    const work = stage.progress.kind === 'started' ? placement.work.slice(1) : placement.work;
    for (const { craftId } of placement.crew) {
      let load = byCraft.get(craftId);
      if (!load) byCraft.set(craftId, (load = new Float64Array(problem.days.length)));
      for (const span of work) addToDays(problem, load, span.start, span.end);
    }
  }
  let sum = 0;
  for (const load of byCraft.values()) for (const minutes of load) sum += Math.round(minutes / 15) ** 2;
  return sum;
}

function addToDays(problem: Problem, load: Float64Array, start: number, end: number): void {
  const { days } = problem;
  let low = 0;
  let high = days.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (days[middle].end > start) high = middle;
    else low = middle + 1;
  }
  for (let day = low; day < days.length && days[day].start < end; day += 1) {
    load[day] += Math.max(0, Math.min(end, days[day].end) - Math.max(start, days[day].start));
  }
}
