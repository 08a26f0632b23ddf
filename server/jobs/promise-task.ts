import type { Uncertainty } from '@common/forecast';
import { promise, type Promised, type PromiseStep } from '@common/promise';
import type { Plan, Problem } from '@common/planning';
import type { Minute } from '@common/time/span';
import type { JobHooks, SearchProgress } from './job-hooks';

/** A tentative production to be laid into a plan, to see when it could be delivered. */
export interface PromiseTask {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly uncertainty: Uncertainty;
  readonly productionId: string;
  readonly earliestStart: Minute | null;
  readonly draws: number;
  readonly seed: number;
  readonly maxSchedules: number;
}

/** The answer, or null where it was stopped. */
export interface PromiseFound {
  readonly promised: Promised | null;
}

const WHOLE = 1000;

/** From where to where each step takes the progress, per mille. Levelling and simulating take the most by far. */
const STEPS: Readonly<Record<PromiseStep, { readonly from: number; readonly until: number }>> = {
  behind: { from: 0, until: 50 },
  among: { from: 50, until: 500 },
  simulating: { from: 500, until: 1000 },
};

/** Lays the production into the plan both ways and forecasts them; a cancel leaves nothing. */
export function runPromise(
  { problem, plan, uncertainty, ...asked }: PromiseTask,
  hooks: JobHooks<SearchProgress>,
): PromiseFound {
  const promised = promise(problem, plan, uncertainty, {
    ...asked,
    shouldStop: hooks.isCancelled,
    onProgress: (step, share) => {
      const { from, until } = STEPS[step];
      hooks.tell({ weighed: Math.round(from + (until - from) * share), of: WHOLE });
    },
  });
  return { promised };
}
