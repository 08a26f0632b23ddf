import { forecast, type Forecast, type LogFactor } from '../forecast';
import { check, drivingChain, isBetter, level, measure as measurePlan, type Plan, type Problem } from '../planning';
import { buildProblem, buildUncertainty, type StudioSnapshot, type UsualSpreads } from '../planning-input';
import type { Minute } from '../time/span';
import { applyMeasures } from './apply-measures';
import type { Measure, RescueTerms } from './measure';
import { priceOf } from './price-of';
import { proposeMeasures } from './propose-measures';

/** A date at risk and everything that a search for its rescue needs. The snapshot holds the measures already taken. */
export interface RescueQuestion {
  readonly snapshot: StudioSnapshot;
  readonly plan: Plan;
  readonly now: Minute;
  readonly keyDateId: string;
  readonly terms: RescueTerms;
  readonly spreads: UsualSpreads;
  readonly overrun: LogFactor;
  readonly draws: number;
  readonly seed: number;
}

/** How one key date fares. */
export interface DateOdds {
  readonly keyDateId: string;
  readonly missChance: number;
  readonly p80: Minute;
}

/** What could be done: one measure or several, or none but to level again. Prices in minor units. */
export interface Rescue {
  readonly measures: readonly Measure[];
  readonly priceMinor: number;
  readonly odds: DateOdds;
  /** Other dates whose chance of being missed moves by more than a draw or two, as they would fare. */
  readonly others: readonly DateOdds[];
  readonly plan: Plan;
}

/** What was found, the best first; `before` is the working plan as it stands. */
export interface RescuesFound {
  readonly before: readonly DateOdds[];
  readonly rescues: readonly Rescue[];
  /** Single measures that were weighed. */
  readonly weighed: number;
}

export interface RescueHooks {
  readonly isCancelled: () => boolean;
  readonly tell: (progress: { readonly weighed: number; readonly of: number }) => void;
}

/** A search weighs everything lightly, then a few thoroughly. */
const LIGHT = { schedules: 12, draws: 60 } as const;
const THOROUGH_SCHEDULES = 40;
const SHORTLIST = 4;
/** Measures in a combination at the most. */
const MOST_COMBINED = 3;
const MOST_DRIVERS = 8;
/** A chance that moves by less is the same chance. */
const SAME_CHANCE = 0.02;

/**
 * Looks for changes that would save a key date: weighs each allowed measure by laying everything out anew and living it through on
 * the same draws, then combines the best until the date is saved. Levelling again, which costs nothing, is weighed like a measure, so
 * that none is praised for what it alone would have done. A cancel leaves what was found so far. Deterministic by seed.
 */
export function searchRescues(question: RescueQuestion, hooks: RescueHooks): RescuesFound {
  return new RescueSearch(question, hooks).run();
}

class RescueSearch {
  private readonly before: Forecast;
  private readonly problem: Problem;

  constructor(
    private readonly question: RescueQuestion,
    private readonly hooks: RescueHooks,
  ) {
    this.problem = this.problemOf([]);
    this.before = this.liveThrough(this.problem, question.plan, question.snapshot, question.draws);
  }

  run(): RescuesFound {
    const singles = this.propose();
    const light = this.weighAll(singles.map((one) => [one]));
    // Levelling again is free: what it alone comes to is what measures have to better.
    const again = this.weigh([], THOROUGH_SCHEDULES, this.question.draws);
    const thorough = [again, ...this.thoroughly(light)];
    const combined = this.combine(thorough.filter((one) => one.measures.length === 1));
    return {
      before: oddsOf(this.before),
      rescues: this.rank([...thorough, ...combined]),
      weighed: singles.length,
    };
  }

  private propose(): readonly Measure[] {
    const { snapshot, plan, keyDateId, now, terms } = this.question;
    const known = this.before.keyDates.find((date) => date.keyDateId === keyDateId);
    if (!known) return [];
    const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
    const chain = drivingChain(this.problem, plan, keyDateId).steps.map((step) => step.stageId);
    const driverIds = [...new Set([...known.drivers.map((driver) => driver.stageId), ...chain])].slice(0, MOST_DRIVERS);
    return proposeMeasures(
      snapshot,
      {
        keyDateId,
        p90: known.p90,
        driverIds,
        now,
        makersOf: (id) => placed.get(id)?.crew.map(({ makerId }) => makerId) ?? [],
        baysOf: (id) => placed.get(id)?.bayIds ?? [],
      },
      terms,
    );
  }

  private weighAll(candidates: readonly (readonly Measure[])[]): readonly Rescue[] {
    const weighed: Rescue[] = [];
    for (const measures of candidates) {
      if (this.hooks.isCancelled()) break;
      weighed.push(this.weigh(measures, LIGHT.schedules, LIGHT.draws));
      this.hooks.tell({ weighed: weighed.length, of: candidates.length });
    }
    return weighed;
  }

  /** The likeliest again with all draws: the best by worth, and the cheapest that seem to save the date. */
  private thoroughly(light: readonly Rescue[]): readonly Rescue[] {
    const saving = light.filter((one) => this.saves(one)).sort((a, b) => a.priceMinor - b.priceMinor);
    const chosen = [...new Set([...saving.slice(0, SHORTLIST / 2), ...this.rank(light)])].slice(0, SHORTLIST);
    return chosen
      .filter(() => !this.hooks.isCancelled())
      .map(({ measures }) => this.weigh(measures, THOROUGH_SCHEDULES, this.question.draws));
  }

  /** The best single measures together, one more at a time, until the date is saved. */
  private combine(singles: readonly Rescue[]): readonly Rescue[] {
    const useful = this.rank(singles).filter((one) => this.gain(one) > SAME_CHANCE);
    if (useful.length < 2 || useful.some((one) => this.saves(one))) return [];
    const combined: Rescue[] = [];
    let measures = useful[0].measures;
    for (const next of useful.slice(1, MOST_COMBINED)) {
      if (this.hooks.isCancelled()) break;
      measures = [...measures, ...next.measures];
      const both = this.weigh(measures, THOROUGH_SCHEDULES, this.question.draws);
      combined.push(both);
      if (this.saves(both)) break;
    }
    return combined;
  }

  private weigh(measures: readonly Measure[], schedules: number, draws: number): Rescue {
    const { snapshot, seed, terms, keyDateId } = this.question;
    const changed = applyMeasures(snapshot, measures);
    const problem = this.problemOf(measures);
    const found = level(problem, { seed, maxSchedules: schedules, shouldStop: () => false });
    const plan = this.noWorse(problem, found.plan);
    const odds = oddsOf(this.liveThrough(problem, plan, changed, draws));
    const before = new Map(this.before.keyDates.map((one) => [one.keyDateId, one.missChance]));
    return {
      measures,
      priceMinor: measures.reduce((sum, one) => sum + priceOf(one, snapshot, terms), 0),
      odds: odds.find((one) => one.keyDateId === keyDateId) ?? { keyDateId, missChance: 1, p80: problem.horizon.end },
      others: odds.filter(
        (one) =>
          one.keyDateId !== keyDateId && Math.abs(one.missChance - (before.get(one.keyDateId) ?? 0)) > SAME_CHANCE,
      ),
      plan,
    };
  }

  private noWorse(problem: Problem, found: Plan): Plan {
    const { plan: current } = this.question;
    const of = (plan: Plan) => measurePlan(problem, plan, check(problem, plan));
    return isBetter(of(current), of(found), problem.weights) ? current : found;
  }

  private problemOf(measures: readonly Measure[]): Problem {
    const { snapshot, now } = this.question;
    return buildProblem(applyMeasures(snapshot, measures), { now, horizonEnd: null });
  }

  private liveThrough(problem: Problem, plan: Plan, snapshot: StudioSnapshot, draws: number): Forecast {
    const { spreads, overrun, seed } = this.question;
    return forecast(problem, plan, buildUncertainty(snapshot, spreads, overrun), { draws, seed });
  }

  private saves({ odds }: Rescue): boolean {
    return odds.missChance * 1000 <= this.question.terms.goalPermille;
  }

  /** Chance saved, from 0 to 1; negative where it makes things worse. */
  private gain({ odds }: Rescue): number {
    const { keyDateId } = this.question;
    const before = this.before.keyDates.find((one) => one.keyDateId === keyDateId)?.missChance ?? 1;
    return before - odds.missChance;
  }

  /**
   * Those that save the date first, the cheapest of them ahead; then by chance saved per money, what is free counting as a single
   * minor unit.
   */
  private rank(rescues: readonly Rescue[]): readonly Rescue[] {
    const worth = (one: Rescue): number => this.gain(one) / Math.max(1, one.priceMinor);
    return [...rescues].sort((a, b) => {
      const saved = Number(this.saves(b)) - Number(this.saves(a));
      if (saved !== 0) return saved;
      return this.saves(a) ? a.priceMinor - b.priceMinor || this.gain(b) - this.gain(a) : worth(b) - worth(a);
    });
  }
}

function oddsOf({ keyDates }: Forecast): DateOdds[] {
  return keyDates.map(({ keyDateId, missChance, p80 }) => ({ keyDateId, missChance, p80 }));
}
