import type { Span } from '../../time/span';

/** Later than any instant in a compiled problem, yet with room to add minutes to it. In minutes. */
export const NEVER = 0x3fffffff;

const BUCKET_BITS = 9;

/** When something is there, as disjoint stretches that never meet; instants count from the horizon's start. */
export class Calendar {
  readonly starts: Int32Array;
  readonly ends: Int32Array;
  readonly count: number;
  /** For each 512 minutes, the first stretch that ends after them: finding one costs no search. */
  private readonly buckets: Int32Array;

  /** Takes arrays of which the first `count` entries are disjoint, in order and inside the horizon, and keeps them. */
  private constructor(starts: Int32Array, ends: Int32Array, count: number, horizonMinutes: number) {
    this.starts = starts;
    this.ends = ends;
    this.count = count;
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

  /** The first stretch that ends after an instant; `count` where none does. */
  indexAt(instant: number): number {
    if (instant < 0) return 0;
    const bucket = instant >> BUCKET_BITS;
    if (bucket >= this.buckets.length) return this.count;
    let i = this.buckets[bucket];
    while (i < this.count && this.ends[i] <= instant) i += 1;
    return i;
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
