import { NEVER } from './calendar';
import {
  type Compiled,
  FINISH_FINISH,
  FINISH_START,
  HARD_WINDOW,
  HOLD_UNTIL,
  MOVABLE,
  NO_WINDOW,
  SOFT_WINDOW,
  START_FINISH,
  START_START,
} from './compiled';
import type { Fitter } from './fitter';
import type { Layout } from './layout';
import { workMinutes } from './work-minutes';

/** Nobody: the cause of a bound that no stage has set. */
export const NOBODY = -1;

/**
 * What the stages that already have a place demand of one that has none: no earlier than, no later than, and which soft windows
 * close when. Reused from stage to stage.
 */
export class StageBounds {
  lowStart = 0;
  lowEnd = 0;
  lowFinish = 0;
  highStart = NEVER;
  highEnd = NEVER;
  highFinish = NEVER;
  highStartCause = NOBODY;
  highEndCause = NOBODY;
  highFinishCause = NOBODY;
  /** Where the cause of `highEnd` is a holder: the instant after which it may hold again; else 0. */
  highEndRetry = 0;
  /** Soft windows: the last start in time for each, and the effort that a later one costs. */
  readonly softUntil: number[] = [];
  readonly softExtra: number[] = [];
  private readonly softCause: number[] = [];

  private readonly compiled: Compiled;

  constructor(
    private readonly layout: Layout,
    private readonly fitter: Fitter,
  ) {
    this.compiled = layout.compiled;
  }

  /** Gathers the bounds of a stage; `floor` is the earliest start that repairs have left it. */
  gather(stage: number, floor: number): void {
    const { work } = this.compiled;
    this.lowStart = Math.max(work.earliest[stage], floor);
    this.lowEnd = -NEVER;
    this.lowFinish = -NEVER;
    this.highStart = NEVER;
    this.highEnd = work.latest[stage];
    this.highFinish = NEVER;
    this.highStartCause = NOBODY;
    this.highEndCause = NOBODY;
    this.highFinishCause = NOBODY;
    this.highEndRetry = 0;
    if (this.softUntil.length > 0) this.forgetWindows();
    this.gatherBefore(stage);
    this.gatherAfter(stage);
    this.gatherHolds(stage);
  }

  /** Makes soft windows hard, for a stage that has no place anywhere with the effort of missing them; false where there are none. */
  hardenWindows(): boolean {
    if (this.softUntil.length === 0) return false;
    for (let k = 0; k < this.softUntil.length; k += 1) this.capStart(this.softUntil[k], this.softCause[k]);
    this.softUntil.length = 0;
    return true;
  }

  /** How many links, windows and deadlines a placement breaks; 1 for whatever else it came too late for. */
  countBroken(stage: number, start: number, end: number, finish: number): number {
    const { links, work } = this.compiled;
    let broken = end > work.latest[stage] ? 1 : 0;
    const highs = [this.highStart, this.highEnd, this.highFinish];
    const isBroken = (): boolean => start > this.highStart || end > this.highEnd || finish > this.highFinish;
    for (const [column, range] of [
      [links.inLinks, links.inOf],
      [links.outLinks, links.outOf],
    ]) {
      for (let k = range[stage]; k < range[stage + 1]; k += 1) {
        [this.highStart, this.highEnd, this.highFinish] = [NEVER, NEVER, NEVER];
        if (column === links.inLinks) this.gatherBeforeLink(column[k]);
        else this.gatherAfterLink(stage, column[k]);
        if (isBroken()) broken += 1;
      }
    }
    [this.highStart, this.highEnd, this.highFinish] = highs;
    return Math.max(1, broken);
  }

  private forgetWindows(): void {
    this.softUntil.length = 0;
    this.softExtra.length = 0;
    this.softCause.length = 0;
  }

  private gatherBefore(stage: number): void {
    const { links } = this.compiled;
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) this.gatherBeforeLink(links.inLinks[k]);
  }

  private gatherBeforeLink(link: number): void {
    const { links } = this.compiled;
    const before = links.from[link];
    if (this.layout.isPlaced[before] === 0) return;
    const kind = links.kind[link];
    const from = this.firstEnd(link, before);
    const low = this.earliest(link, from, links.minGap[link]);
    const endsBind = kind === FINISH_FINISH || kind === START_FINISH;
    if (endsBind) this.lowEnd = Math.max(this.lowEnd, low);
    else this.lowStart = Math.max(this.lowStart, low);
    if (links.maxGap[link] < NEVER) {
      const high = this.latest(link, from, links.maxGap[link]);
      if (endsBind) this.capEnd(high, before);
      else this.capStart(high, before);
    }
    if (kind === FINISH_START && links.afterWork[link] === 0) this.gatherWindow(before);
  }

  private gatherWindow(before: number): void {
    const { work } = this.compiled;
    const kind = work.windowKind[before];
    if (kind === NO_WINDOW) return;
    const closes = this.layout.windowEnd(before);
    if (kind === HARD_WINDOW) this.capStart(closes, before);
    else {
      this.softUntil.push(closes);
      this.softExtra.push(work.windowExtra[before]);
      this.softCause.push(before);
    }
  }

  private gatherAfter(stage: number): void {
    const { links } = this.compiled;
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) this.gatherAfterLink(stage, links.outLinks[k]);
  }

  private gatherAfterLink(stage: number, link: number): void {
    const { links } = this.compiled;
    const { layout } = this;
    const after = links.to[link];
    if (layout.isPlaced[after] === 0) return;
    const kind = links.kind[link];
    const target = kind === FINISH_START || kind === START_START ? layout.start[after] : layout.end[after];
    const latest = this.latest(link, target, -links.minGap[link]);
    // A least gap of 0 or more also forbids to come second by the clock.
    const high = links.minGap[link] >= 0 ? Math.min(latest, target) : latest;
    const low = links.maxGap[link] < NEVER ? this.earliest(link, target, -links.maxGap[link]) : -NEVER;
    if (kind === START_START || kind === START_FINISH) {
      this.capStart(high, after);
      this.lowStart = Math.max(this.lowStart, low);
    } else if (links.afterWork[link] === 1) {
      this.capEnd(high, after);
      this.lowEnd = Math.max(this.lowEnd, low);
    } else {
      this.capFinish(high, after);
      this.lowFinish = Math.max(this.lowFinish, low);
    }
    if (kind === FINISH_START && links.afterWork[link] === 0 && !this.paysForWindow(stage, after))
      this.keepWindowOpen(stage, target);
  }

  /** Whether a placed follower is laid out with the extra effort of having missed the stage's soft window. */
  private paysForWindow(stage: number, follower: number): boolean {
    const { layout, compiled } = this;
    if (compiled.work.windowKind[stage] !== SOFT_WINDOW) return false;
    let minutes = 0;
    for (let k = layout.spanAt[follower], left = layout.spanCount[follower]; left > 0; k += 2, left -= 1) {
      minutes += layout.spanPool[k + 1] - layout.spanPool[k];
    }
    return minutes > workMinutes(compiled, follower, compiled.work.minutes[follower], layout.crew[follower]);
  }

  /** A follower that already has a place finds the window still open only if this stage does not end too soon. */
  private keepWindowOpen(stage: number, followerStart: number): void {
    const { work } = this.compiled;
    if (work.windowKind[stage] === NO_WINDOW || work.housings[stage].length === 0) return;
    const age = work.windowAge[stage] + 1;
    const housing = this.layout.housing[stage] ?? work.housings[stage][0];
    let low = this.lowEnd;
    let high = followerStart;
    if (low < followerStart - 2 * (age / 1000) - 1440) low = followerStart - 2 * Math.ceil(age / 1000) - 1440;
    while (low < high) {
      const middle = Math.floor((low + high) / 2);
      if (this.fitter.curedBy(stage, housing, middle, age) > followerStart) high = middle;
      else low = middle + 1;
    }
    this.lowEnd = Math.max(this.lowEnd, low);
  }

  /** Where this stage lets a hold go, it has to end before somebody else's turn in that bay. */
  private gatherHolds(stage: number): void {
    const { work, bays } = this.compiled;
    const { layout } = this;
    for (const holder of bays.frees[stage]) {
      const housing = layout.housing[holder];
      if (layout.isPlaced[holder] === 0 || !housing) continue;
      for (let k = 0; k < housing.length; k += 1) {
        const place = work.placeOf[holder] + k;
        if (housing[k] < 0 || work.placeHold[place] !== HOLD_UNTIL || work.placeUntil[place] !== stage) continue;
        const over = layout.bays[housing[k]].firstOver(layout.start[holder]);
        if (over >= this.highEnd) continue;
        this.capEnd(over, holder);
        this.highEndRetry = layout.bays[housing[k]].overUntil(over);
      }
    }
  }

  private capStart(high: number, cause: number): void {
    if (high >= this.highStart) return;
    this.highStart = high;
    this.highStartCause = cause;
  }

  private capEnd(high: number, cause: number): void {
    if (high >= this.highEnd) return;
    this.highEnd = high;
    this.highEndCause = cause;
    this.highEndRetry = 0;
  }

  private capFinish(high: number, cause: number): void {
    if (high >= this.highFinish) return;
    this.highFinish = high;
    this.highFinishCause = cause;
  }

  private firstEnd(link: number, before: number): number {
    const { links } = this.compiled;
    const kind = links.kind[link];
    if (kind === START_START || kind === START_FINISH) return this.layout.start[before];
    return links.afterWork[link] === 1 ? this.layout.end[before] : this.layout.finish[before];
  }

  private earliest(link: number, from: number, gap: number): number {
    return this.compiled.links.isWorking[link] === 1 ? this.compiled.workingClock.earliestAfter(from, gap) : from + gap;
  }

  private latest(link: number, from: number, gap: number): number {
    return this.compiled.links.isWorking[link] === 1 ? this.compiled.workingClock.latestAfter(from, gap) : from + gap;
  }
}

/** Whether the search may lay a stage elsewhere. */
export function isMovable(compiled: Compiled, stage: number): boolean {
  return compiled.work.fixity[stage] === MOVABLE;
}
