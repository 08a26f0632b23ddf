import { type Calendar, NEVER } from './calendar';
import { CLOCK, type Compiled, type Crew, FREE, HOLD_DWELL, HOLD_UNTIL, SESSION } from './compiled';
import { curedBy } from './cured-by';
import { type Fit, type Layout, pushSpan } from './layout';
import { ReadyTimes } from './ready-times';

/** A `free` stage is not split into pieces shorter than this, but for its last. In minutes. */
const LEAST_PIECE = 30;

/** What a placement must not come before, who does it and where. Instants are minutes from the horizon's start. */
export interface Ask {
  stage: number;
  crew: Crew | null;
  housing: Int32Array | null;
  /** Minutes of work for this crew, extras for missed windows included. */
  minutes: number;
  lowStart: number;
  lowEnd: number;
  lowFinish: number;
  /** No start after this one is of use. */
  lastStart: number;
  /** Whether overtime may be worked. */
  overtime: boolean;
}

/** What a fit may overlook where a manager's word leaves no room: nothing; what is in the bays; other work too; calendars as well. */
export type Leniency = 'none' | 'bays' | 'other-work' | 'calendars';

/**
 * Finds the first time at which one stage fits beside what is laid out already, for one crew and one set of bays: serial
 * generation's inner step (Kelley 1963), on interval calendars. Each clash moves the start past what it clashed with, so the
 * search only goes forward and ends with the horizon.
 */
export class Fitter {
  leniency: Leniency = 'none';
  private readonly ready = new ReadyTimes();
  private readonly compiled: Compiled;
  private calendars: (Calendar | null)[] = [];
  private calendarCount = 0;
  /** Set by the span builders: the start found, and the end. */
  private from = 0;
  private until = 0;

  constructor(private readonly layout: Layout) {
    this.compiled = layout.compiled;
  }

  /** Fits a stage as early as may be; false where it fits nowhere before `lastStart` and the horizon's end. */
  fit(ask: Ask, out: Fit): boolean {
    this.gatherCalendars(ask);
    let t = ask.lowStart;
    while (t <= ask.lastStart) {
      if (!this.buildWork(ask, t, out) || this.until > this.compiled.horizonMinutes || this.from > ask.lastStart)
        return false;
      const finish = this.dwellEnd(ask, this.until);
      const retry = this.nextTry(ask, this.from, this.until, finish);
      if (retry < 0) {
        out.start = this.from;
        out.end = this.until;
        out.finish = finish;
        return true;
      }
      if (retry >= NEVER) return false;
      t = Math.max(retry, this.from + 1);
    }
    return false;
  }

  /** The crew's index where what is known of its free time applies to the ask; else -1. */
  private crewKnown(ask: Ask): number {
    if (!ask.crew || ask.overtime || this.leniency !== 'none' || ask.minutes === 0 || ask.minutes >= NEVER) return -1;
    return this.compiled.work.continuity[ask.stage] === CLOCK ? -1 : ask.crew.index;
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

  /** The first instant from `low` on at which bays have room for a stage to begin and work for at least so many minutes. */
  bayFreeFrom(stage: number, housing: Int32Array, minutes: number, low: number): number {
    const { placeOf, placeUnits } = this.compiled.work;
    let t = low;
    for (let settled = false; !settled && t < NEVER;) {
      settled = true;
      for (let k = 0; k < housing.length; k += 1) {
        const until = this.layout.bays[housing[k]].clashEnd(t, t + minutes, placeUnits[placeOf[stage] + k]);
        if (until <= t) continue;
        t = until;
        settled = false;
      }
    }
    return t;
  }

  private calendarOf(maker: number, overtime: boolean): Calendar {
    const { ordinary, extended } = this.compiled.makers;
    return overtime ? extended[maker] : ordinary[maker];
  }

  /** The calendars that the work must lie in: the crew's first, then the bays' opening hours. */
  private gatherCalendars(ask: Ask): void {
    this.calendarCount = 0;
    if (this.leniency === 'calendars') return;
    if (ask.crew)
      for (const maker of ask.crew.makers) this.calendars[this.calendarCount++] = this.calendarOf(maker, ask.overtime);
    if (!ask.housing) return;
    for (const bay of ask.housing) {
      const open = bay >= 0 ? this.compiled.bays.open[bay] : null;
      if (open) this.calendars[this.calendarCount++] = open;
    }
  }

  /** Builds the work from `t` on by the stage's continuity; false where the calendars end first. */
  private buildWork(ask: Ask, t: number, out: Fit): boolean {
    out.spanCount = 0;
    if (ask.minutes === 0) {
      this.from = t;
      this.until = t;
      return true;
    }
    if (ask.minutes >= NEVER) return false;
    const continuity = this.compiled.work.continuity[ask.stage];
    if (continuity === SESSION || continuity === CLOCK || this.calendarCount === 0)
      return this.buildSession(ask, t, out);
    return continuity === FREE ? this.buildFree(ask, t, out) : this.buildShifts(ask, t, out);
  }

  private buildSession(ask: Ask, from: number, out: Fit): boolean {
    let t = from;
    for (let settled = false; !settled;) {
      const before = t;
      for (let k = 0; k < this.calendarCount; k += 1) t = nextStretch(this.calendars[k] as Calendar, t, ask.minutes);
      if (t >= NEVER || t > ask.lastStart) return false;
      const booked = this.bookingOver(ask, t, t + ask.minutes);
      if (booked > t) t = booked;
      settled = t === before;
    }
    this.from = t;
    this.until = t + ask.minutes;
    pushSpan(out, t, this.until);
    return true;
  }

  /** The end of the longest-lasting booking of the crew that meets a stretch; -1 where none does. */
  private bookingOver(ask: Ask, start: number, end: number): number {
    if (!ask.crew || this.leniency === 'other-work' || this.leniency === 'calendars') return -1;
    const { makers } = ask.crew;
    let until = -1;
    for (let k = 0; k < makers.length; k += 1) {
      const bookings = this.layout.bookings[makers[k]];
      const i = bookings.indexAt(start);
      if (i < bookings.count && bookings.starts[i] < end && bookings.ends[i] > until) until = bookings.ends[i];
    }
    return until;
  }

  private buildShifts(ask: Ask, from: number, out: Fit): boolean {
    let at = from;
    let left = ask.minutes;
    while (left > 0) {
      const start = this.nextTogether(at);
      if (start >= NEVER || (left === ask.minutes && start > ask.lastStart)) return false;
      const end = Math.min(this.togetherUntil(start), start + left);
      const booked = this.bookingOver(ask, start, end);
      if (booked >= 0) {
        // A shift is not left half way: the whole stage begins after what it met.
        out.spanCount = 0;
        left = ask.minutes;
        at = booked;
        continue;
      }
      pushSpan(out, start, end);
      left -= end - start;
      at = end;
    }
    this.from = out.spans[0];
    this.until = at;
    return true;
  }

  private buildFree(ask: Ask, from: number, out: Fit): boolean {
    let at = from;
    let left = ask.minutes;
    while (left > 0) {
      const start = this.nextTogether(at);
      if (start >= NEVER || (left === ask.minutes && start > ask.lastStart)) return false;
      let end = Math.min(this.togetherUntil(start), start + left);
      const booked = this.bookingOver(ask, start, end);
      if (booked >= 0) end = Math.min(end, this.firstBookingStart(ask, start));
      if (end - start < Math.min(left, LEAST_PIECE)) {
        at = booked >= 0 && end <= start ? booked : Math.max(end, start + 1);
        continue;
      }
      pushSpan(out, start, end);
      left -= end - start;
      at = end;
    }
    this.from = out.spans[0];
    this.until = at;
    return true;
  }

  private firstBookingStart(ask: Ask, from: number): number {
    let first = NEVER;
    if (ask.crew)
      for (const maker of ask.crew.makers) first = Math.min(first, this.layout.bookings[maker].nextStart(from));
    return first;
  }

  /** The first minute from `t` on that lies in every calendar. */
  private nextTogether(t: number): number {
    let at = t;
    for (let k = 0, agreed = 0; agreed < this.calendarCount; k = (k + 1) % this.calendarCount) {
      const calendar = this.calendars[k] as Calendar;
      const i = calendar.indexAt(at);
      if (i >= calendar.count) return NEVER;
      if (calendar.starts[i] > at) {
        at = calendar.starts[i];
        agreed = 1;
      } else agreed += 1;
    }
    return at;
  }

  /** How long every calendar lasts from a minute that lies in all of them. */
  private togetherUntil(at: number): number {
    let end = NEVER;
    for (let k = 0; k < this.calendarCount; k += 1) {
      const calendar = this.calendars[k] as Calendar;
      end = Math.min(end, calendar.ends[calendar.indexAt(at)]);
    }
    return end;
  }
}

/** The first start from `t` on with `minutes` inside one stretch of a calendar; NEVER where there is none. */
function nextStretch(calendar: Calendar, t: number, minutes: number): number {
  for (let i = calendar.indexAt(t); i < calendar.count; i += 1) {
    const start = calendar.starts[i] > t ? calendar.starts[i] : t;
    if (calendar.ends[i] - start >= minutes) return start;
  }
  return NEVER;
}
