import type { Compiled } from '../construct/compiled';
import type { Layout } from '../construct/layout';

/** Movable stages that late dates wait for, directly or through links; those of the most weighted lateness first. */
export function findLate(compiled: Compiled, layout: Layout): number[] {
  const { dates, horizonMinutes, links, work } = compiled;
  const weightOf = new Float64Array(compiled.stageCount);
  const open: number[] = [];
  for (let date = 0; date < dates.count; date += 1) {
    for (const stage of dates.stages[date]) {
      const finish = layout.isPlaced[stage] === 1 ? layout.finish[stage] : horizonMinutes;
      if (finish <= dates.at[date]) continue;
      const weight = (finish - dates.at[date]) * dates.weight[date] * (dates.isHard[date] === 1 ? 1000 : 1);
      if (weight > weightOf[stage]) {
        weightOf[stage] = weight;
        open.push(stage);
      }
    }
  }
  for (let stage = open.pop(); stage !== undefined; stage = open.pop()) {
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const before = links.from[links.inLinks[k]];
      if (weightOf[before] >= weightOf[stage]) continue;
      weightOf[before] = weightOf[stage];
      open.push(before);
    }
  }
  const late: number[] = [];
  weightOf.forEach((weight, stage) => {
    if (weight > 0 && work.fixity[stage] === 0) late.push(stage);
  });
  return late.sort((a, b) => weightOf[b] - weightOf[a] || a - b);
}
