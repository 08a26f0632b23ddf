import type { Minute } from '../time/span';
import { NO_DRIVER, type Plan, type Problem, Replay } from '../planning';
import { TimeDrawer } from './draw-times';
import { correlationOf, quantileOf, ranksOf } from './statistics';
import type { Uncertainty } from './uncertainty';

/** Finishes by the share of draws that come no later. */
export interface FinishSpread {
  readonly p10: Minute;
  readonly p50: Minute;
  readonly p80: Minute;
  readonly p90: Minute;
}

/** The forecast of one key date. Shares and chances run from 0 to 1. */
export interface KeyDateForecast extends FinishSpread {
  readonly keyDateId: string;
  /** Share of draws in which the date is missed. */
  readonly missChance: number;
  /** The stages most often on its driving chain, most often first. */
  readonly drivers: readonly { readonly stageId: string; readonly share: number }[];
  /** Spearman's rank correlation between a stage's own time and the date, strongest first. */
  readonly correlations: readonly { readonly stageId: string; readonly rank: number }[];
}

/** The forecast of a whole plan. */
export interface Forecast {
  readonly draws: number;
  readonly seed: number;
  readonly keyDates: readonly KeyDateForecast[];
  readonly productions: readonly (FinishSpread & {
    readonly productionId: string;
    readonly sorted: readonly Minute[];
  })[];
  readonly stages: readonly (FinishSpread & { readonly stageId: string })[];
  /** For each key date, in the order of `keyDates`, the finish in each draw: what rescues are compared on. */
  readonly finishesByKeyDate: readonly (readonly Minute[])[];
}

export interface ForecastOptions {
  readonly draws: number;
  readonly seed: number;
  /** Stages that give way to all others in every draw; none where it is absent. */
  readonly givesWay?: ReadonlySet<string>;
  /** Looked at between draws; true ends the forecast with the draws made so far (one at least). */
  readonly shouldStop?: () => boolean;
}

const MOST_NAMED = 12;
const CORRELATION_WORTH_NAMING = 0.08;

/**
 * Lives a plan through many times over: draws every uncertain time, replays the plan's order by the same generation scheme, and
 * counts. Monte Carlo simulation of a resource-constrained plan, after Van Slyke 1963 for networks; Latin hypercube strata with
 * common random numbers, so that two plans forecast with one seed differ by what differs in them.
 */
export function forecast(problem: Problem, plan: Plan, uncertainty: Uncertainty, options: ForecastOptions): Forecast {
  const replay = new Replay(problem, plan, options.givesWay);
  const drawer = new TimeDrawer(problem, uncertainty, replay, options.draws, options.seed);
  const tally = new Tally(problem, replay, options.draws);
  let made = 0;
  while (made < options.draws && (made === 0 || !options.shouldStop?.())) {
    drawer.write(made);
    replay.run();
    tally.count(made);
    made += 1;
  }
  return tally.sum(made, options.seed, drawer);
}

/** What has been counted over the draws. */
class Tally {
  private readonly finishes: readonly Int32Array[];
  private readonly dates: readonly {
    readonly stages: readonly number[];
    readonly finish: Int32Array;
    readonly onChain: Int32Array;
  }[];
  private readonly productions: readonly {
    readonly id: string;
    readonly stages: readonly number[];
    readonly finish: Int32Array;
  }[];

  constructor(
    private readonly problem: Problem,
    private readonly replay: Replay,
    draws: number,
  ) {
    const indexOf = new Map(replay.stageIds.map((id, index) => [id, index]));
    const indices = (ids: readonly string[]): number[] => ids.flatMap((id) => indexOf.get(id) ?? []);
    this.finishes = replay.stageIds.map(() => new Int32Array(draws));
    this.dates = problem.keyDates.map((date) => ({
      stages: indices(date.stageIds),
      finish: new Int32Array(draws),
      onChain: new Int32Array(replay.stageIds.length),
    }));
    const ids = [...new Set(problem.stages.map((stage) => stage.productionId))].sort();
    this.productions = ids.map((id) => ({
      id,
      stages: indices(problem.stages.filter((stage) => stage.productionId === id).map((stage) => stage.id)),
      finish: new Int32Array(draws),
    }));
  }

  count(draw: number): void {
    const { replay } = this;
    this.finishes.forEach((finish, stage) => (finish[draw] = replay.finishOf(stage)));
    for (const { stages, finish } of this.productions) finish[draw] = this.lastOf(stages, draw).finish;
    for (const date of this.dates) {
      const last = this.lastOf(date.stages, draw);
      date.finish[draw] = last.finish;
      // A chain can not be longer than there are stages; a tie could only lead round in a circle of empty stages.
      for (let stage = last.stage, left = this.finishes.length; stage !== NO_DRIVER && left > 0; left -= 1) {
        date.onChain[stage] += 1;
        stage = replay.driverOf(stage);
      }
    }
  }

  sum(made: number, seed: number, drawer: TimeDrawer): Forecast {
    const { start } = this.problem.horizon;
    // Sorted as they are counted, from the horizon's start: an array of numbers of one kind sorts many times faster.
    const sorted = (finish: Int32Array): Int32Array => finish.slice(0, made).sort();
    const instants = (finish: Int32Array): Minute[] => Array.from(finish.subarray(0, made), (at) => at + start);
    return {
      draws: made,
      seed,
      keyDates: this.problem.keyDates.map((date, k) => {
        const all = sorted(this.dates[k].finish);
        const late = all.reduce((count, finish) => (start + finish > date.at ? count + 1 : count), 0);
        const counted = this.dates[k];
        return {
          keyDateId: date.id,
          ...spreadOf(all, start),
          missChance: late / made,
          drivers: this.namedDrivers(counted.onChain, made),
          correlations: this.namedCorrelations(counted.finish.subarray(0, made), drawer, made),
        };
      }),
      productions: this.productions.map(({ id, finish }) => {
        const all = sorted(finish);
        return { productionId: id, ...spreadOf(all, start), sorted: instants(all) };
      }),
      stages: this.replay.stageIds.map((stageId, stage) => ({
        stageId,
        ...spreadOf(sorted(this.finishes[stage]), start),
      })),
      finishesByKeyDate: this.dates.map(({ finish }) => instants(finish)),
    };
  }

  private lastOf(stages: readonly number[], draw: number): { readonly stage: number; readonly finish: number } {
    let stage = NO_DRIVER;
    let finish = 0;
    for (const one of stages) {
      const at = this.finishes[one][draw];
      if (stage !== NO_DRIVER && at <= finish) continue;
      stage = one;
      finish = at;
    }
    return { stage, finish };
  }

  private namedDrivers(onChain: Int32Array, made: number): KeyDateForecast['drivers'] {
    return Array.from(onChain, (count, stage) => ({ stageId: this.replay.stageIds[stage], share: count / made }))
      .filter(({ share }) => share > 0)
      .sort((a, b) => b.share - a.share || (a.stageId < b.stageId ? -1 : 1))
      .slice(0, MOST_NAMED);
  }

  /** Ranks are of draws made; the strata of the times serve as their ranks. */
  private namedCorrelations(finish: Int32Array, drawer: TimeDrawer, made: number): KeyDateForecast['correlations'] {
    const ranks = ranksOf(finish);
    return this.replay.stageIds
      .map((stageId, stage) => {
        const times = drawer.ranksOf(stage);
        const effort = times ? correlationOf(times.effort.subarray(0, made), ranks) : 0;
        const dwell = times ? correlationOf(times.dwell.subarray(0, made), ranks) : 0;
        return { stageId, rank: Math.abs(dwell) > Math.abs(effort) ? dwell : effort };
      })
      .filter(({ rank }) => Math.abs(rank) > CORRELATION_WORTH_NAMING)
      .sort((a, b) => Math.abs(b.rank) - Math.abs(a.rank) || (a.stageId < b.stageId ? -1 : 1))
      .slice(0, MOST_NAMED);
  }
}

function spreadOf(sorted: Int32Array, start: Minute): FinishSpread {
  return {
    p10: start + quantileOf(sorted, 0.1),
    p50: start + quantileOf(sorted, 0.5),
    p80: start + quantileOf(sorted, 0.8),
    p90: start + quantileOf(sorted, 0.9),
  };
}
