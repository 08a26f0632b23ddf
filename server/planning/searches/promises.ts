import type { z } from 'zod';
import type { PromiseRequest, PromiseSearchView } from '@common/contract';
import { learnOverrun, NO_FACTOR } from '@common/forecast';
import { buildUncertainty } from '@common/planning-input';
import { invalidField, notFound } from '../../http/problem';
import type { PromiseFound } from '../../jobs/promise-task';
import type { Actor } from '../../session';
import type { Transactions } from '../../storage/transactions';
import { readDesk } from '../desk';
import { FORECAST_SEED } from '../forecast/forecasts';
import { readPastWork } from '../forecast/past-hours';
import { minuteOf } from '../snapshot';
import { answerOf } from './promise-answer';
import { SearchRepository } from './search-repository';
import { searchView, type SearchRead, type SearchRuns } from './search-runs';

type Request = z.output<typeof PromiseRequest>;

/** Passes of the generation scheme when everything is levelled with the enquiry: a count, so that the answer can be had again. */
const MOST_SCHEDULES = 1_500;

/** When productions that the studio is asked for could be ready. */
export class Promises {
  constructor(
    private readonly transactions: Transactions,
    private readonly runs: SearchRuns,
  ) {}

  async start(actor: Actor, { productionId, draws, earliestStart }: Request): Promise<PromiseSearchView> {
    const id = await this.runs.start(actor, async (desk, unit) => {
      const production = desk.rows.productions.find((one) => one.id === productionId);
      if (!production) throw invalidField('/productionId', 'There is no such production that is still to be made.');
      if (production.state !== 'tentative') {
        throw invalidField('/productionId', 'Only a tentative production can be asked about. Make it tentative first.');
      }
      if (!desk.problem.stages.some((stage) => stage.productionId === productionId)) {
        throw invalidField('/productionId', 'It has no stages yet. Add its pieces from recipes, then ask again.');
      }
      const { forecast } = desk.rows.studio;
      const learnt =
        forecast.learning === 'past-hours' ? learnOverrun(await readPastWork(unit.manager, unit.at)) : NO_FACTOR;
      return {
        name: 'promise',
        task: {
          problem: desk.problem,
          plan: desk.plan,
          uncertainty: buildUncertainty(desk.snapshot, forecast, learnt),
          productionId,
          earliestStart: earliestStart === null ? null : minuteOf(new Date(earliestStart)),
          draws: draws ?? forecast.draws,
          seed: FORECAST_SEED,
          maxSchedules: MOST_SCHEDULES,
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
  const answer = desk && found?.promised ? answerOf(found.promised, desk) : null;
  return { ...searchView(read), productionId, answer };
}
