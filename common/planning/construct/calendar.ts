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
    let next = 0;
    for (let i = 0; i < this.count; i += 1) {
      let from = this.starts[i];
      const until = this.ends[i];
      while (next < away.length && away[next].end - origin <= from) next += 1;
      for (let k = next; k < away.length && away[k].start - origin < until; k += 1) {
        const gap = away[k].start - origin;
        if (gap > from) {
          starts[count] = from;
          ends[count] = gap;
          count += 1;
        }
        from = Math.max(from, away[k].end - origin);
      }
      if (from >= until) continue;
      starts[count] = from;
      ends[count] = until;
      count += 1;
    }
    return new Calendar(starts, ends, count, horizonMinutes);
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
