import { forecast, type StageUncertainty, type Uncertainty } from '@common/forecast';
import { check } from '@common/planning/check/check';
import { level } from '@common/planning/improve/level';
import type { Problem } from '@common/planning/problem/problem';
import { startStopwatch } from '../budget';
import { benchStudio, studioNames } from '../studios/studios';
import { rounded, type Suite, type SuiteFigures } from './suite';

const DRAWS = 1000;

/** How long a thousand draws of a levelled studio take on one core, after one run that warms up. */
export const forecastSuite: Suite = {
  about: `a levelled studio lived through ${String(DRAWS)} times (sets ${studioNames.join(', ')}: stages)`,
  run: (options): SuiteFigures => {
    const set = options.set ?? '200';
    const studio = benchStudio(set, options.seed);
    if (studio === null) {
      options.say(`There is no studio ${set}; there are ${studioNames.join(', ')}. Nothing was run.`);
      return { set, instances: 0 };
    }
    const { problem } = studio;
    const { plan } = level(problem, { seed: options.seed, maxSchedules: 300, shouldStop: () => false });
    const uncertainty = usualUncertainty(problem);
    forecast(problem, plan, uncertainty, { draws: 100, seed: options.seed });
    const watch = startStopwatch();
    const first = forecast(problem, plan, uncertainty, { draws: DRAWS, seed: options.seed });
    const seconds = watch.seconds();
    const again = forecast(problem, plan, uncertainty, { draws: DRAWS, seed: options.seed });
    return {
      set,
      seed: options.seed,
      instances: 1,
      valid: check(problem, plan).every((unmet) => unmet.rule === 'key-date') ? 1 : 0,
      stages: problem.stages.length,
      draws: first.draws,
      seconds: rounded(seconds),
      sameFigures: JSON.stringify(first) === JSON.stringify(again) ? 1 : 0,
    };
  },
};

/** Hours from 0.7 to 1.8 of the likeliest, dwells from 0.85 to 1.5, a maker away one day in fifty. */
function usualUncertainty(problem: Problem): Uncertainty {
  return {
    stages: problem.stages.map(({ id, effort, dwell }): StageUncertainty => {
      const spread = (minutes: number, low: number, high: number) => ({
        low: minutes * low,
        likely: minutes,
        high: minutes * high,
      });
      return {
        stageId: id,
        effortMinutes: spread(effort.minutes, 0.7, 1.8),
        dwellMinutes: dwell && spread(dwell.minutes, 0.85, 1.5),
        delayMinutes: { low: 0, likely: 0, high: 0 },
      };
    }),
    overrun: { meanLog: 0.05, sdLog: 0.1 },
    curing: { meanLog: 0, sdLog: 0.06 },
    absence: problem.makers.map(({ id }) => ({ makerId: id, perDay: 0.02 })),
  };
}
