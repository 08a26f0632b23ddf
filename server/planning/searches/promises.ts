import type { PromisedView, PromiseSearchView } from '@common/contract';
import { learnOverrun, NO_FACTOR } from '@common/forecast';
import type { Promised, ShortWeek } from '@common/promise';
import { invalidField, notFound } from '../../http/problem';
import type { PromiseFound } from '../../jobs/promise-task';
import type { Actor } from '../../session';
import type { Transactions } from '../../storage/transactions';
import { readDesk, type Desk } from '../desk';
import { FORECAST_SEED } from '../forecast/forecasts';
import { readPastWork } from '../forecast/past-hours';
import { SearchRepository } from './search-repository';
import { searchView, type SearchRead, type SearchRuns } from './search-runs';

/** When productions that the studio is asked for could be ready. */
export class Promises {
  constructor(
    private readonly transactions: Transactions,
    private readonly runs: SearchRuns,
  ) {}

  async start(actor: Actor, productionId: string): Promise<PromiseSearchView> {
    const id = await this.runs.start(actor, async (desk, unit) => {
      const production = desk.rows.productions.find((one) => one.id === productionId);
      if (!production) throw invalidField('/productionId', 'There is no such production that is still to be made.');
      if (!desk.problem.stages.some((stage) => stage.productionId === productionId)) {
        throw invalidField('/productionId', 'It has no stages yet. Add its pieces from recipes, then ask again.');
      }
      const { forecast } = desk.rows.studio;
      const learnt =
        forecast.learning === 'past-hours' ? learnOverrun(await readPastWork(unit.manager, unit.at)) : NO_FACTOR;
      return {
        name: 'promise',
        task: {
          snapshot: desk.snapshot,
          plan: desk.plan,
          now: desk.from,
          productionId,
          spreads: forecast,
          overrun: learnt,
          draws: forecast.draws,
          seed: FORECAST_SEED,
        },
        subject: { productionId },
        sentence: `Asked when “${production.name}” could be ready.`,
      };
    });
    return this.read(id);
  }

  list(): Promise<PromiseSearchView[]> {
    return this.transactions.read(async (manager) => {
      const newest = await new SearchRepository(manager).newestOfProductions();
      const desk = await readDesk(manager, this.transactions.clock());
      return [...newest].map(([productionId, search]) => viewOf({ search, desk }, productionId));
    });
  }

  async read(id: string): Promise<PromiseSearchView> {
    const read = await this.runs.read(id);
    const { productionId } = read.search;
    if (productionId === null) throw notFound('question');
    return viewOf(read, productionId);
  }

  async cancel(id: string): Promise<PromiseSearchView> {
    await this.runs.cancel(id);
    return this.read(id);
  }
}

function viewOf(read: SearchRead, productionId: string): PromiseSearchView {
  const { search, desk } = read;
  const found = search.found as PromiseFound | null;
  const ways = desk ? (found?.ways ?? []).map((way) => wayView(way, desk)) : [];
  return { ...searchView(read), productionId, ways };
}

function wayView({ unplacedStageIds, pushed, shortCrafts, shortBays, ...way }: Promised, desk: Desk): PromisedView {
  const { names, directory } = desk;
  const named =
    (list: readonly { readonly id: string; readonly name: string }[]) =>
    (week: ShortWeek): PromisedView['shortCrafts'][number] => ({
      ...week,
      name: list.find(({ id }) => id === week.id)?.name ?? 'something that is gone',
    });
  return {
    ...way,
    unplacedStages: unplacedStageIds.map(names.stage),
    pushed: pushed.map((one) => ({ ...one, name: names.keyDate(one.keyDateId) })),
    shortCrafts: shortCrafts.map(named(directory.crafts)),
    shortBays: shortBays.map(named(directory.bays)),
  };
}
