import { existsSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { LevelProgress, Plan, Problem } from '@common/planning';
import type { LevelResult } from '@common/planning';
import { PROTOCOL, type LevelEnd, type LevelJob, type LevelMessage } from './level-message';

/** What is to be levelled. */
export interface LevelTask {
  readonly problem: Problem;
  readonly mode: 'dates' | 'within-dates';
  /** The plan as it stands: what is found is never worse than it. */
  readonly current: Plan;
  readonly seed: number;
  readonly milliseconds: number;
}

/** How a levelling came out; a crash is an outcome too. */
export type LevelOutcome =
  | { readonly kind: 'found'; readonly result: LevelResult; readonly endedBy: LevelEnd }
  | { readonly kind: 'failed'; readonly failure: string };

/** A levelling under way. */
export interface RunningLevel {
  readonly outcome: Promise<LevelOutcome>;
  /** Tells it to stop within 50 ms; what it found so far is its outcome. */
  cancel(): void;
}

/** Where a task waits for a worker, or has one. */
interface Seat {
  readonly job: LevelJob;
  readonly onStart: () => void;
  readonly onProgress: (progress: LevelProgress) => void;
  readonly settle: (outcome: LevelOutcome) => void;
}

const CANCELLED_WHILE_WAITING: LevelOutcome = { kind: 'failed', failure: 'It was stopped before it began.' };

/** Worker threads that level, as many at once as there are processors to spare; kept for the next task once made. */
export class LevelPool {
  readonly #waiting: Seat[] = [];
  readonly #idle: Worker[] = [];
  readonly #busy = new Map<Worker, Seat>();
  #stopped = false;

  constructor(
    private readonly size: number = Math.max(1, availableParallelism() - 1),
    private readonly makeWorker: () => Worker = makeLevelWorker,
  ) {}

  /** Starts a task when a worker is free. */
  level(task: LevelTask, onStart: () => void, onProgress: (progress: LevelProgress) => void): RunningLevel {
    const cancel = new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT);
    const job: LevelJob = { ...task, protocol: PROTOCOL, cancel };
    let seat: Seat | undefined;
    const outcome = new Promise<LevelOutcome>((settle) => {
      seat = { job, onStart, onProgress, settle };
      this.#waiting.push(seat);
    });
    this.#next();
    return {
      outcome,
      cancel: () => {
        Atomics.store(new Int32Array(cancel), 0, 1);
        const place = seat ? this.#waiting.indexOf(seat) : -1;
        if (place === -1) return;
        this.#waiting.splice(place, 1);
        seat?.settle(CANCELLED_WHILE_WAITING);
      },
    };
  }

  /** Ends every worker; what was under way comes out as failed. */
  async stop(): Promise<void> {
    this.#stopped = true;
    const failure = 'The server stopped while it was levelling. Start it again.';
    for (const seat of this.#waiting.splice(0)) seat.settle({ kind: 'failed', failure });
    for (const seat of this.#busy.values()) seat.settle({ kind: 'failed', failure });
    await Promise.all([...this.#idle, ...this.#busy.keys()].map((worker) => worker.terminate()));
  }

  #next(): void {
    if (this.#stopped || this.#busy.size >= this.size) return;
    const seat = this.#waiting.shift();
    if (!seat) return;
    const worker = this.#idle.pop() ?? this.#hire();
    this.#busy.set(worker, seat);
    seat.onStart();
    worker.postMessage(seat.job);
  }

  #hire(): Worker {
    const worker = this.makeWorker();
    // An idle worker keeps no process alive.
    worker.unref();
    worker.on('message', (message: LevelMessage) => this.#hear(worker, message));
    worker.on('error', (error) => this.#lose(worker, error instanceof Error ? error.message : String(error)));
    worker.on('exit', (code) => this.#lose(worker, `The worker ended with code ${String(code)}.`));
    return worker;
  }

  #hear(worker: Worker, message: LevelMessage): void {
    const seat = this.#busy.get(worker);
    if (!seat || message.protocol !== PROTOCOL) return;
    if (message.kind === 'progress') {
      seat.onProgress(message.progress);
      return;
    }
    this.#busy.delete(worker);
    this.#idle.push(worker);
    seat.settle(message);
    this.#next();
  }

  #lose(worker: Worker, failure: string): void {
    const seat = this.#busy.get(worker);
    this.#busy.delete(worker);
    const place = this.#idle.indexOf(worker);
    if (place !== -1) this.#idle.splice(place, 1);
    seat?.settle({ kind: 'failed', failure });
    this.#next();
  }
}

/** The worker's file as it is built, or as it is written where nothing was built. */
function makeLevelWorker(): Worker {
  const built = join(__dirname, 'level-worker.js');
  return existsSync(built)
    ? new Worker(built)
    : new Worker(join(__dirname, 'level-worker.ts'), { execArgv: ['--require', 'tsx/cjs'] });
}
