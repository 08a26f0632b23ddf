import { check } from '../../check/check';
import type { Compiled } from '../../construct/compiled';
import { alternate, type QuickSearch } from '../../exact/alternate';
import { timedModel } from '../../exact/timed-model';
import { measure } from '../../objective/objective';
import type { LevelResult } from '../../problem/result';
import { Budget } from '../../stop/budget';
import type { LevelOptions } from '../level-options';
import { planOfStarts } from './plan-of-starts';
import { TimedSearch } from './search-timed';
import type { TimedProblem } from './timed-problem';

/** Stages beyond which exact search seldom betters what the population found. */
const MOST_STAGES = 130;

/**
 * Levels a timed problem of modest size by population and exact search in turns; null where exact search does not know it. Each
 * turn of the population is a new one, from the next seed, of the size that suits its length.
 */
export function levelAlternating(
  compiled: Compiled,
  timed: TimedProblem,
  bound: LevelResult['bound'],
  options: LevelOptions,
): LevelResult | null {
  const { problem } = compiled;
  const model = timed.count <= MOST_STAGES ? timedModel({ ...problem, stages: compiled.stages }) : null;
  if (model === null) return null;
  const least = bound.finishSum ?? 0;
  let isStopped = false;
  const shouldStop = (): boolean => (isStopped ||= options.shouldStop());
  const quick: QuickSearch = {
    spend: (schedules, turn) => {
      const budget = new Budget(Math.max(1, schedules), shouldStop);
      const search = new TimedSearch(timed, budget, options.seed + turn, schedules, least, () => undefined);
      search.run();
      return { best: { starts: search.best, makespan: search.bestMakespan }, spent: budget.schedules };
    },
  };
  const result = alternate(model, quick, {
    maxSchedules: options.maxSchedules,
    shouldStop,
    lowerBound: least,
    onBetter: ({ starts }, finishSum, schedules) => {
      if (!options.onProgress) return;
      const objective = measure(problem, planOfStarts(compiled, starts), []);
      options.onProgress({ schedules, objective, bound: { ...bound, finishSum } });
    },
  });
  const plan = planOfStarts(compiled, result.best.starts);
  const unmet = check(problem, plan);
  const isProved = result.best.makespan <= result.lowerBound;
  return {
    plan,
    objective: measure(problem, plan, unmet),
    bound: { ...bound, finishSum: result.lowerBound },
    unmet,
    schedules: result.schedules,
    stop: isProved ? 'proven-best' : isStopped ? 'cancelled' : 'budget',
  };
}
