import { type Calendar, NEVER } from './calendar';
import { CommonTime } from './common-time';
import { CLOCK, FREE, SESSION } from './compiled';
import type { Ask, Leniency } from './ask';
import { type Fit, type Layout, pushSpan } from './layout';

/** A `free` stage is not split into pieces shorter than this, but for its last. In minutes. */
const LEAST_PIECE = 30;

/**
 * Finds the first time from an instant on at which a stage's work can be done by its crew beside what they are booked for, by
 * the stage's continuity. Looks into one calendar that the crew and its bays have in common, with minutes counted up along it,
 * so that work over many shifts is reckoned and not walked through.
 */
export class WorkBuilder {
  leniency: Leniency = 'none';
  /** Set by `build`: the start found, and the end. */
  from = 0;
  until = 0;
  readonly times: CommonTime;
  private common: Calendar | null = null;

  constructor(private readonly layout: Layout) {
    this.times = new CommonTime(layout.compiled);
  }

  /** Makes ready for builds of one ask. */
  prepare(ask: Ask): void {
    this.common = this.leniency === 'calendars' ? null : this.times.of(ask.crew, ask.overtime, ask.housing);
  }

  /** Builds the work from `t` on; false where the calendars end first, or where it would be of no use. */
  build(ask: Ask, t: number, out: Fit): boolean {
    out.spanCount = 0;
    if (ask.minutes === 0) {
      this.from = t;
      this.until = t;
      return true;
    }
    if (ask.minutes >= NEVER) return false;
    const continuity = this.layout.compiled.work.continuity[ask.stage];
    const { common } = this;
    if (continuity === SESSION || continuity === CLOCK || common === null) return this.buildSession(ask, t, out);
    return continuity === FREE ? this.buildFree(ask, common, t, out) : this.buildShifts(ask, common, t, out);
  }

  private buildSession(ask: Ask, from: number, out: Fit): boolean {
    const { common } = this;
    for (let t = from; ;) {
      if (common) t = nextStretch(common, t, ask.minutes);
      if (t >= NEVER || t > ask.lastStart || t + ask.minutes > ask.lastEnd) return false;
      const booked = this.bookedUntil(ask, null, t, t + ask.minutes);
      if (booked < 0) {
        this.from = t;
        this.until = t + ask.minutes;
        pushSpan(out, t, this.until);
        return true;
      }
      t = booked;
    }
  }

  private buildShifts(ask: Ask, common: Calendar, from: number, out: Fit): boolean {
    const { starts, ends, before, count } = common;
    for (let t = from; ;) {
      const first = common.indexAt(t);
      if (first >= count) return false;
      const start = starts[first] > t ? starts[first] : t;
      if (start > ask.lastStart) return false;
      const target = before[first] + (start - starts[first]) + ask.minutes;
      if (target > common.total) return false;
      let last = first;
      while (last + 1 < count && before[last + 1] < target) last += 1;
      const end = starts[last] + target - before[last];
      if (end > ask.lastEnd) return false;
      // A shift is not left half way: the whole stage begins after what it meets.
      const booked = this.bookedUntil(ask, common, start, end);
      if (booked < 0) {
        for (let i = first; i <= last; i += 1)
          pushSpan(out, i === first ? start : starts[i], i === last ? end : ends[i]);
        this.from = start;
        this.until = end;
        return true;
      }
      t = booked;
    }
  }

  /**
   * The end of the last booking of the crew that meets work from `start` to `end`, inside the common time where one is given; -1
   * where none does. No start from `start` until then can be of use: work that begins later ends later too.
   */
  private bookedUntil(ask: Ask, common: Calendar | null, start: number, end: number): number {
    if (!ask.crew || this.leniency === 'other-work' || this.leniency === 'calendars') return -1;
    const { makers } = ask.crew;
    let until = -1;
    for (let k = 0; k < makers.length; k += 1) {
      const bookings = this.layout.bookings[makers[k]];
      for (let i = bookings.lastBefore(end); i >= 0 && bookings.ends[i] > start; i -= 1) {
        if (bookings.ends[i] <= until) break;
        // What one does while another is away, or while the bay is closed, is in nobody's way.
        if (common && !hasTime(common, Math.max(start, bookings.starts[i]), Math.min(end, bookings.ends[i]))) continue;
        until = bookings.ends[i];
        break;
      }
    }
    return until;
  }

  private buildFree(ask: Ask, common: Calendar, from: number, out: Fit): boolean {
    let at = from;
    let left = ask.minutes;
    while (left > 0) {
      const i = common.indexAt(at);
      if (i >= common.count) return false;
      const start = common.starts[i] > at ? common.starts[i] : at;
      if (start + left > ask.lastEnd || (left === ask.minutes && start > ask.lastStart)) return false;
      let end = Math.min(common.ends[i], start + left);
      const booked = this.firstBookedUntil(ask, start, end);
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

  /** The end of the longest-lasting of each maker's first bookings that meet a stretch; -1 where none does. */
  private firstBookedUntil(ask: Ask, start: number, end: number): number {
    if (!ask.crew || this.leniency === 'other-work') return -1;
    const { makers } = ask.crew;
    let until = -1;
    for (let k = 0; k < makers.length; k += 1) {
      const bookings = this.layout.bookings[makers[k]];
      const i = bookings.indexAt(start);
      if (i < bookings.count && bookings.starts[i] < end && bookings.ends[i] > until) until = bookings.ends[i];
    }
    return until;
  }

  private firstBookingStart(ask: Ask, from: number): number {
    let first = NEVER;
    if (ask.crew)
      for (const maker of ask.crew.makers) first = Math.min(first, this.layout.bookings[maker].nextStart(from));
    return first;
  }
}

function hasTime(calendar: Calendar, start: number, end: number): boolean {
  const i = calendar.indexAt(start);
  return i < calendar.count && calendar.starts[i] < end;
}

/** The first start from `t` on with `minutes` inside one stretch of a calendar; NEVER where there is none. */
function nextStretch(calendar: Calendar, t: number, minutes: number): number {
  const { starts, ends, count } = calendar;
  for (let i = calendar.indexAt(t); i < count; i += 1) {
    const start = starts[i] > t ? starts[i] : t;
    if (ends[i] - start >= minutes) return start;
  }
  return NEVER;
}
