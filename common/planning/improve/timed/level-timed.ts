import { lowerBound } from '../../bounds/lower-bound';
import { check } from '../../check/check';
import type { Compiled } from '../../construct/compiled';
import { measure } from '../../objective/objective';
import type { LevelResult } from '../../problem/result';
import { Budget } from '../../stop/budget';
import type { LevelOptions } from '../level-options';
import { levelAlternating } from './level-alternating';
import { planOfStarts } from './plan-of-starts';
import { TimedSearch } from './search-timed';
import { asTimed } from './timed-problem';

/** Levels a timed problem by its own searches; null for any other problem. */
export function levelTimed(compiled: Compiled, options: LevelOptions): LevelResult | null {
  const { problem } = compiled;
  const timed = asTimed(compiled);
  if (!timed) return null;
  const bound = lowerBound(problem);
  const alternating = levelAlternating(compiled, timed, bound, options);
  if (alternating) return alternating;
  const budget = new Budget(Math.max(1, options.maxSchedules), options.shouldStop);
  const tell = (): void => {
    if (!options.onProgress) return;
    const objective = measure(problem, planOfStarts(compiled, search.best), []);
    options.onProgress({ schedules: budget.schedules, objective, bound });
  };
  const search = new TimedSearch(timed, budget, options.seed, options.maxSchedules, bound.finishSum ?? 0, tell);
  search.run();
  const plan = planOfStarts(compiled, search.best);
  const unmet = check(problem, plan);
  return {
    plan,
    objective: measure(problem, plan, unmet),
    bound,
    unmet,
    schedules: budget.schedules,
    stop: budget.stop,
  };
}
