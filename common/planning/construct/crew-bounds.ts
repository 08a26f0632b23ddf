import { type Calendar, NEVER } from './calendar';
import { CLOCK, type Compiled, type Crew, SESSION } from './compiled';
import type { Layout } from './layout';
import { workMinutes } from './work-minutes';

/**
 * How soon each crew of a stage could be done at the very best, so that the likeliest is fitted first and most others need not be
 * fitted at all. A bound looks only at when each maker is first free and at one calendar; it is never above the true end.
 */
export class CrewBounds {
  /** Minutes of bare work by crew, of the stage asked about last. */
  minutes = new Int32Array(64);
  /** For each crew: no start before this instant; NEVER where it has none. */
  start = new Int32Array(64);
  /** For each crew: no end before this instant. */
  end = new Int32Array(64);
  private readonly compiled: Compiled;
  /** When each maker is first free from the instant asked about, where the stamp is the present one. */
  private readonly free: Int32Array;
  private readonly stamp: Int32Array;
  private present = 0;

  constructor(private readonly layout: Layout) {
    this.compiled = layout.compiled;
    this.free = new Int32Array(this.compiled.makerIds.length);
    this.stamp = new Int32Array(this.compiled.makerIds.length);
  }

  /** Works out the minutes of each crew for a stage; the fewest of all, or the bare effort where nobody is needed. */
  measure(stage: number, crews: readonly Crew[]): number {
    const effort = this.compiled.work.minutes[stage];
    if (this.minutes.length < crews.length) {
      this.minutes = new Int32Array(2 * crews.length);
      this.start = new Int32Array(2 * crews.length);
      this.end = new Int32Array(2 * crews.length);
    }
    let fewest = crews.length === 0 ? effort : NEVER;
    for (let c = 0; c < crews.length; c += 1) {
      const minutes = workMinutes(this.compiled, stage, effort, crews[c]);
      this.minutes[c] = minutes;
      if (minutes < fewest) fewest = minutes;
    }
    return fewest;
  }

  /** Bounds every measured crew's start and end, from an instant on. */
  bound(stage: number, crews: readonly Crew[], from: number, overtime: boolean): void {
    this.present += 1;
    const { makers, work } = this.compiled;
    const calendars = overtime ? makers.extended : makers.ordinary;
    const isUnbroken = work.continuity[stage] === CLOCK || work.continuity[stage] === SESSION;
    for (let c = 0; c < crews.length; c += 1) {
      const seats = crews[c].makers;
      const minutes = this.minutes[c];
      let start = from;
      if (minutes > 0)
        for (let k = 0; k < seats.length; k += 1) start = Math.max(start, this.freeFrom(seats[k], calendars, from));
      this.start[c] = start;
      this.end[c] =
        isUnbroken || start >= NEVER || minutes === 0 || seats.length === 0
          ? Math.min(NEVER, start + minutes)
          : calendars[seats[0]].endOf(start, minutes);
    }
  }

  /** The first minute from an instant on at which a maker is on shift and not booked. */
  private freeFrom(maker: number, calendars: readonly Calendar[], from: number): number {
    if (this.stamp[maker] === this.present) return this.free[maker];
    const calendar = calendars[maker];
    const bookings = this.layout.bookings[maker];
    let t = from;
    for (let isFree = false; !isFree;) {
      const i = calendar.indexAt(t);
      if (i >= calendar.count) {
        t = NEVER;
        break;
      }
      if (calendar.starts[i] > t) t = calendar.starts[i];
      const b = bookings.indexAt(t);
      isFree = b >= bookings.count || bookings.starts[b] > t;
      if (!isFree) t = bookings.ends[b];
    }
    this.stamp[maker] = this.present;
    this.free[maker] = t;
    return t;
  }
}
