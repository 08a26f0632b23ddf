import type { Ask, Leniency } from './ask';
import { type Calendar, NEVER } from './calendar';
import { type Compiled, HOLD_DWELL, HOLD_UNTIL, HOLD_WORK } from './compiled';
import { curedBy } from './cured-by';
import type { Fit, Layout } from './layout';
import { WorkBuilder } from './work-builder';

/**
 * Finds the first time at which one stage fits beside what is laid out already, for one crew and one set of bays: serial
 * generation's inner step (Kelley 1963), on interval calendars. Each clash moves the start past what it clashed with, so the
 * search only goes forward and ends with the horizon.
 */
export class Fitter {
  private readonly compiled: Compiled;
  private readonly builder: WorkBuilder;

  constructor(private readonly layout: Layout) {
    this.compiled = layout.compiled;
    this.builder = new WorkBuilder(layout);
  }

  get leniency(): Leniency {
    return this.builder.leniency;
  }

  set leniency(leniency: Leniency) {
    this.builder.leniency = leniency;
  }

  /** Fits a stage as early as may be; false where it fits nowhere before `lastStart` and the horizon's end. */
  fit(ask: Ask, out: Fit): boolean {
    const { builder } = this;
    builder.prepare(ask);
    let t = ask.lowStart;
    while (t <= ask.lastStart) {
      if (!builder.build(ask, t, out) || builder.until > this.compiled.horizonMinutes) return false;
      const { from, until } = builder;
      if (from > ask.lastStart || until > ask.lastEnd) return false;
      const finish = this.dwellEnd(ask, until);
      const retry = this.nextTry(ask, from, until, finish);
      if (retry < 0) {
        out.start = from;
        out.end = until;
        out.finish = finish;
        return true;
      }
      if (retry >= NEVER) return false;
      t = Math.max(retry, from + 1);
    }
    return false;
  }

  /** When a stage's dwell would end after work that ends at an instant, where it is housed. */
  dwellEnd(ask: Pick<Ask, 'stage' | 'housing'>, end: number): number {
    return this.curedBy(ask.stage, ask.housing, end, this.compiled.work.dwellAge[ask.stage]);
  }

  /** The first minute by which an age is gained after `end` where the stage dwells. */
  curedBy(stage: number, housing: Int32Array | null, end: number, age: number): number {
    return curedBy(this.compiled, stage, housing, end, age);
  }

  /** -1 where all but the work itself holds too; else the next start worth trying. */
  private nextTry(ask: Ask, start: number, end: number, finish: number): number {
    if (finish >= NEVER) return NEVER;
    const late = Math.max(ask.lowEnd - end, ask.lowFinish - finish);
    if (late > 0) return start + late;
    const unattended = this.leniency === 'calendars' ? 0 : this.unattendedMinutes(ask, end);
    if (unattended > 0) return start + unattended;
    if (this.leniency !== 'none' || !ask.housing) return -1;
    return this.bayClash(ask, start, end, finish);
  }

  /** Minutes by which the end has to move for somebody's shift to reach over the attended time; 0 where one does. */
  private unattendedMinutes(ask: Ask, end: number): number {
    const attended = this.compiled.work.attended[ask.stage];
    if (attended === 0 || !ask.crew) return 0;
    let least = NEVER;
    for (const maker of ask.crew.makers) {
      const calendar = this.calendarOf(maker, ask.overtime);
      const i = calendar.indexAt(end);
      if (i >= calendar.count) continue;
      if (calendar.starts[i] <= end && calendar.ends[i] >= end + attended) return 0;
      // The work ends exactly where a shift starts, or inside one that is too short: it has to end in a later one.
      least = Math.min(least, calendar.starts[i] > end ? calendar.starts[i] - end : calendar.ends[i] - end + 1);
    }
    return least;
  }

  private bayClash(ask: Ask, start: number, end: number, finish: number): number {
    const { placeOf, placeUnits, placeHold, placeUntil } = this.compiled.work;
    const housing = ask.housing as Int32Array;
    let retry = -1;
    for (let k = 0; k < housing.length; k += 1) {
      const place = placeOf[ask.stage] + k;
      let until = end;
      if (placeHold[place] === HOLD_DWELL) until = finish;
      if (placeHold[place] === HOLD_UNTIL) {
        const last = placeUntil[place];
        // Until the stage that lets go has a place, its own dwell is the least that a hold will last.
        until = last >= 0 && this.layout.isPlaced[last] === 1 ? Math.max(end, this.layout.end[last]) : finish;
      }
      retry = Math.max(retry, this.layout.bays[housing[k]].clashEnd(start, until, placeUnits[place]));
    }
    return retry;
  }

  /**
   * An instant before which no crew of a stage can begin, for the room that its bays have from `low` on: time for so many minutes
   * of work when anyone is there, and for the dwell.
   */
  bayFreeFrom(ask: Ask, minutes: number, dwell: number, low: number): number {
    const { work } = this.compiled;
    const { stage, housing } = ask;
    if (housing === null || housing.length === 0) return low;
    const time = minutes > 0 ? this.builder.times.ofAny(stage, ask.overtime, housing) : null;
    let t = low;
    for (let settled = false; !settled && t < NEVER;) {
      settled = true;
      const start = time ? time.nextFrom(t) : t;
      const end = time ? time.endOf(t, minutes) : t + minutes;
      if (start >= NEVER || end >= NEVER) return NEVER;
      t = start;
      for (let k = 0; k < housing.length; k += 1) {
        const place = work.placeOf[stage] + k;
        const until = work.placeHold[place] === HOLD_WORK ? end : end + dwell;
        const clash = this.layout.bays[housing[k]].clashEnd(start, until, work.placeUnits[place]);
        if (clash <= t) continue;
        t = clash;
        settled = false;
      }
    }
    return t;
  }

  private calendarOf(maker: number, overtime: boolean): Calendar {
    const { ordinary, extended } = this.compiled.makers;
    return overtime ? extended[maker] : ordinary[maker];
  }
}
