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

  constructor(spans: readonly Span[], origin: number, horizonMinutes: number) {
    const merged = mergeTouching(spans, origin, horizonMinutes);
    this.count = merged.length;
    this.starts = Int32Array.from(merged, (span) => span.start);
    this.ends = Int32Array.from(merged, (span) => span.end);
    this.buckets = new Int32Array((horizonMinutes >> BUCKET_BITS) + 2);
    for (let bucket = 0, i = 0; bucket < this.buckets.length; bucket += 1) {
      while (i < this.count && this.ends[i] <= bucket << BUCKET_BITS) i += 1;
      this.buckets[bucket] = i;
    }
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
