import { check } from '@common/planning/check/check';
import { lowerBound } from '@common/planning/bounds/lower-bound';
import { compile } from '@common/planning/construct/compile';
import { estimate } from '@common/planning/construct/estimate';
import { PRIORITY_RULES } from '@common/planning/construct/priority-rules';
import { layOutInOrder } from '@common/planning/improve/lay-out-in-order';
import { level } from '@common/planning/improve/level';
import { measure } from '@common/planning/objective/objective';
import type { Problem } from '@common/planning/problem/problem';
import type { LevelResult, Objective } from '@common/planning/problem/result';
import { levelOptions, startProcessorWatch, startStopwatch, type Budget } from '../budget';
import { benchStudio, studioNames } from '../studios/studios';
import { rounded, type Suite, type SuiteFigures, type SuiteOptions } from './suite';

/** One thing heard from the search: when, and how good the plan was. */
interface Heard {
  readonly seconds: number;
  readonly objective: Objective;
}

/** Levels an invented studio and tells how soon a plan without faults is there and how soon it is nearly as good as the last. */
export const studioSuite: Suite = {
  about: `a studio with shifts, dwells and bays (sets ${studioNames.join(', ')}: the demo, or invented ones of so many stages)`,
  run: (options): SuiteFigures => {
    const set = options.set ?? 'demo';
    const studio = benchStudio(set, options.seed);
    if (studio === null) {
      options.say(`There is no studio ${set}; there are ${studioNames.join(', ')}. Nothing was run.`);
      return { set, instances: 0 };
    }
    return { set, ...measureStudio(studio.problem, options) };
  },
};

function measureStudio(problem: Problem, options: SuiteOptions): SuiteFigures {
  const budget: Budget = options.budget ?? { kind: 'seconds', seconds: 10 };
  const heard: Heard[] = [];
  const processor = startProcessorWatch();
  const watch = startStopwatch();
  const result = level(problem, {
    ...levelOptions(budget, options.seed, watch),
    onProgress: ({ objective }) => {
      heard.push({ seconds: watch.seconds(), objective });
      options.say(`${watch.seconds().toFixed(2)} s: ${describe(objective)}`);
    },
  });
  const seconds = watch.seconds();
  const cpuSeconds = processor.seconds();
  heard.push({ seconds, objective: result.objective });
  const boundWatch = startStopwatch();
  const bound = lowerBound(problem);
  options.say(`Done: ${describe(result.objective)}; bound ${JSON.stringify(bound)}`);
  const firstValid = heard.find(({ objective }) => objective.unplaced === 0);
  const nearly = heard.find(({ objective }) => isWithin(objective, result.objective, 0.01));
  return {
    seed: options.seed,
    instances: 1,
    valid: check(problem, result.plan).every((unmet) => unmet.rule === 'key-date') ? 1 : 0,
    stages: problem.stages.length,
    makers: problem.makers.length,
    seconds: rounded(seconds),
    cpuSeconds: rounded(cpuSeconds),
    firstValidSeconds: rounded(firstValid?.seconds ?? null),
    within1PercentSeconds: rounded(nearly?.seconds ?? null),
    boundSeconds: rounded(boundWatch.seconds()),
    ...partFigures(result, bound),
    schedulesPerSecond: rounded(result.schedules / seconds, 1),
    stop: result.stop,
    ...ruleFigures(problem, latenessOf(result.objective)),
  };
}

/** Weighted minutes late of each priority rule's plan and of the levelled one, and by how many percent that beats the best of them. */
function ruleFigures(problem: Problem, levelled: number): SuiteFigures {
  const compiled = compile(problem);
  const estimated = estimate(compiled);
  const figures: Record<string, number | null> = {};
  let best = Infinity;
  for (const [name, rule] of Object.entries(PRIORITY_RULES)) {
    const keys = rule(compiled, estimated);
    const order = compiled.stages.map((_, stage) => stage).sort((a, b) => keys[a] - keys[b] || a - b);
    const plan = layOutInOrder(
      problem,
      order.map((stage) => compiled.stages[stage].id),
    );
    const late = latenessOf(measure(problem, plan, []));
    figures[`${name}Late`] = late;
    best = Math.min(best, late);
  }
  const percentBetterThanRules = best > 0 ? rounded(100 * (1 - levelled / best), 1) : null;
  return { ...figures, levelLate: levelled, percentBetterThanRules };
}

function latenessOf({ hardLateness, wishedLateness }: Objective): number {
  return hardLateness + wishedLateness;
}

function partFigures(result: LevelResult, bound: LevelResult['bound']): SuiteFigures {
  const figures: Record<string, number | null> = {};
  for (const part of ['unplaced', 'hardLateness', 'wishedLateness', 'costMinor', 'unevenness', 'finishSum'] as const) {
    figures[part] = result.objective[part];
    if (bound[part] !== null && bound[part] > 0) figures[`${part}Bound`] = bound[part];
  }
  return figures;
}

/** Whether the first part in which two objectives differ is within a share of the better one's. */
export function isWithin(objective: Objective, best: Objective, share: number): boolean {
  for (const part of ['unplaced', 'hardLateness', 'wishedLateness', 'costMinor', 'unevenness', 'finishSum'] as const)
    if (objective[part] !== best[part]) return objective[part] <= best[part] * (1 + share);
  return true;
}

function describe(objective: Objective): string {
  const { unplaced, hardLateness, wishedLateness, costMinor, unevenness, finishSum } = objective;
  return `unplaced ${unplaced}, late ${hardLateness} hard, ${wishedLateness} wished, cost ${costMinor}, unevenness ${unevenness}, finishes ${finishSum}`;
}
