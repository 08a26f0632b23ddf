import { createHash } from 'node:crypto';
import { FAN_STEPS, LEAST_DRAWS, type ForecastView, type PastHoursView } from '@common/contract';
import { learnOverrun, NO_FACTOR, type LogFactor } from '@common/forecast';
import type { Names } from '@common/planning';
import { buildUncertainty } from '@common/planning-input';
import type { CalendarDay } from '@common/time/span';
import { dayOfInstant } from '@common/time/calendar-day';
import type { JobPool, RunningJob } from '../../jobs/job-pool';
import type { ForecastFound, ForecastTask } from '../../jobs/forecast-task';
import { Problem } from '../../http/problem';
import type { LiveHub } from '../../live';
import { CANCEL_CHANNEL } from '../../storage/live-channel';
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
  readonly learning: ForecastView['overrun']['learning'];
  readonly overrun: LogFactor;
  readonly pastStages: number;
  readonly earlier: readonly EarlierForecast[];
  readonly names: Names;
}

interface Answer {
  readonly found: ForecastFound;
  readonly madeAt: Date;
}

/** What is said on the cancelling channel to stop forecasts; levellings are named there by their ids. */
const STOP_WORD = 'forecast';
/** How often open pages are told how far it has come. */
const TELL_EVERY_MS = 250;

/** Forecasts of the working plan: made by a worker when somebody asks, and kept while the plan stands. */
export class Forecasts {
  readonly #kept = new Map<string, Promise<Answer>>();
  readonly #underWay = new Set<RunningJob<'forecast'>>();

  constructor(
    private readonly transactions: Transactions,
    private readonly pool: JobPool,
    live: LiveHub,
  ) {
    live.onCancel((word) => {
      if (word === STOP_WORD) for (const running of this.#underWay) running.cancel();
    });
  }

  async read(): Promise<ForecastView> {
    const question = await this.#ask();
    const { found, madeAt } = await this.#answer(question);
    return viewOf(question, found, madeAt);
  }

  /** Stops what is under way, in whichever process; the draws made so far are answered with. */
  async stop(): Promise<void> {
    await this.transactions.write(null, (unit) =>
      unit.manager.query('select pg_notify($1, $2)', [CANCEL_CHANNEL, STOP_WORD]),
    );
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

  async #work({ task, name, revision, today }: Question): Promise<Answer> {
    let lastTold = Date.now();
    const running = this.pool.run('forecast', task, {
      onProgress: ({ draws }) => {
        if (Date.now() - lastTold < TELL_EVERY_MS) return;
        lastTold = Date.now();
        const event = { kind: 'forecast', revision, draws, drawsAsked: task.draws } as const;
        // Nobody is the worse for a word of progress that does not get through.
        this.transactions.write(null, (unit) => unit.announce(event)).catch(() => undefined);
      },
    });
    this.#underWay.add(running);
    const outcome = await running.outcome.finally(() => this.#underWay.delete(running));
    if (outcome.kind === 'stopped') throw stoppedAfter(0);
    if (outcome.kind === 'failed') throw new Error(`A forecast failed: ${outcome.failure}`);
    const { found } = outcome;
    if (found.draws < Math.min(LEAST_DRAWS, task.draws)) throw stoppedAfter(found.draws);
    if (found.draws < task.draws) this.#kept.delete(name);
    else {
      await this.transactions.write(null, (unit) =>
        new DateForecastRepository(unit.manager).keep(today, found.keyDates),
      );
    }
    return { found, madeAt: this.transactions.clock() };
  }
}

function stoppedAfter(draws: number): Problem {
  const when = draws === 0 ? 'before it had begun' : `after ${String(draws)} draws, too few to go by`;
  return new Problem('forecast-stopped', `It was stopped ${when}. Ask for it again.`);
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
    learning: forecast.learning,
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
  const { revision, learning, overrun, pastStages, names } = question;
  const named = <T extends { readonly stageId: string }>(one: T): T & { readonly name: string } => ({
    ...one,
    name: names.stage(one.stageId),
  });
  const earlier = new Map(question.earlier.map((one) => [one.keyDateId, one]));
  return {
    revision,
    madeAt: madeAt.toISOString(),
    draws: found.draws,
    drawsAsked: question.task.draws,
    seed: found.seed,
    overrun: { learning, ...sayFactor(overrun), pastStages },
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
