import { StageBounds } from '../construct/bounds-of-stage';
import { type Crew, FINISH_START, MOVABLE, SOFT_WINDOW } from '../construct/compiled';
import type { Ask } from '../construct/ask';
import { Fitter } from '../construct/fitter';
import { copyFit, type Fit, type Layout, newFit } from '../construct/layout';
import { workMinutes } from '../construct/work-minutes';
import type { Budget } from '../stop/budget';
import { Chance } from './chance';
import { DayLoad } from './day-load';

/** A stage is not tried on more days than this in one pass. */
const MOST_DAYS = 60;
/** The share of a date's margin that evenness may spend. */
const MARGIN_SHARE = 0.5;
/** Passes without a gain before it is left alone. */
const PATIENCE = 9;
/** Other crews tried for a stage on one day. */
const MOST_CREWS = 4;

/**
 * Evens the daily load of each craft by moving one stage at a time within the room that links, dates, crews and bays leave it:
 * the levelling of Burgess & Killebrew 1962, last stage first, first stage first, and then in orders drawn by chance, until
 * nothing is gained. No date gets later than it is or may be, no window is missed that was met, and nothing costs more.
 */
export function evenOut(layout: Layout, budget: Budget, seed: number): void {
  const { compiled } = layout;
  if (compiled.problem.weights.unevenness === 0) return;
  const evener = new Evener(layout, new Chance(seed));
  let idle = 0;
  for (let pass = 0; idle < PATIENCE && !budget.isSpent(); pass += 1) {
    budget.spend();
    idle = evener.pass(SWEEPS[Math.min(pass, idle) % SWEEPS.length], () => budget.isSpent()) ? 0 : idle + 1;
  }
}

/** In which order a pass takes the stages; a tie goes to the later day, to the earlier, or either way. */
type Sweep = 'last-first' | 'first-first' | 'by-chance';
const SWEEPS: readonly Sweep[] = ['last-first', 'first-first', 'by-chance'];

class Evener {
  private readonly load: DayLoad;
  private readonly fitter: Fitter;
  private readonly bounds: StageBounds;
  private readonly trial: Fit = newFit();
  private readonly best: Fit = newFit();
  private readonly other: Fit = newFit();
  private readonly dateLimit: Float64Array;

  private readonly isSettled: Uint8Array;

  constructor(
    private readonly layout: Layout,
    private readonly chance: Chance,
  ) {
    this.load = new DayLoad(layout);
    this.fitter = new Fitter(layout);
    this.bounds = new StageBounds(layout, this.fitter);
    this.dateLimit = this.dateLimits();
    this.isSettled = stagesAsIssued(layout);
  }

  /** One pass over all movable stages; true where the sum got less. */
  pass(sweep: Sweep, isSpent: () => boolean): boolean {
    const before = this.load.sum;
    const { layout } = this;
    const { fixity } = layout.compiled.work;
    const stages = [...layout.start.keys()].filter(
      (stage) => fixity[stage] === MOVABLE && layout.isPlaced[stage] === 1 && this.isSettled[stage] === 0,
    );
    const key = Float64Array.from(layout.start, (start) => (sweep === 'by-chance' ? this.chance.share() : start));
    stages.sort((a, b) => (sweep === 'last-first' ? key[b] - key[a] : key[a] - key[b]) || a - b);
    for (const stage of stages) {
      if (isSpent()) break;
      const preferLate = sweep === 'by-chance' ? this.chance.share() < 0.5 : sweep === 'last-first';
      if (layout.spanCount[stage] > 0 && layout.crew[stage]) this.moveToBest(stage, preferLate);
    }
    return this.load.sum < before;
  }

  private moveToBest(stage: number, preferLate: boolean): void {
    const { layout, load, trial, best } = this;
    const crew = layout.crew[stage];
    const housing = layout.housing[stage];
    const isOvertime = this.worksOvertime(stage);
    const was = this.remember(stage);
    load.add(stage, -1);
    layout.unplace(stage);
    const ask = this.askFor(stage, was);
    copyFit(was, best);
    let bestCrew = crew;
    if (ask && crew && !isOvertime) {
      const crews = this.crewsLike(stage, crew);
      ask.housing = housing;
      let bestSum = this.sumWith(stage, was);
      for (let tries = 0; tries < MOST_DAYS && ask.lowStart <= ask.lastStart; tries += 1) {
        const found = this.fitFirst(ask, crews);
        if (!found || !this.isAllowed(trial, stage)) break;
        const sum = this.sumWith(stage, trial);
        const isTieKept = sum === bestSum && (preferLate ? trial.start > best.start : trial.start < best.start);
        if (sum < bestSum || isTieKept) {
          bestSum = sum;
          bestCrew = found;
          copyFit(trial, best);
        }
        ask.lowStart = load.nextDayStart(trial.start);
      }
    }
    layout.place(stage, best, bestCrew, housing);
    load.add(stage, 1);
  }

  /** The stage's crew, and others that do the same work in the same time at no cost. */
  private crewsLike(stage: number, crew: Crew): Crew[] {
    const { compiled } = this.layout;
    const isFree = (one: Crew): boolean => one.makers.every((maker) => compiled.makers.hourCost[maker] === 0);
    const same = (one: Crew): boolean =>
      one !== crew &&
      one.outputPermille === crew.outputPermille &&
      one.makers.length === crew.makers.length &&
      isFree(one);
    const others = compiled.work.crews[stage].filter(same);
    const from = others.length > 0 ? this.chance.below(others.length) : 0;
    return [crew, ...others.slice(from), ...others.slice(0, from)].slice(0, 1 + MOST_CREWS);
  }

  /** Fits the first crew that can start on the asked day, else the one that can start soonest; into the trial. */
  private fitFirst(ask: Ask, crews: readonly Crew[]): Crew | null {
    const { trial, other, load } = this;
    const dayEnd = load.nextDayStart(ask.lowStart);
    let found: Crew | null = null;
    for (const crew of crews) {
      ask.crew = crew;
      if (!this.fitter.fit(ask, other) || (found && other.start >= trial.start)) continue;
      found = crew;
      copyFit(other, trial);
      if (trial.start < dayEnd) break;
    }
    return found;
  }

  /** What may be asked for the stage in its present mode; null where it has missed a window or breaks a bound and is left alone. */
  private askFor(stage: number, was: Fit): Ask | null {
    const { bounds, layout } = this;
    bounds.gather(stage, 0);
    if (bounds.softUntil.some((until) => was.start > until) || this.isPaidFor(stage)) return null;
    bounds.hardenWindows();
    const isAmiss =
      was.start < bounds.lowStart ||
      was.end < bounds.lowEnd ||
      was.finish < bounds.lowFinish ||
      !this.isAllowed(was, stage);
    if (isAmiss) return null;
    const minutes = workMinutes(layout.compiled, stage, layout.compiled.work.minutes[stage], layout.crew[stage]);
    return {
      stage,
      crew: null,
      housing: null,
      minutes,
      overtime: false,
      lowStart: bounds.lowStart,
      lowEnd: bounds.lowEnd,
      lowFinish: bounds.lowFinish,
      lastStart: bounds.highStart,
      lastEnd: Math.min(bounds.highEnd, this.dateLimit[stage]),
    };
  }

  /** Whether some follower pays for having missed the stage's soft window: then the two are not moved against one another. */
  private isPaidFor(stage: number): boolean {
    const { layout } = this;
    const { links, work } = layout.compiled;
    if (work.windowKind[stage] !== SOFT_WINDOW) return false;
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const link = links.outLinks[k];
      const leads = links.kind[link] === FINISH_START && links.afterWork[link] === 0;
      if (leads && layout.start[links.to[link]] > layout.windowEnd(stage)) return true;
    }
    return false;
  }

  private isAllowed(fit: Fit, stage: number): boolean {
    const { bounds } = this;
    return (
      fit.start <= bounds.highStart &&
      fit.end <= bounds.highEnd &&
      fit.finish <= bounds.highFinish &&
      fit.finish <= this.dateLimit[stage]
    );
  }

  private sumWith(stage: number, fit: Fit): number {
    const { compiled } = this.layout;
    const crafts = this.layout.crew[stage]?.crafts;
    this.load.addSpans(compiled, crafts, fit.spans, 0, fit.spanCount, 1);
    const { sum } = this.load;
    this.load.addSpans(compiled, crafts, fit.spans, 0, fit.spanCount, -1);
    return sum;
  }

  private remember(stage: number): Fit {
    const { layout } = this;
    const fit = newFit();
    fit.start = layout.start[stage];
    fit.end = layout.end[stage];
    fit.finish = layout.finish[stage];
    fit.spanCount = layout.spanCount[stage];
    fit.spans = layout.spanPool.slice(layout.spanAt[stage], layout.spanAt[stage] + 2 * fit.spanCount);
    return fit;
  }

  private worksOvertime(stage: number): boolean {
    const { layout } = this;
    for (const maker of layout.crew[stage]?.makers ?? []) {
      for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1) {
        if (!layout.compiled.makers.ordinary[maker].covers(layout.spanPool[k], layout.spanPool[k + 1])) return true;
      }
    }
    return false;
  }

  /**
   * The latest that each stage's dwell may end: no date gets later than it is, and of its margin at most a part is spent, because
   * an even plan that ends on the last day is a plan that will be late. What no date waits for stays within its production's end.
   */
  private dateLimits(): Float64Array {
    const { layout } = this;
    const { dates, stageCount } = layout.compiled;
    const productionEnd = new Float64Array(dates.productionCount);
    for (let stage = 0; stage < stageCount; stage += 1) {
      const production = dates.productionOf[stage];
      if (layout.isPlaced[stage] === 1)
        productionEnd[production] = Math.max(productionEnd[production], layout.finish[stage]);
    }
    const limit = new Float64Array(stageCount).fill(Infinity);
    for (let date = 0; date < dates.count; date += 1) {
      let finish = -Infinity;
      for (const stage of dates.stages[date]) finish = Math.max(finish, layout.finish[stage]);
      const latest = finish + Math.max(0, Math.floor((dates.at[date] - finish) * MARGIN_SHARE));
      for (const stage of dates.stages[date]) limit[stage] = Math.min(limit[stage], latest);
    }
    for (let stage = 0; stage < stageCount; stage += 1) {
      if (limit[stage] === Infinity)
        limit[stage] = Math.max(productionEnd[dates.productionOf[stage]], layout.finish[stage]);
    }
    // A stage before a date's own may end as late as links allow: its followers hold it back.
    return this.widenBeforeDates(limit);
  }

  private widenBeforeDates(limit: Float64Array): Float64Array {
    const { links, stageCount } = this.layout.compiled;
    for (let round = 0, changed = true; changed && round < stageCount; round += 1) {
      changed = false;
      for (let link = 0; link < links.count; link += 1) {
        if (limit[links.to[link]] <= limit[links.from[link]]) continue;
        limit[links.from[link]] = limit[links.to[link]];
        changed = true;
      }
    }
    return limit;
  }
}

/** Marks stages that stand as they were issued, where a change is weighed against cost: evenness does not move those. */
function stagesAsIssued(layout: Layout): Uint8Array {
  const { compiled } = layout;
  const { issued, weights } = compiled.problem;
  const settled = new Uint8Array(compiled.stageCount);
  if (weights.changePenaltyMinor === 0) return settled;
  for (const placement of issued?.placements ?? []) {
    const stage = compiled.stageIndex.get(placement.stageId);
    const start = placement.work[0]?.start;
    if (stage !== undefined && start !== undefined && layout.start[stage] === start - compiled.origin)
      settled[stage] = 1;
  }
  return settled;
}
