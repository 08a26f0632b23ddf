import { parentPort } from 'node:worker_threads';
import { runForecast } from './forecast-task';
import type { JobHooks } from './job-hooks';
import { PROTOCOL, type JobMessage, type JobName, type Jobs, type WorkerMessage } from './job-message';
import { runLevel } from './level-task';
import { runPromise } from './promise-task';
import { runRescue } from './rescue-task';

type Runner<N extends JobName> = (task: Jobs[N]['task'], hooks: JobHooks<Jobs[N]['progress']>) => Jobs[N]['found'];

const RUNNERS: { readonly [N in JobName]: Runner<N> } = {
  level: runLevel,
  forecast: runForecast,
  promise: runPromise,
  rescue: runRescue,
};
const PROGRESS_EVERY_MS = 100;

function say(message: WorkerMessage): void {
  parentPort?.postMessage(message);
}

function hooksOf<N extends JobName>(cancel: SharedArrayBuffer): JobHooks<Jobs[N]['progress']> {
  const flag = new Int32Array(cancel);
  let lastSaid = -Infinity;
  return {
    isCancelled: () => Atomics.load(flag, 0) === 1,
    tell: (progress) => {
      if (performance.now() - lastSaid < PROGRESS_EVERY_MS) return;
      lastSaid = performance.now();
      say({ protocol: PROTOCOL, kind: 'progress', progress });
    },
  };
}

function run<N extends JobName>(name: N, task: Jobs[N]['task'], cancel: SharedArrayBuffer): void {
  say({ protocol: PROTOCOL, kind: 'found', found: RUNNERS[name](task, hooksOf<N>(cancel)) });
}

parentPort?.on('message', ({ name, task, cancel }: JobMessage) => {
  try {
    run(name, task, cancel);
  } catch (error) {
    say({ protocol: PROTOCOL, kind: 'failed', failure: error instanceof Error ? error.message : String(error) });
  }
});
