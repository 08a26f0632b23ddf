import { parentPort } from 'node:worker_threads';
import { level, levelWithinDates, type LevelOptions } from '@common/planning';
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
  let searchEnded = job.within !== null;
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
  const result = job.within ? levelWithinDates(job.problem, job.within, options) : level(job.problem, options);
  say({ protocol: PROTOCOL, kind: 'found', result, endedBy });
}

parentPort?.on('message', (job: LevelJob) => {
  try {
    run(job);
  } catch (error) {
    say({ protocol: PROTOCOL, kind: 'failed', failure: error instanceof Error ? error.message : String(error) });
  }
});
