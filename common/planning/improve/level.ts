import { lowerBound } from '../bounds/lower-bound';
import { check } from '../check/check';
import { compile } from '../construct/compile';
import { estimate } from '../construct/estimate';
import { toPlan } from '../construct/to-plan';
import { levelWithGaps } from '../gaps/level-with-gaps';
import { measure } from '../objective/objective';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { LevelResult, Objective } from '../problem/result';
import { Budget } from '../stop/budget';
import { evenOut } from './even-out';
import type { LevelOptions } from './level-options';
import { StudioSearch } from './search-studio';
import { levelTimed } from './timed/level-timed';

/** Schedules spent on laying out a part where exact search found no whole plan. */
const SALVAGE_SCHEDULES = 20;

/** The share of schedules after which evenness is sought in what is left. */
const EVEN_SHARE = 0.9;

/**
 * Lays all stages out so that capacity is kept, dates are met and load is even, as well as the budget allows; improves until told
 * to stop. What the plan could not meet stands in `unmet`, in the checker's words. Throws only on a problem without meaning.
 */
export function level(problem: Problem, options: LevelOptions): LevelResult {
  const exact = levelWithGaps(problem, options);
  if (exact === null) return levelBySearch(problem, options);
  if (exact.plan.placements.length > 0) return exact;
  // No plan keeps everything, or none was found: lay out what can be, and keep what was proved.
  const maxSchedules = Math.max(1, Math.min(SALVAGE_SCHEDULES, options.maxSchedules - exact.schedules));
  const salvaged = levelBySearch(problem, { ...options, maxSchedules });
  return { ...salvaged, bound: exact.bound, schedules: exact.schedules + salvaged.schedules, stop: exact.stop };
}

function levelBySearch(problem: Problem, options: LevelOptions): LevelResult {
  const compiled = compile(problem);
  const timed = levelTimed(compiled, options);
  if (timed) return timed;
  const searchBudget = new Budget(Math.max(1, Math.floor(options.maxSchedules * EVEN_SHARE)), options.shouldStop);
  let bound: LevelResult['bound'] = noBound();
  const tell = (): void => {
    if (!options.onProgress) return;
    const plan = toPlan(search.bestLayout);
    const objective = measure(problem, plan, []);
    options.onProgress({
      schedules: searchBudget.schedules,
      objective: { ...objective, unplaced: search.bestScore[0] },
      bound,
    });
  };
  const search = new StudioSearch(compiled, estimate(compiled), searchBudget, options.seed, tell);
  search.construct();
  bound = lowerBound(problem);
  search.improve();
  const budget = new Budget(Math.max(0, options.maxSchedules - searchBudget.schedules), options.shouldStop);
  evenOut(search.bestLayout, budget, options.seed);
  const plan = toPlan(search.bestLayout);
  return { ...finish(problem, plan, searchBudget.schedules + budget.schedules, searchBudget.stop), bound };
}

/** Measures and checks a plan into a result. */
export function finish(problem: Problem, plan: Plan, schedules: number, stop: LevelResult['stop']): LevelResult {
  const unmet = check(problem, plan);
  return { plan, objective: measure(problem, plan, unmet), bound: noBound(), unmet, schedules, stop };
}

/** No part bounded. */
export function noBound(): { [Part in keyof Objective]: number | null } {
  return {
    unplaced: null,
    hardLateness: null,
    wishedLateness: null,
    costMinor: null,
    unevenness: null,
    changes: null,
    finishSum: null,
  };
}
