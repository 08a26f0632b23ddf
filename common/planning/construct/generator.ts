import { StageBounds, isMovable, NOBODY } from './bounds-of-stage';
import { NEVER } from './calendar';
import type { Compiled, Crew } from './compiled';
import { placeFixed } from './fixed-stages';
import { type Ask, Fitter } from './fitter';
import type { Genome } from './genome';
import { copyFit, type Fit, Layout, newFit } from './layout';
import { workMinutes } from './work-minutes';

/** Stages laid out between two looks at whether to give up. */
const STAGES_BETWEEN_LOOKS = 64;
/** A maximum gap is mended this often for one stage before it is let go. */
const MOST_MENDS_OF_STAGE = 8;

/**
 * Serial schedule generation over an order of stages (Kelley 1963; Kolisch & Hartmann 1999), with a choice of crew and bays for
 * each. Where a stage comes too late for a maximum gap or a window, the stage that set it is taken out and begun later, with all
 * that follows it: the unscheduling step of Franck, Neumann & Schwindt 2001. What cannot be met is laid as well as it can be.
 */
export class Generator {
  readonly layout: Layout;
  /** Requirements that the last decoding could not meet, stages without a place among them. */
  broken = 0;
  /** Whether the last decoding was given up half way; its layout is then worth nothing. */
  isGivenUp = false;
  /** Asked now and then within a decoding, so that a large one need not be waited for. */
  shouldGiveUp: () => boolean = () => false;

  private readonly fitter: Fitter;
  private readonly bounds: StageBounds;
  private readonly ask: Ask = {
    stage: 0,
    crew: null,
    housing: null,
    minutes: 0,
    lowStart: 0,
    lowEnd: 0,
    lowFinish: 0,
    lastStart: NEVER,
    overtime: false,
  };
  private readonly trial: Fit = newFit();
  private readonly best: Fit = newFit();
  private bestCrew: Crew | null = null;
  private bestHousing: Int32Array | null = null;
  private readonly floor: Int32Array;
  private readonly mends: Uint8Array;
  private readonly isBusy: Uint8Array;
  /** Stages tried and found to have no place; they are not tried again in one decoding unless something is mended. */
  private readonly isHopeless: Uint8Array;
  private readonly position: Int32Array;
  private mendsLeft = 0;
  private resumeAt = NEVER;
  private genome: Genome | null = null;

  constructor(readonly compiled: Compiled) {
    const n = compiled.stageCount;
    this.layout = new Layout(compiled);
    this.fitter = new Fitter(this.layout);
    this.bounds = new StageBounds(this.layout, this.fitter);
    this.floor = new Int32Array(n);
    this.mends = new Uint8Array(n);
    this.isBusy = new Uint8Array(n);
    this.isHopeless = new Uint8Array(n);
    this.position = new Int32Array(n);
  }

  /** Lays out every stage, those that are tied first and the others by the genome's order. */
  decode(genome: Genome): void {
    this.begin();
    this.resume(genome);
  }

  /** An empty layout but for the stages that are tied to their times. */
  begin(): void {
    this.layout.clear();
    this.broken = 0;
    placeFixed(this.layout, this.fitter, this.bounds);
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
    for (const stage of order) if (this.layout.isPlaced[stage] === 0) this.broken += 1;
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
    if (late > 0) this.broken += this.bounds.countBroken(stage, this.best.start, this.best.end, this.best.finish);
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
    let bestLate = NEVER;
    let bestScore = NEVER;
    const fewest = this.fewestMinutes(stage, crews);
    const { lowStart } = this.bounds;
    for (const housing of work.housings[stage]) {
      ask.housing = housing;
      // No crew can start before its bays have room for even the quickest work.
      this.bounds.lowStart = this.fitter.bayFreeFrom(stage, housing, fewest, lowStart);
      for (let c = 0; c < Math.max(1, crews.length); c += 1) {
        if (choice >= 0 && c !== choice && choice < crews.length) continue;
        const crew = c < crews.length ? crews[c] : null;
        ask.crew = crew;
        const least = workMinutes(this.compiled, stage, work.minutes[stage], crew);
        // A start from which even bare work ends no better than the best found is of no use.
        ask.lastStart = bestLate === 0 ? bestScore - least - regretMinutes(crew, least) - 1 : NEVER;
        if (ask.lastStart < this.bounds.lowStart || !this.fitInTime(ask)) continue;
        const late = this.lateness(this.trial);
        const score = this.trial.finish + regretMinutes(crew, ask.minutes);
        if (late > bestLate || (late === bestLate && score >= bestScore)) continue;
        bestLate = late;
        bestScore = score;
        copyFit(this.trial, this.best);
        this.bestCrew = crew;
        this.bestHousing = housing;
      }
    }
    this.bounds.lowStart = lowStart;
    return bestScore >= NEVER ? -1 : bestLate;
  }

  private fewestMinutes(stage: number, crews: readonly Crew[]): number {
    const effort = this.compiled.work.minutes[stage];
    let fewest = crews.length === 0 ? effort : NEVER;
    for (let c = 0; c < crews.length; c += 1)
      fewest = Math.min(fewest, workMinutes(this.compiled, stage, effort, crews[c]));
    return fewest;
  }

  /** Fits with the extra effort of every soft window that the start then misses. */
  private fitInTime(ask: Ask): boolean {
    const { bounds } = this;
    const effort = this.compiled.work.minutes[ask.stage];
    ask.lowStart = bounds.lowStart;
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
