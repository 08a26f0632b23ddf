import { parentPort } from 'node:worker_threads';
import {
  check,
  isBetter,
  level,
  levelWithinDates,
  measure,
  type LevelOptions,
  type LevelResult,
  type Plan,
  type Problem,
} from '@common/planning';
import { PROTOCOL, type LevelEnd, type LevelJob, type LevelMessage } from './level-message';

/** The share of the time after which the search makes way for evening out, which asks the same clock. */
const SEARCH_SHARE = 0.85;
const PROGRESS_EVERY_MS = 100;
const NO_LIMIT = 1_000_000_000;

function say(message: LevelMessage): void {
  parentPort?.postMessage(message);
}

function run(job: LevelJob): void {
  const begun = performance.now();
  const flag = new Int32Array(job.cancel);
  let endedBy: LevelEnd = 'search';
  let searchEnded = job.mode === 'within-dates';
  let lastSaid = -Infinity;
  const shouldStop = () => {
    if (Atomics.load(flag, 0) === 1) {
      endedBy = 'cancel';
      return true;
    }
    const elapsed = performance.now() - begun;
    if (!searchEnded && elapsed >= job.milliseconds * SEARCH_SHARE) {
      // True once: the engine asks anew when it begins to even out.
      searchEnded = true;
      endedBy = 'time';
      return true;
    }
    if (elapsed < job.milliseconds) return false;
    endedBy = 'time';
    return true;
  };
  const options: LevelOptions = {
    seed: job.seed,
    maxSchedules: NO_LIMIT,
    shouldStop,
    onProgress: (progress) => {
      if (performance.now() - lastSaid < PROGRESS_EVERY_MS) return;
      lastSaid = performance.now();
      say({ protocol: PROTOCOL, kind: 'progress', progress });
    },
  };
  const { problem, current, mode } = job;
  const found = mode === 'dates' ? level(problem, options) : levelWithinDates(problem, current, options);
  say({ protocol: PROTOCOL, kind: 'found', result: noWorseThan(problem, current, found), endedBy });
}

/** What was found, or the plan as it stands where a search from nothing did not come up to it. */
function noWorseThan(problem: Problem, current: Plan, found: LevelResult): LevelResult {
  const unmet = check(problem, current);
  const objective = measure(problem, current, unmet);
  if (!isBetter(objective, found.objective, problem.weights)) return found;
  return { ...found, plan: current, objective, unmet, stop: 'nothing-to-improve' };
}

parentPort?.on('message', (job: LevelJob) => {
  try {
    run(job);
  } catch (error) {
    say({ protocol: PROTOCOL, kind: 'failed', failure: error instanceof Error ? error.message : String(error) });
  }
});
