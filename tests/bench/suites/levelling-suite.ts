import { check } from '@common/planning/check/check';
import { level } from '@common/planning/improve/level';
import { levelWithinDates } from '@common/planning/improve/level-within-dates';
import { levelOptions, startStopwatch, type Budget } from '../budget';
import { benchStudio, studioNames } from '../studios/studios';
import { rounded, type Suite, type SuiteFigures } from './suite';

/** How much evener the load of a plan becomes without moving any date, maker or bay. */
export const levellingSuite: Suite = {
  about: `load evened within the dates of a plan (sets ${studioNames.join(', ')}: the demo, or invented ones of so many stages)`,
  run: (options): SuiteFigures => {
    const set = options.set ?? 'demo';
    const studio = benchStudio(set, options.seed);
    if (studio === null) {
      options.say(`There is no studio ${set}; there are ${studioNames.join(', ')}. Nothing was run.`);
      return { set, instances: 0 };
    }
    // Weighed without evenness, so that the plan to begin with has not been evened yet.
    const problem = { ...studio.problem, weights: { ...studio.problem.weights, unevenness: 0 } };
    const before = level(problem, { seed: options.seed, maxSchedules: 200, shouldStop: () => false });
    const budget: Budget = options.budget ?? { kind: 'seconds', seconds: 5 };
    const watch = startStopwatch();
    const after = levelWithinDates(studio.problem, before.plan, levelOptions(budget, options.seed, watch));
    return {
      set,
      seed: options.seed,
      instances: 1,
      valid: check(studio.problem, after.plan).length <= before.unmet.length ? 1 : 0,
      seconds: rounded(watch.seconds()),
      unevennessBefore: before.objective.unevenness,
      unevennessAfter: after.objective.unevenness,
      percentEvener: rounded(100 * (1 - after.objective.unevenness / Math.max(1, before.objective.unevenness)), 1),
      wishedLatenessBefore: before.objective.wishedLateness,
      wishedLatenessAfter: after.objective.wishedLateness,
      hardLatenessBefore: before.objective.hardLateness,
      hardLatenessAfter: after.objective.hardLateness,
    };
  },
};
