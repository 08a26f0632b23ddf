import { lowerBound } from '../../bounds/lower-bound';
import { check } from '../../check/check';
import type { Compiled } from '../../construct/compiled';
import { measure } from '../../objective/objective';
import type { Placement, Plan } from '../../problem/plan';
import type { LevelResult } from '../../problem/result';
import { Budget } from '../../stop/budget';
import type { LevelOptions } from '../level-options';
import { TimedSearch } from './search-timed';
import { asTimed } from './timed-problem';

/** Levels a timed problem by its own search; null for any other problem. */
export function levelTimed(compiled: Compiled, options: LevelOptions): LevelResult | null {
  const { problem } = compiled;
  const timed = asTimed(compiled);
  if (!timed) return null;
  const bound = lowerBound(problem);
  const budget = new Budget(Math.max(1, options.maxSchedules), options.shouldStop);
  const tell = (): void => {
    if (!options.onProgress) return;
    const objective = measure(problem, planOf(compiled, search.best), []);
    options.onProgress({ schedules: budget.schedules, objective, bound });
  };
  const search = new TimedSearch(timed, budget, options.seed, options.maxSchedules, bound.finishSum ?? 0, tell);
  search.run();
  const plan = planOf(compiled, search.best);
  const unmet = check(problem, plan);
  return { plan, objective: measure(problem, plan, unmet), bound, unmet, schedules: budget.schedules, stop: budget.stop };
}

function planOf(compiled: Compiled, starts: Int32Array): Plan {
  const { origin, work, bayIds } = compiled;
  const placements = compiled.stages.map((stage, k): Placement => {
    const start = starts[k] + origin;
    const end = start + work.minutes[k];
    const housing = [...work.housings[k][0]].map((bay) => bayIds[bay]);
    return { stageId: stage.id, work: [{ start, end }], crew: [], bayIds: housing, dwellEnd: end };
  });
  return { placements };
}
