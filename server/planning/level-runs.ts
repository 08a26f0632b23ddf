import { randomUUID } from 'node:crypto';
import { setTimeout as pause } from 'node:timers/promises';
import type { z } from 'zod';
import type { LevelRequest, LevelRun as LevelRunView } from '@common/contract';
import { takeInProgress } from '@common/planning';
import { LevelRun } from '@database/entities';
import { notFound, Problem } from '../http/problem';
import type { Log } from '../http/log';
import { failureOf, type JobOutcome, type JobPool, type RunningJob } from '../jobs/job-pool';
import type { LevelTask } from '../jobs/level-task';
import type { LiveHub } from '../live';
import type { Actor } from '../session';
import { CANCEL_CHANNEL } from '../storage/live-channel';
import { ProcessMark } from '../storage/process-mark';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { nameOfContent, problemOf } from './desk';
import { isUnderWay, levelRunView, LevelRepository } from './level-repository';
import { requireDesk } from './revisions';

type Request = z.output<typeof LevelRequest>;

/** A levelling looks ahead from the present quarter of an hour. */
const GRAIN_MINUTES = 15;
/** How often progress is written down and told. */
const TELL_EVERY_MS = 250;
/** How long a cancel waits for a levelling of another process to end. */
const CANCEL_WAIT_MS = 2_000;
const CANCEL_LOOK_MS = 25;
const LEFT_BEHIND = 'The server that was levelling ended before it was done. Start it again.';

/** A levelling that this process works on. */
interface Working {
  readonly running: RunningJob<'level'>;
  /** Settles once its outcome is written down. */
  readonly written: Promise<void>;
}

/** Levellings in the background: each a row that outlives the process, and a worker of the process that began it. */
export class LevelRuns {
  readonly #working = new Map<string, Working>();

  constructor(
    private readonly transactions: Transactions,
    private readonly pool: JobPool,
    private readonly live: LiveHub,
    private readonly log: Log,
  ) {
    live.onCancel((id) => this.#working.get(id)?.running.cancel());
  }

  /** Starts levelling from the working plan as it stands at the revision; one at a time in the studio. */
  async start(actor: Actor, request: Request): Promise<LevelRunView> {
    const { run, task } = await this.transactions.write(actor, async (unit) => {
      const desk = await requireDesk(unit, request.revision);
      await this.#refuseSecond(unit);
      const plannedFrom = desk.now - (desk.now % GRAIN_MINUTES);
      const problem = problemOf(desk, { from: plannedFrom });
      const made = unit.manager.create(LevelRun, {
        id: randomUUID(),
        state: 'waiting',
        mode: request.mode,
        revision: request.revision,
        baseId: desk.head?.id ?? '',
        seconds: request.seconds,
        seed: request.seed,
        plannedFrom,
        fingerprint: nameOfContent(problem),
        startedBy: actor.accountId,
        startedAt: unit.at,
        endedAt: null,
        schedules: 0,
        objective: null,
        bound: null,
        stop: null,
        failure: null,
        found: null,
        workedBy: this.live.mark.number,
      });
      await new LevelRepository(unit.manager).save(made);
      const sentence = request.mode === 'dates' ? 'Began to level the plan.' : 'Began to even out the load.';
      const after = levelRunView(made);
      await unit.record({ action: 'started', subject: { kind: 'level-run', id: made.id }, sentence, after });
      const { mode, seed } = request;
      const current = takeInProgress(problem, desk.head?.layout.plan ?? { placements: [] });
      const levelTask: LevelTask = { problem, mode, current, seed, milliseconds: request.seconds * 1000 };
      return { run: made, task: levelTask };
    });
    this.#work(run, task);
    return levelRunView(run);
  }

  async read(id: string): Promise<LevelRunView> {
    const { run, isLeftBehind } = await this.transactions.read(async (manager) => {
      const found = await requireRun(new LevelRepository(manager), id);
      return { run: found, isLeftBehind: isUnderWay(found) && !(await isWorkedOn(manager, found)) };
    });
    if (!isLeftBehind) return levelRunView(run);
    await this.failLeftBehind();
    return this.transactions.read(async (manager) => levelRunView(await requireRun(new LevelRepository(manager), id)));
  }

  /** Stops a levelling wherever it runs, and says how it stands once it has ended. One that has ended stays as it is. */
  async cancel(id: string): Promise<LevelRunView> {
    const working = this.#working.get(id);
    if (working) {
      working.running.cancel();
      await working.written;
      return this.read(id);
    }
    let run = await this.read(id);
    if (run.state !== 'waiting' && run.state !== 'running') return run;
    await this.transactions.write(null, (unit) => unit.manager.query('select pg_notify($1, $2)', [CANCEL_CHANNEL, id]));
    for (let waited = 0; waited < CANCEL_WAIT_MS; waited += CANCEL_LOOK_MS) {
      run = await this.read(id);
      if (run.state !== 'waiting' && run.state !== 'running') break;
      await pause(CANCEL_LOOK_MS);
    }
    return run;
  }

  /** Leaves what was found; it can not be taken afterwards. */
  leave(actor: Actor, id: string): Promise<LevelRunView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new LevelRepository(unit.manager);
      const run = await requireRun(repository, id);
      if (isUnderWay(run)) throw new Problem('level-running', 'It is still levelling. Stop it first.');
      if (run.state === 'taken') throw new Problem('already-exists', 'It was taken already; undo takes it back.');
      run.state = 'left';
      await repository.save(run);
      const view = levelRunView(run);
      await unit.announce({ kind: 'level', run: view });
      const sentence = 'Left what a levelling had found.';
      await unit.record({ action: 'left', subject: { kind: 'level-run', id }, sentence, after: view });
      return view;
    });
  }

  /** Marks levellings as failed whose process is gone: at the start, and whenever one is met. */
  async failLeftBehind(): Promise<void> {
    await this.transactions.write(null, async (unit) => {
      for (const run of await new LevelRepository(unit.manager).underWay()) {
        if (!(await isWorkedOn(unit.manager, run))) await fail(unit, run, LEFT_BEHIND);
      }
    });
  }

  /** Stops what is under way and waits until that is written down. */
  async stop(): Promise<void> {
    await this.pool.stop();
    await Promise.all([...this.#working.values()].map((working) => working.written));
  }

  async #refuseSecond(unit: Unit): Promise<void> {
    for (const run of await new LevelRepository(unit.manager).underWay()) {
      if (await isWorkedOn(unit.manager, run)) {
        throw new Problem('level-running', 'A levelling is under way. Wait for it, or stop it first.');
      }
      await fail(unit, run, LEFT_BEHIND);
    }
  }

  #work(run: LevelRun, task: LevelTask): void {
    // One write at a time: progress that comes meanwhile is told with the next.
    let writing: Promise<void> = Promise.resolve();
    let lastTold = 0;
    const write = (change: Partial<LevelRun>) => {
      Object.assign(run, change);
      writing = writing.then(() => this.#writeDown(run));
    };
    const running = this.pool.run('level', task, {
      onStart: () => write({ state: 'running' }),
      onProgress: ({ schedules, objective, bound }) => {
        if (Date.now() - lastTold < TELL_EVERY_MS) return;
        lastTold = Date.now();
        write({ schedules, objective: { ...objective }, bound });
      },
    });
    const written = running.outcome.then(async (outcome) => {
      write({ ...changeOf(outcome), endedAt: this.transactions.clock() });
      await writing;
      this.#working.delete(run.id);
    });
    this.#working.set(run.id, { running, written });
  }

  async #writeDown(run: LevelRun): Promise<void> {
    const copy = { ...run };
    try {
      await this.transactions.write(null, async (unit) => {
        await new LevelRepository(unit.manager).save(copy);
        await unit.announce({ kind: 'level', run: levelRunView(copy) });
      });
    } catch (error) {
      this.log.error({ err: error, runId: run.id }, 'the state of a levelling could not be written down');
    }
  }
}

/** A levelling, or the problem that there is none. */
export async function requireRun(repository: LevelRepository, id: string): Promise<LevelRun> {
  const run = await repository.byId(id);
  if (!run) throw notFound('levelling');
  return run;
}

function isWorkedOn(manager: Unit['manager'], run: LevelRun): Promise<boolean> {
  return run.workedBy === null ? Promise.resolve(false) : ProcessMark.isAlive(manager, run.workedBy);
}

async function fail(unit: Unit, run: LevelRun, failure: string): Promise<void> {
  Object.assign(run, { state: 'failed', failure, endedAt: unit.at });
  await new LevelRepository(unit.manager).save(run);
  await unit.announce({ kind: 'level', run: levelRunView(run) });
}

function changeOf(outcome: JobOutcome<'level'>): Partial<LevelRun> {
  if (outcome.kind !== 'found') return { state: 'failed', failure: failureOf(outcome) };
  const { result, endedBy } = outcome.found;
  const { plan, objective, bound, schedules, stop } = result;
  return {
    state: endedBy === 'cancel' ? 'cancelled' : 'found',
    found: plan,
    objective: { ...objective },
    bound,
    schedules,
    // What told the engine to stop is known only here.
    stop: endedBy === 'search' ? stop : endedBy,
  };
}
