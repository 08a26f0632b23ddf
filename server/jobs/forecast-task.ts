import { fanOf, forecast, type Forecast, type KeyDateForecast, type Uncertainty } from '@common/forecast';
import type { Plan, Problem } from '@common/planning';
import type { Minute } from '@common/time/span';
import type { JobHooks } from './job-hooks';

/** A plan to be lived through many times over. */
export interface ForecastTask {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly uncertainty: Uncertainty;
  readonly draws: number;
  readonly seed: number;
  /** How many instants each fan is drawn from. */
  readonly fanSteps: number;
}

/** Draws made so far. */
export interface ForecastProgress {
  readonly draws: number;
}

/** The forecast, of fewer draws than asked for where it was cancelled; finishes of all draws are kept as fans. */
export interface ForecastFound extends Pick<Forecast, 'draws' | 'seed' | 'stages'> {
  readonly keyDates: readonly (KeyDateForecast & { readonly fan: readonly Minute[] })[];
  readonly productions: readonly { readonly productionId: string; readonly fan: readonly Minute[] }[];
}

/** Forecasts the plan; a cancel leaves the draws made so far. */
export function runForecast(task: ForecastTask, hooks: JobHooks<ForecastProgress>): ForecastFound {
  const { problem, plan, uncertainty, fanSteps } = task;
  let begun = 0;
  const shouldStop = () => {
    hooks.tell({ draws: begun });
    begun += 1;
    return hooks.isCancelled();
  };
  const found = forecast(problem, plan, uncertainty, { draws: task.draws, seed: task.seed, shouldStop });
  const { draws, seed, stages } = found;
  const keyDates = found.keyDates.map((keyDate, k) => {
    const finishes = [...found.finishesByKeyDate[k]].sort((a, b) => a - b);
    return { ...keyDate, fan: fanOf(finishes, fanSteps) };
  });
  const productions = found.productions.map(({ productionId, sorted }) => ({
    productionId,
    fan: fanOf(sorted, fanSteps),
  }));
  return { draws, seed, stages, keyDates, productions };
}
