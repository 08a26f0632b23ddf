import { createHash } from 'node:crypto';
import { FAN_STEPS, type ForecastView, type PastHoursView } from '@common/contract';
import { learnOverrun, NO_FACTOR, type LogFactor } from '@common/forecast';
import type { Names } from '@common/planning';
import { buildUncertainty } from '@common/planning-input';
import type { CalendarDay } from '@common/time/span';
import { dayOfInstant } from '@common/time/calendar-day';
import type { JobPool } from '../../jobs/job-pool';
import type { ForecastFound, ForecastTask } from '../../jobs/forecast-task';
import type { Transactions } from '../../storage/transactions';
import { nameOfContent, readDesk, type Desk } from '../desk';
import { DateForecastRepository, type EarlierForecast } from './date-forecast-repository';
import { pastHoursView, readPastWork, sayFactor, type PastWork } from './past-hours';

/** All forecasts draw alike, so that two of them differ by what differs in the plans. */
export const FORECAST_SEED = 1;

/** Answers kept: the plan that stands and a few that undo may come back to. */
const MOST_KEPT = 4;

/** What a forecast starts from, and what goes into its answer besides what the engine finds. */
interface Question {
  readonly task: ForecastTask;
  readonly name: string;
  readonly revision: number;
  readonly today: CalendarDay;
  readonly overrun: LogFactor;
  readonly pastStages: number;
  readonly earlier: readonly EarlierForecast[];
  readonly names: Names;
}

interface Answer {
  readonly found: ForecastFound;
  readonly madeAt: Date;
}

/** Forecasts of the working plan: made by a worker when somebody asks, and kept while the plan stands. */
export class Forecasts {
  readonly #kept = new Map<string, Promise<Answer>>();

  constructor(
    private readonly transactions: Transactions,
    private readonly pool: JobPool,
  ) {}

  async read(): Promise<ForecastView> {
    const question = await this.#ask();
    const { found, madeAt } = await this.#answer(question);
    return viewOf(question, found, madeAt);
  }

  pastHours(): Promise<PastHoursView> {
    return this.transactions.read((manager) => pastHoursView(manager, this.transactions.clock()));
  }

  #ask(): Promise<Question> {
    return this.transactions.read(async (manager) => {
      const at = this.transactions.clock();
      const desk = await readDesk(manager, at);
      const past = await readPastWork(manager, at);
      const today = dayOfInstant(desk.now, desk.rows.studio.zone);
      const earlier = await new DateForecastRepository(manager).lastBefore(today);
      return questionOf(desk, past, today, earlier);
    });
  }

  #answer(question: Question): Promise<Answer> {
    const { name } = question;
    const known = this.#kept.get(name);
    if (known) return known;
    const answer = this.#work(question);
    this.#kept.set(name, answer);
    // What failed may go well the next time.
    answer.catch(() => this.#kept.delete(name));
    const [oldest] = this.#kept.keys();
    if (this.#kept.size > MOST_KEPT) this.#kept.delete(oldest);
    return answer;
  }

  async #work({ task, today }: Question): Promise<Answer> {
    const outcome = await this.pool.run('forecast', task).outcome;
    if (outcome.kind === 'failed') throw new Error(`A forecast failed: ${outcome.failure}`);
    const { found } = outcome;
    await this.transactions.write(null, (unit) => new DateForecastRepository(unit.manager).keep(today, found.keyDates));
    return { found, madeAt: this.transactions.clock() };
  }
}

function questionOf(
  desk: Desk,
  past: readonly PastWork[],
  today: CalendarDay,
  earlier: readonly EarlierForecast[],
): Question {
  const { forecast, planRevision } = desk.rows.studio;
  const overrun = forecast.learning === 'past-hours' ? learnOverrun(past) : NO_FACTOR;
  const uncertainty = buildUncertainty(desk.snapshot, forecast, overrun);
  const problem = onlyWhollyPlaced(desk);
  const { plan } = desk;
  const task = { problem, plan, uncertainty, draws: forecast.draws, seed: FORECAST_SEED, fanSteps: FAN_STEPS };
  const content = JSON.stringify([today, nameOfContent(problem), plan, uncertainty, forecast]);
  return {
    task,
    name: createHash('sha256').update(content).digest('base64url'),
    revision: planRevision,
    today,
    overrun,
    pastStages: past.length,
    earlier,
    names: desk.names,
  };
}

/** Nobody can say when a key date is met of which a part has no place in the plan yet. */
function onlyWhollyPlaced({ problem, plan }: Desk): Desk['problem'] {
  const placed = new Set(plan.placements.map((placement) => placement.stageId));
  return {
    ...problem,
    keyDates: problem.keyDates.filter(
      ({ stageIds }) => stageIds.length > 0 && stageIds.every((stageId) => placed.has(stageId)),
    ),
  };
}

function viewOf(question: Question, found: ForecastFound, madeAt: Date): ForecastView {
  const { revision, overrun, pastStages, names } = question;
  const named = <T extends { readonly stageId: string }>(one: T): T & { readonly name: string } => ({
    ...one,
    name: names.stage(one.stageId),
  });
  const earlier = new Map(question.earlier.map((one) => [one.keyDateId, one]));
  return {
    revision,
    madeAt: madeAt.toISOString(),
    draws: found.draws,
    seed: found.seed,
    overrun: { ...sayFactor(overrun), pastStages },
    keyDates: found.keyDates.map(({ drivers, correlations, fan, ...keyDate }) => {
      const before = earlier.get(keyDate.keyDateId);
      return {
        ...keyDate,
        fan: [...fan],
        drivers: drivers.map(named),
        correlations: correlations.map(named),
        earlier: before ? { day: before.day, missChance: before.missChance, p80: before.p80 } : null,
      };
    }),
    productions: found.productions.map(({ productionId, fan }) => ({ productionId, fan: [...fan] })),
    stages: [...found.stages],
  };
}
