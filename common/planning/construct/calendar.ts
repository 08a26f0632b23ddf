import type { Span } from '../../time/span';

/** Later than any instant in a compiled problem, yet with room to add minutes to it. In minutes. */
export const NEVER = 0x3fffffff;

const BUCKET_BITS = 9;

/** When something is there, as disjoint stretches that never meet; instants count from the horizon's start. */
export class Calendar {
  readonly starts: Int32Array;
  readonly ends: Int32Array;
  readonly count: number;
  /** Minutes in all stretches before each; `total` in all. */
  readonly before: Int32Array;
  readonly total: number;
  /** For each 512 minutes, the first stretch that ends after them: finding one costs no search. */
  private readonly buckets: Int32Array;

  /** Takes arrays of which the first `count` entries are disjoint, in order and inside the horizon, and keeps them. */
  private constructor(
    starts: Int32Array,
    ends: Int32Array,
    count: number,
    private readonly horizonMinutes: number,
  ) {
    this.starts = starts;
    this.ends = ends;
    this.count = count;
    this.before = new Int32Array(count);
    let total = 0;
    for (let i = 0; i < count; i += 1) {
      this.before[i] = total;
      total += ends[i] - starts[i];
    }
    this.total = total;
    this.buckets = new Int32Array((horizonMinutes >> BUCKET_BITS) + 2);
    for (let bucket = 0, i = 0; bucket < this.buckets.length; bucket += 1) {
      while (i < count && ends[i] <= bucket << BUCKET_BITS) i += 1;
      this.buckets[bucket] = i;
    }
  }

  /** A calendar of spans of instants in any order, cut to the horizon. */
  static of(spans: readonly Span[], origin: number, horizonMinutes: number): Calendar {
    const merged = mergeTouching(spans, origin, horizonMinutes);
    const starts = Int32Array.from(merged, (span) => span.start);
    const ends = Int32Array.from(merged, (span) => span.end);
    return new Calendar(starts, ends, merged.length, horizonMinutes);
  }

  /** This calendar less some spans of instants, which are disjoint and in order. Fast: a forecast does it in every draw. */
  less(away: readonly Span[], origin: number, horizonMinutes: number): Calendar {
    const starts = new Int32Array(this.count + away.length);
    const ends = new Int32Array(this.count + away.length);
    let count = 0;
    // The first stretch not looked at yet, and from when on it is left.
    let next = 0;
    let left = 0;
    for (const span of away) {
      const from = span.start - origin;
      const cut = this.indexAt(from);
      count = this.copyTo(starts, ends, count, next, cut, left);
      next = Math.max(next, cut);
      const start = next < this.count ? Math.max(this.starts[next], left) : from;
      if (start < from) {
        starts[count] = start;
        ends[count] = from;
        count += 1;
      }
      left = span.end - origin;
      next = Math.max(next, this.indexAt(left));
    }
    count = this.copyTo(starts, ends, count, next, this.count, left);
    return new Calendar(starts, ends, count, horizonMinutes);
  }

  /** Copies stretches `from..until`, the first of them from `left` on, to where `count` stand already; how many stand then. */
  private copyTo(
    starts: Int32Array,
    ends: Int32Array,
    count: number,
    from: number,
    until: number,
    left: number,
  ): number {
    if (from >= until) return count;
    const [ownStarts, ownEnds] = [this.starts, this.ends];
    let at = count;
    for (let i = from; i < until; i += 1) {
      starts[at] = ownStarts[i];
      ends[at] = ownEnds[i];
      at += 1;
    }
    starts[count] = Math.max(ownStarts[from], left);
    return at;
  }

  /** What at least one of some calendars has; all belong to one horizon. */
  static anyOf(calendars: readonly Calendar[], horizonMinutes: number): Calendar {
    const all = calendars.reduce((sum, calendar) => sum + calendar.count, 0);
    const starts = new Int32Array(all);
    const ends = new Int32Array(all);
    let filled = 0;
    for (const calendar of calendars) {
      starts.set(calendar.starts.subarray(0, calendar.count), filled);
      ends.set(calendar.ends.subarray(0, calendar.count), filled);
      filled += calendar.count;
    }
    starts.sort();
    ends.sort();
    // Between one moment when nobody is there and the next, as many have come as have gone.
    let count = 0;
    for (let i = 0, first = 0; i < all; i += 1) {
      if (i + 1 < all && starts[i + 1] <= ends[i]) continue;
      starts[count] = starts[first];
      ends[count] = ends[i];
      count += 1;
      first = i + 1;
    }
    return new Calendar(starts, ends, count, horizonMinutes);
  }

  /** What this calendar and another have in common. */
  and(other: Calendar): Calendar {
    const most = this.count + other.count;
    const starts = new Int32Array(most);
    const ends = new Int32Array(most);
    let count = 0;
    const [ownStarts, ownEnds, otherStarts, otherEnds] = [this.starts, this.ends, other.starts, other.ends];
    for (let i = 0, j = 0; i < this.count && j < other.count;) {
      const start = ownStarts[i] > otherStarts[j] ? ownStarts[i] : otherStarts[j];
      const isOwnFirst = ownEnds[i] < otherEnds[j];
      const end = isOwnFirst ? ownEnds[i] : otherEnds[j];
      if (start < end) {
        starts[count] = start;
        ends[count] = end;
        count += 1;
      }
      if (isOwnFirst) i += 1;
      else j += 1;
    }
    return new Calendar(starts, ends, count, this.horizonMinutes);
  }

  /** The first stretch that ends after an instant; `count` where none does. */
  indexAt(instant: number): number {
    if (instant < 0) return 0;
    const bucket = instant >> BUCKET_BITS;
    if (bucket >= this.buckets.length) return this.count;
    let i = this.buckets[bucket];
    while (i < this.count && this.ends[i] <= instant) i += 1;
    return i;
  }

  /** The first minute from an instant on that is in the calendar; NEVER where none is. */
  nextFrom(instant: number): number {
    const i = this.indexAt(instant);
    return i >= this.count ? NEVER : Math.max(instant, this.starts[i]);
  }

  /** When so many minutes of this calendar are over that are counted from an instant on; NEVER where there are not so many. */
  endOf(from: number, minutes: number): number {
    const first = this.indexAt(from);
    if (first >= this.count) return NEVER;
    const target = this.before[first] + Math.max(0, from - this.starts[first]) + minutes;
    if (target > this.total) return NEVER;
    let i = first;
    while (i + 1 < this.count && this.before[i + 1] < target) i += 1;
    return this.starts[i] + target - this.before[i];
  }

  /** Whether every minute of a stretch is in the calendar. */
  covers(start: number, end: number): boolean {
    const i = this.indexAt(start);
    return i < this.count && this.starts[i] <= start && this.ends[i] >= end;
  }
}

function mergeTouching(spans: readonly Span[], origin: number, horizonMinutes: number): Span[] {
  const merged: { start: number; end: number }[] = [];
  for (const span of [...spans].sort((a, b) => a.start - b.start)) {
    const start = Math.max(0, span.start - origin);
    const end = Math.min(horizonMinutes, span.end - origin);
    if (end <= start) continue;
    const last = merged[merged.length - 1];
    if (last && start <= last.end) last.end = Math.max(last.end, end);
    else merged.push({ start, end });
  }
  return merged;
}
