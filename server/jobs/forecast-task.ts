import { forecast, type Forecast, type Uncertainty } from '@common/forecast';
import type { Plan, Problem } from '@common/planning';
import type { JobHooks } from './job-message';

/** A plan to be lived through many times over. */
export interface ForecastTask {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly uncertainty: Uncertainty;
  readonly draws: number;
  readonly seed: number;
}

/** Draws made so far. */
export interface ForecastProgress {
  readonly draws: number;
}

/** The forecast; of fewer draws than asked for where it was cancelled. */
export type ForecastFound = Omit<Forecast, 'finishesByKeyDate'>;

/** Forecasts the plan; a cancel leaves the draws made so far. */
export function runForecast(task: ForecastTask, hooks: JobHooks<'forecast'>): ForecastFound {
  let made = 0;
  const shouldStop = () => {
    made += 1;
    hooks.tell({ draws: made });
    return hooks.isCancelled();
  };
  const { draws, seed } = task;
  const { finishesByKeyDate: _each, ...found } = forecast(task.problem, task.plan, task.uncertainty, {
    draws,
    seed,
    shouldStop,
  });
  return found;
}
