import {
  check,
  isBetter,
  level,
  levelWithinDates,
  measure,
  type LevelOptions,
  type LevelProgress,
  type LevelResult,
  type Plan,
  type Problem,
} from '@common/planning';
import type { JobHooks } from './job-hooks';

/** What is to be levelled. */
export interface LevelTask {
  readonly problem: Problem;
  /** `dates` levels from the start; `within-dates` evens `current` out. */
  readonly mode: 'dates' | 'within-dates';
  /** The plan as it stands: what is found is never worse than it. */
  readonly current: Plan;
  readonly seed: number;
  readonly milliseconds: number;
}

/** What a levelling found, and why it ended: by itself, by the time it was given, or because it was told to. */
export interface LevelFound {
  readonly result: LevelResult;
  readonly endedBy: LevelEnd;
}
export type LevelEnd = 'search' | 'time' | 'cancel';

/** The share of the time after which the search makes way for evening out, which asks the same clock. */
const SEARCH_SHARE = 0.85;
const NO_LIMIT = 1_000_000_000;

/** Levels within the time that the task allows. */
export function runLevel(task: LevelTask, hooks: JobHooks<LevelProgress>): LevelFound {
  const begun = performance.now();
  let endedBy: LevelEnd = 'search';
  let searchEnded = task.mode === 'within-dates';
  const shouldStop = () => {
    if (hooks.isCancelled()) {
      endedBy = 'cancel';
      return true;
    }
    const elapsed = performance.now() - begun;
    if (!searchEnded && elapsed >= task.milliseconds * SEARCH_SHARE) {
      // True once: the engine asks anew when it begins to even out.
      searchEnded = true;
      endedBy = 'time';
      return true;
    }
    if (elapsed < task.milliseconds) return false;
    endedBy = 'time';
    return true;
  };
  const options: LevelOptions = { seed: task.seed, maxSchedules: NO_LIMIT, shouldStop, onProgress: hooks.tell };
  const { problem, current, mode } = task;
  const found = mode === 'dates' ? level(problem, options) : levelWithinDates(problem, current, options);
  return { result: noWorseThan(problem, current, found), endedBy };
}

/** What was found, or the plan as it stands where a search from nothing did not come up to it. */
function noWorseThan(problem: Problem, current: Plan, found: LevelResult): LevelResult {
  const unmet = check(problem, current);
  const objective = measure(problem, current, unmet);
  if (!isBetter(objective, found.objective, problem.weights)) return found;
  return { ...found, plan: current, objective, unmet, stop: 'nothing-to-improve' };
}
