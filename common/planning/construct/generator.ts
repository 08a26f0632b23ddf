import { StageBounds, isMovable, NOBODY } from './bounds-of-stage';
import { NEVER } from './calendar';
import type { Compiled, Crew } from './compiled';
import { CrewBounds } from './crew-bounds';
import { leastDwell } from './cured-by';
import { placeFixed } from './fixed-stages';
import type { Ask } from './ask';
import { Fitter } from './fitter';
import type { Genome } from './genome';
import { copyFit, type Fit, Layout, newFit } from './layout';
import { workMinutes } from './work-minutes';

/** Stages laid out between two looks at whether to give up. */
const STAGES_BETWEEN_LOOKS = 64;
/** So few crews are fitted one after another: to bound them would cost more. */
const FEW_CREWS = 4;
/** A maximum gap is mended this often for one stage before it is let go. */
const MOST_MENDS_OF_STAGE = 8;

/**
 * Serial schedule generation over an order of stages (Kelley 1963; Kolisch & Hartmann 1999), with a choice of crew and bays for
 * each. Where a stage comes too late for a maximum gap or a window, the stage that set it is taken out and begun later, with all
 * that follows it: the unscheduling step of Franck, Neumann & Schwindt 2001. What cannot be met is laid as well as it can be.
 */
export class Generator {
  readonly layout: Layout;
  /** Requirements of movable stages that what is laid out does not meet, stages without a place among them. */
  broken = 0;
  /** Stages laid out so far, those that were taken out again and again among them: what decoding has cost. */
  laid = 0;
  /** Whether the last decoding was given up half way; its layout is then worth nothing. */
  isGivenUp = false;
  /** Asked now and then within a decoding, so that a large one need not be waited for. */
  shouldGiveUp: () => boolean = () => false;

  private readonly fitter: Fitter;
  private readonly bounds: StageBounds;
  private readonly crewBounds: CrewBounds;
  private readonly ask: Ask = {
    stage: 0,
    crew: null,
    housing: null,
    minutes: 0,
    lowStart: 0,
    lowEnd: 0,
    lowFinish: 0,
    lastStart: NEVER,
    lastEnd: NEVER,
    overtime: false,
  };
  private readonly trial: Fit = newFit();
  private readonly best: Fit = newFit();
  private leastDwell = 0;
  private bestLate = NEVER;
  private bestScore = NEVER;
  private bestRegret = 0;
  private bestRank = 0;
  private bestCrew: Crew | null = null;
  private bestHousing: Int32Array | null = null;
  private readonly floor: Int32Array;
  private readonly mends: Uint8Array;
  private readonly isBusy: Uint8Array;
  /** Stages tried and found to have no place; they are not tried again in one decoding unless something is mended. */
  private readonly isHopeless: Uint8Array;
  private readonly position: Int32Array;
  /** For each stage, the requirements that its placement broke when it was laid. */
  private readonly brokenBy: Uint8Array;
  private mendsLeft = 0;
  private resumeAt = NEVER;
  private genome: Genome | null = null;

  constructor(readonly compiled: Compiled) {
    const n = compiled.stageCount;
    this.layout = new Layout(compiled);
    this.fitter = new Fitter(this.layout);
    this.bounds = new StageBounds(this.layout, this.fitter);
    this.crewBounds = new CrewBounds(this.layout);
    this.floor = new Int32Array(n);
    this.mends = new Uint8Array(n);
    this.isBusy = new Uint8Array(n);
    this.isHopeless = new Uint8Array(n);
    this.position = new Int32Array(n);
    this.brokenBy = new Uint8Array(n);
  }

  /** Lays out every stage, those that are tied first and the others by the genome's order. */
  decode(genome: Genome): void {
    this.begin();
    this.resume(genome);
  }

  /** An empty layout but for the stages that are tied to their times. */
  begin(): void {
    this.layout.clear();
    this.brokenBy.fill(0);
    placeFixed(this.layout, this.fitter, this.bounds);
  }

  /** Becomes a copy of another generator's last decoding. */
  copyFrom(other: Generator): void {
    this.layout.copyFrom(other.layout);
    this.brokenBy.set(other.brokenBy);
    this.broken = other.broken;
  }

  /** Takes some movable stages out and lays them out again beside everything else, by the genome's order. */
  relay(stages: readonly number[], genome: Genome): void {
    for (const stage of stages) if (this.layout.isPlaced[stage] === 1) this.layout.unplace(stage);
    this.resume(genome);
  }

  /** Lays out every stage that has no place yet by the genome's order, beside what is there. */
  resume(genome: Genome): void {
    const { order } = genome;
    this.genome = genome;
    this.floor.fill(0);
    this.mends.fill(0);
    this.isBusy.fill(0);
    this.isHopeless.fill(0);
    this.mendsLeft = 2 * order.length + 20;
    this.isGivenUp = false;
    let looks = 0;
    for (let p = 0; p < order.length; p += 1) this.position[order[p]] = p;
    for (let p = 0; p < order.length; p += 1) {
      looks += 1;
      if (looks % STAGES_BETWEEN_LOOKS === 0 && this.shouldGiveUp()) {
        this.isGivenUp = true;
        return;
      }
      this.resumeAt = NEVER;
      this.placeWithBefore(order[p]);
      // A mend has taken stages out: go back to the first of them. The loop's own step makes up for the one subtracted.
      if (this.resumeAt < NEVER) p = Math.min(p, this.resumeAt) - 1;
    }
    this.broken = 0;
    for (const stage of order) this.broken += this.layout.isPlaced[stage] === 0 ? 1 : this.brokenBy[stage];
  }

  /** Places a stage after the stages that it waits for. */
  private placeWithBefore(stage: number): void {
    const { links } = this.compiled;
    const { isPlaced } = this.layout;
    if (isPlaced[stage] === 1 || this.isBusy[stage] === 1 || this.isHopeless[stage] === 1) return;
    this.isBusy[stage] = 1;
    let isReady = true;
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const before = links.from[links.inLinks[k]];
      if (isPlaced[before] === 0) this.placeWithBefore(before);
      if (this.resumeAt < NEVER) break;
      // A stage that waits, round about, for this one is judged when its own turn comes.
      if (isPlaced[before] === 0 && this.isBusy[before] === 0) isReady = false;
    }
    if (this.resumeAt >= NEVER) {
      if (isReady) this.place(stage);
      else this.isHopeless[stage] = 1;
    }
    this.isBusy[stage] = 0;
  }

  private place(stage: number): void {
    this.letGoFor(stage);
    if (this.resumeAt < NEVER) return;
    this.bounds.gather(stage, this.floor[stage]);
    let late = this.findBest(stage);
    // With the effort of a missed window the stage may be too long for any shift: then the window has to be met.
    if (late < 0 && this.bounds.hardenWindows()) late = this.findBest(stage);
    if (late < 0) {
      this.isHopeless[stage] = 1;
      return;
    }
    if (late > 0 && this.mend(stage)) return;
    const { start, end, finish } = this.best;
    this.brokenBy[stage] = late > 0 ? this.bounds.countBroken(stage, start, end, finish) : 0;
    this.laid += 1;
    this.layout.place(stage, this.best, this.bestCrew, this.bestHousing);
  }

  /** Where all bays that a stage could use are held until some demould, that demould comes first. */
  private letGoFor(stage: number): void {
    const { work } = this.compiled;
    for (const housing of work.housings[stage]) {
      for (let k = 0; k < housing.length; k += 1) {
        const bay = housing[k];
        const holds = this.layout.openHolds[bay];
        if (holds.length === 0) continue;
        const units = work.placeUnits[work.placeOf[stage] + k];
        if (this.layout.bays[bay].takenForEver() + units <= this.compiled.bays.capacity[bay]) continue;
        for (const holder of [...holds]) {
          for (let place = work.placeOf[holder]; place < work.placeOf[holder + 1]; place += 1) {
            if (work.placeUntil[place] >= 0 && this.resumeAt >= NEVER) this.placeWithBefore(work.placeUntil[place]);
          }
        }
      }
    }
  }

  /** Finds the best of all crews and bays into `best`; the minutes by which it breaks a bound, or -1 for no place at all. */
  private findBest(stage: number): number {
    const { work } = this.compiled;
    const crews = work.crews[stage];
    const needsCrew = work.needOf[stage + 1] > work.needOf[stage];
    const choice = this.genome ? this.genome.crewChoice[stage] : -1;
    const ask = this.ask;
    ask.stage = stage;
    ask.overtime = this.genome !== null && this.genome.overtime[stage] === 1;
    if (needsCrew && crews.length === 0) return -1;
    const fewest = this.crewBounds.measure(stage, crews);
    const { lowStart } = this.bounds;
    this.bestLate = NEVER;
    this.bestScore = NEVER;
    this.bestHousing = null;
    for (const housing of work.housings[stage]) {
      ask.housing = housing;
      this.leastDwell = leastDwell(this.compiled, stage, housing);
      // No crew can start before its bays have room for even the quickest work.
      this.bounds.lowStart = this.fitter.bayFreeFrom(ask, fewest, this.leastDwell, lowStart);
      if (crews.length === 0) this.weigh(ask, null, 0, this.bounds.lowStart, fewest);
      else if (choice >= 0 && choice < crews.length)
        this.weigh(ask, crews[choice], choice, this.bounds.lowStart, this.crewBounds.minutes[choice]);
      else if (crews.length <= FEW_CREWS)
        for (let c = 0; c < crews.length; c += 1)
          this.weigh(ask, crews[c], c, this.bounds.lowStart, this.crewBounds.minutes[c]);
      else this.weighCrews(ask, crews);
    }
    this.bounds.lowStart = lowStart;
    return this.bestScore >= NEVER ? -1 : this.bestLate;
  }

  /** Weighs crews, whichever could be done first at the very best first, until no other can be better. */
  private weighCrews(ask: Ask, crews: readonly Crew[]): void {
    const { crewBounds } = this;
    crewBounds.bound(ask.stage, crews, this.bounds.lowStart, ask.overtime);
    const { start, end, minutes } = crewBounds;
    for (let c = 0; c < crews.length; c += 1) if (end[c] < NEVER) end[c] += regretMinutes(crews[c], minutes[c]);
    for (let weighed = 0; weighed < crews.length; weighed += 1) {
      let next = 0;
      for (let c = 1; c < crews.length; c += 1) if (end[c] < end[next]) next = c;
      if (end[next] >= NEVER || (this.bestLate === 0 && end[next] + this.leastDwell > this.bestScore)) return;
      end[next] = NEVER;
      this.weigh(ask, crews[next], next, start[next], minutes[next]);
    }
  }

  /**
   * Fits a crew from an instant on and keeps it where it is the best so far, or as good and listed sooner for the same bays;
   * `least` is its bare work in minutes.
   */
  private weigh(ask: Ask, crew: Crew | null, rank: number, from: number, least: number): void {
    ask.crew = crew;
    // What would end, with its dwell and regret, no better than the best found is of no use.
    const regret = regretMinutes(crew, least);
    const isSooner = this.bestHousing === ask.housing && rank < this.bestRank;
    const gain = isSooner ? 0 : 1;
    ask.lastEnd = this.bestLate === 0 ? this.bestScore - this.leastDwell - regret - gain : NEVER;
    // In the same bays who ends later has dwelt later too.
    const isAlike = this.bestLate === 0 && this.bestHousing === ask.housing && regret >= this.bestRegret;
    if (isAlike) ask.lastEnd = Math.min(ask.lastEnd, this.best.end - gain);
    ask.lastStart = this.bestLate === 0 ? ask.lastEnd - least : NEVER;
    ask.lowStart = from;
    if (ask.lastStart < from || !this.fitInTime(ask)) return;
    const late = this.lateness(this.trial);
    const paid = regretMinutes(crew, ask.minutes);
    const score = this.trial.finish + paid;
    if (late > this.bestLate || (late === this.bestLate && score > this.bestScore - gain)) return;
    this.bestLate = late;
    this.bestScore = score;
    this.bestRegret = paid;
    this.bestRank = rank;
    copyFit(this.trial, this.best);
    this.bestCrew = crew;
    this.bestHousing = ask.housing;
  }

  /** Fits with the extra effort of every soft window that the start then misses. */
  private fitInTime(ask: Ask): boolean {
    const { bounds } = this;
    const effort = this.compiled.work.minutes[ask.stage];
    ask.lowEnd = bounds.lowEnd;
    ask.lowFinish = bounds.lowFinish;
    for (let extra = -1; ;) {
      let owed = 0;
      for (let k = 0; k < bounds.softUntil.length; k += 1)
        if (ask.lowStart > bounds.softUntil[k]) owed += bounds.softExtra[k];
      if (owed === extra) return true;
      extra = owed;
      ask.minutes = workMinutes(this.compiled, ask.stage, effort + extra, ask.crew);
      if (!this.fitter.fit(ask, this.trial)) return false;
      ask.lowStart = this.trial.start;
    }
  }

  private lateness(fit: Fit): number {
    const { bounds } = this;
    return Math.max(0, fit.start - bounds.highStart, fit.end - bounds.highEnd, fit.finish - bounds.highFinish);
  }

  /** Takes out the stage whose bound is broken and what follows it, to begin later. False where nothing can be mended. */
  private mend(stage: number): boolean {
    const { bounds, best } = this;
    let cause = NOBODY;
    let by = 0;
    let retry = 0;
    const weigh = (over: number, from: number, retryAt: number): void => {
      if (over <= by) return;
      by = over;
      cause = from;
      retry = retryAt;
    };
    weigh(best.start - bounds.highStart, bounds.highStartCause, 0);
    weigh(best.end - bounds.highEnd, bounds.highEndCause, bounds.highEndRetry);
    weigh(best.finish - bounds.highFinish, bounds.highFinishCause, 0);
    if (cause === NOBODY || !isMovable(this.compiled, cause) || this.isBusy[cause] === 1) return false;
    if (this.mendsLeft === 0 || this.mends[cause] >= MOST_MENDS_OF_STAGE) return false;
    this.mendsLeft -= 1;
    this.mends[cause] += 1;
    this.floor[cause] = retry >= NEVER ? this.layout.start[cause] + by : Math.max(this.layout.start[cause] + by, retry);
    this.resumeAt = this.position[stage];
    this.takeOut(cause);
    this.isHopeless.fill(0);
    return true;
  }

  /** Takes a stage out with every movable stage that follows it. */
  private takeOut(stage: number): void {
    const { links } = this.compiled;
    if (this.layout.isPlaced[stage] === 0 || !isMovable(this.compiled, stage)) return;
    this.layout.unplace(stage);
    this.resumeAt = Math.min(this.resumeAt, this.position[stage]);
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) this.takeOut(links.to[links.outLinks[k]]);
  }
}

/** Half the work's time, at most half a day, for a crew whose crafts are wanted elsewhere. */
function regretMinutes(crew: Crew | null, minutes: number): number {
  return crew ? Math.round((Math.min(minutes, 480) * crew.regretPermille) / 2000) : 0;
}
