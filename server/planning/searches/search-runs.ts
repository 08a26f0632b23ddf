import { randomUUID } from 'node:crypto';
import { setTimeout as pause } from 'node:timers/promises';
import type { SearchView } from '@common/contract';
import { PlanSearch } from '@database/entities';
import { notFound } from '../../http/problem';
import type { Log } from '../../http/log';
import type { Jobs } from '../../jobs/job-message';
import { failureOf, type JobPool, type RunningJob } from '../../jobs/job-pool';
import type { LiveHub } from '../../live';
import type { Actor } from '../../session';
import { CANCEL_CHANNEL } from '../../storage/live-channel';
import type { Transactions } from '../../storage/transactions';
import type { Unit } from '../../storage/unit';
import { nameOfContent, readDesk, type Desk } from '../desk';
import { isSearching, SearchRepository } from './search-repository';

/** Jobs that are searches about the working plan. */
export type SearchName = 'rescue' | 'promise';

/** What a search is started with. */
export interface SearchStart<N extends SearchName> {
  readonly name: N;
  readonly task: Jobs[N]['task'];
  readonly subject: { readonly keyDateId: string } | { readonly productionId: string };
  /** For the audit trail. */
  readonly sentence: string;
}

/** How often progress is written down. */
const TELL_EVERY_MS = 300;
/** How long a cancel waits for a search of another process to end. */
const CANCEL_WAIT_MS = 3_000;
const CANCEL_LOOK_MS = 50;
const LEFT_BEHIND = 'The server that was searching ended before it was done. Start it again.';

/** A search as it stands; the desk as it is now, once it has ended. */
export interface SearchRead {
  readonly search: PlanSearch;
  readonly desk: Desk | null;
}

interface Working {
  readonly running: RunningJob<SearchName>;
  /** Settles once its outcome is written down. */
  readonly written: Promise<void>;
}

/** Searches in the background: each a row that outlives the process, and a worker of the process that began it. */
export class SearchRuns {
  readonly #working = new Map<string, Working>();

  constructor(
    private readonly transactions: Transactions,
    private readonly pool: JobPool,
    private readonly live: LiveHub,
    private readonly log: Log,
  ) {
    live.onCancel((id) => this.#working.get(id)?.running.cancel());
  }

  /** Starts a search about the working plan as it stands; `ask` makes the question from the desk. Answers its id. */
  async start<N extends SearchName>(
    actor: Actor,
    ask: (desk: Desk, unit: Unit) => Promise<SearchStart<N>> | SearchStart<N>,
  ): Promise<string> {
    const { search, start } = await this.transactions.write(actor, async (unit) => {
      const desk = await readDesk(unit.manager, unit.at);
      if (desk.head === null) throw notFound('working plan');
      const asked = await ask(desk, unit);
      const made = unit.manager.create(PlanSearch, {
        id: randomUUID(),
        state: 'waiting',
        keyDateId: null,
        productionId: null,
        ...asked.subject,
        baseId: desk.head.id,
        fingerprint: nameOfContent(desk.problem),
        plannedFrom: desk.from,
        startedBy: actor.accountId,
        startedAt: unit.at,
        endedAt: null,
        weighed: 0,
        ofCount: 0,
        failure: null,
        found: null,
        workedBy: this.live.mark.number,
      });
      await new SearchRepository(unit.manager).save(made);
      const { sentence } = asked;
      await unit.record({ action: 'started', subject: { kind: 'plan-search', id: made.id }, sentence });
      return { search: made, start: asked };
    });
    this.#work(search, start);
    return search.id;
  }

  /** A search with the desk as it is now; one whose process is gone has failed. While it is under way nobody needs the desk. */
  async read(id: string): Promise<SearchRead> {
    const { isLeftBehind, ...read } = await this.transactions.read(async (manager) => {
      const repository = new SearchRepository(manager);
      const search = await requireSearch(repository, id);
      const desk = isSearching(search) ? null : await readDesk(manager, this.transactions.clock());
      return { search, desk, isLeftBehind: isSearching(search) && !(await repository.isWorkedOn(search)) };
    });
    if (!isLeftBehind) return read;
    const search = Object.assign(read.search, { state: 'failed', failure: LEFT_BEHIND, endedAt: new Date() });
    await this.transactions.write(null, (unit) => new SearchRepository(unit.manager).save(search));
    return { ...read, search };
  }

  /** Stops a search wherever it runs, and waits until it has ended. One that has ended stays as it is. */
  async cancel(id: string): Promise<void> {
    const working = this.#working.get(id);
    if (working) {
      working.running.cancel();
      await working.written;
      return;
    }
    if (!isSearching((await this.read(id)).search)) return;
    await this.transactions.write(null, (unit) => unit.manager.query('select pg_notify($1, $2)', [CANCEL_CHANNEL, id]));
    for (let waited = 0; waited < CANCEL_WAIT_MS; waited += CANCEL_LOOK_MS) {
      if (!isSearching((await this.read(id)).search)) return;
      await pause(CANCEL_LOOK_MS);
    }
  }

  /** Waits until what the stopped pool leaves behind is written down. */
  async settled(): Promise<void> {
    await Promise.all([...this.#working.values()].map(({ written }) => written));
  }

  #work<N extends SearchName>(search: PlanSearch, { name, task }: SearchStart<N>): void {
    // One write at a time: progress that comes meanwhile is written with the next.
    let writing: Promise<void> = Promise.resolve();
    let lastTold = 0;
    let isCancelled = false;
    const write = (change: Partial<PlanSearch>) => {
      Object.assign(search, change);
      writing = writing.then(() => this.#writeDown(search));
    };
    const running = this.pool.run(name, task, {
      onStart: () => write({ state: 'running' }),
      onProgress: (progress) => {
        if (Date.now() - lastTold < TELL_EVERY_MS) return;
        lastTold = Date.now();
        write({ weighed: progress.weighed, ofCount: progress.of });
      },
    });
    const written = running.outcome.then(async (outcome) => {
      const change =
        outcome.kind === 'found'
          ? { state: isCancelled ? ('cancelled' as const) : ('found' as const), found: outcome.found }
          : { state: 'failed' as const, failure: failureOf(outcome) };
      write({ ...change, endedAt: this.transactions.clock() });
      await writing;
      this.#working.delete(search.id);
    });
    const cancel = (): void => {
      isCancelled = true;
      running.cancel();
    };
    this.#working.set(search.id, { running: { outcome: running.outcome, cancel }, written });
  }

  async #writeDown(search: PlanSearch): Promise<void> {
    const copy = { ...search };
    try {
      await this.transactions.write(null, (unit) => new SearchRepository(unit.manager).save(copy));
    } catch (error) {
      this.log.error({ err: error, searchId: search.id }, 'the state of a search could not be written down');
    }
  }
}

/** A search, or the problem that there is none. */
export async function requireSearch(repository: SearchRepository, id: string): Promise<PlanSearch> {
  const search = await repository.byId(id);
  if (!search) throw notFound('search');
  return search;
}

/** Whether the studio and its plan are still those that were searched. */
export function isFresh(search: PlanSearch, desk: Desk): boolean {
  return desk.head?.id === search.baseId && nameOfContent(desk.problem) === search.fingerprint;
}

/** How a search stands, for whoever waits for it. */
export function searchView({ search, desk }: SearchRead): SearchView {
  return {
    id: search.id,
    state: search.state,
    weighed: search.weighed,
    of: search.ofCount,
    startedAt: search.startedAt.toISOString(),
    failure: search.failure,
    stale: desk !== null && !isFresh(search, desk),
  };
}
