import { existsSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { PROTOCOL, type JobMessage, type JobName, type Jobs, type WorkerMessage } from './job-message';

/** How a job came out; a crash is an outcome too. `stopped`: cancelled before any worker had begun on it. */
export type JobOutcome<N extends JobName> =
  | { readonly kind: 'found'; readonly found: Jobs[N]['found'] }
  | { readonly kind: 'failed'; readonly failure: string }
  | { readonly kind: 'stopped' };

/** What is said of a job that came to nothing. */
export function failureOf(outcome: Exclude<JobOutcome<JobName>, { kind: 'found' }>): string {
  return outcome.kind === 'stopped' ? 'It was stopped before it began.' : outcome.failure;
}

/** A job under way. */
export interface RunningJob<N extends JobName> {
  readonly outcome: Promise<JobOutcome<N>>;
  /** Tells it to stop; what it found so far is its outcome. */
  cancel(): void;
}

/** What somebody who asked for a job may want to hear meanwhile. */
export interface JobListener<N extends JobName> {
  readonly onStart?: () => void;
  readonly onProgress?: (progress: Jobs[N]['progress']) => void;
}

/** Where a job waits for a worker, or has one. */
interface Seat {
  readonly message: JobMessage;
  readonly hear: (message: WorkerMessage) => void;
  readonly onStart: () => void;
  readonly settle: (outcome: JobOutcome<JobName>) => void;
}

/** At least two: a forecast need not wait for a levelling. */
const LEAST_WORKERS = 2;

/** Worker threads for the engine, as many at once as there are processors to spare; kept for the next job once made. */
export class JobPool {
  readonly #waiting: Seat[] = [];
  readonly #idle: Worker[] = [];
  readonly #busy = new Map<Worker, Seat>();
  #stopped = false;

  constructor(
    private readonly size: number = Math.max(LEAST_WORKERS, availableParallelism() - 1),
    private readonly makeWorker: () => Worker = makeJobWorker,
  ) {}

  /** Starts a job when a worker is free. */
  run<N extends JobName>(name: N, task: Jobs[N]['task'], listener: JobListener<N> = {}): RunningJob<N> {
    const cancel = new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT);
    const message = { protocol: PROTOCOL, name, task, cancel } as JobMessage;
    let seat: Seat | undefined;
    const outcome = new Promise<JobOutcome<N>>((settle) => {
      seat = {
        message,
        onStart: () => listener.onStart?.(),
        // A worker answers the job that it was given, so that what it says is of the job's own kind.
        hear: (said) => {
          if (said.kind === 'progress') listener.onProgress?.(said.progress);
        },
        settle: (found) => settle(found),
      };
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
        seat?.settle({ kind: 'stopped' });
      },
    };
  }

  /** Ends every worker; what was under way comes out as failed. */
  async stop(): Promise<void> {
    this.#stopped = true;
    const failure = 'The server stopped while it was at work on this. Start it again.';
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
    worker.postMessage(seat.message);
  }

  #hire(): Worker {
    const worker = this.makeWorker();
    // An idle worker keeps no process alive.
    worker.unref();
    worker.on('message', (message: WorkerMessage) => this.#hear(worker, message));
    worker.on('error', (error) => this.#lose(worker, error instanceof Error ? error.message : String(error)));
    worker.on('exit', (code) => this.#lose(worker, `The worker ended with code ${String(code)}.`));
    return worker;
  }

  #hear(worker: Worker, message: WorkerMessage): void {
    const seat = this.#busy.get(worker);
    if (!seat || message.protocol !== PROTOCOL) return;
    if (message.kind === 'progress') {
      seat.hear(message);
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
function makeJobWorker(): Worker {
  const built = join(__dirname, 'job-worker.js');
  return existsSync(built)
    ? new Worker(built)
    : new Worker(join(__dirname, 'job-worker.ts'), { execArgv: ['--require', 'tsx/cjs'] });
}
