import type { Minute, Span } from '../../time/span';

/** Measures working time over sorted, disjoint spans: how far a number of working minutes reaches, forwards and backwards. */
export class WorkingMeasure {
  private readonly starts: Minute[] = [];
  private readonly ends: Minute[] = [];
  /** Working minutes before the span at the same position; one more entry for the total. */
  private readonly before: number[] = [0];

  constructor(spans: readonly Span[]) {
    for (const { start, end } of spans) {
      if (end <= start) continue;
      const last = this.ends.length - 1;
      if (last >= 0 && start <= this.ends[last]) this.ends[last] = Math.max(end, this.ends[last]);
      else {
        this.starts.push(start);
        this.ends.push(end);
      }
    }
    for (let k = 0; k < this.starts.length; k++) this.before.push(this.before[k] + this.ends[k] - this.starts[k]);
  }

  /** All working minutes. */
  get totalMinutes(): number {
    return this.before[this.starts.length];
  }

  /** Working minutes before an instant. */
  minutesBefore(at: Minute): number {
    const k = this.firstEndingAfter(at);
    return k === this.starts.length ? this.totalMinutes : this.before[k] + Math.max(0, at - this.starts[k]);
  }

  /** Working minutes from one instant to a later one. */
  minutesBetween(from: Minute, to: Minute): number {
    return Math.max(0, this.minutesBefore(to) - this.minutesBefore(from));
  }

  /** The earliest instant, not before `from`, by which `minutes` have been worked; Infinity if that never happens. */
  reach(from: Minute, minutes: number): Minute {
    if (minutes <= 0) return from;
    const wanted = this.minutesBefore(from) + minutes;
    if (wanted > this.totalMinutes) return Infinity;
    const k = this.firstWith(wanted);
    return this.starts[k] + wanted - this.before[k];
  }

  /** The latest instant, not after `to`, from which `minutes` are still worked by `to`; -Infinity if there is none. */
  retreat(to: Minute, minutes: number): Minute {
    if (minutes <= 0) return to;
    const wanted = this.minutesBefore(to) - minutes;
    if (wanted < 0) return -Infinity;
    const k = this.firstEndingWith(wanted);
    return this.starts[k] + wanted - this.before[k];
  }

  /** The earliest instant by which all but `minutes` of what is worked before `to` have been worked; at most `to`. */
  earliestWithin(to: Minute, minutes: number): Minute {
    const wanted = this.minutesBefore(to) - minutes;
    if (wanted <= 0) return -Infinity;
    const k = this.firstWith(wanted);
    return Math.min(to, this.starts[k] + wanted - this.before[k]);
  }

  /** The latest instant until which no more than `minutes` are worked from `from` on; at least `from`. */
  latestWithin(from: Minute, minutes: number): Minute {
    const wanted = this.minutesBefore(from) + minutes;
    if (wanted >= this.totalMinutes) return Infinity;
    const k = this.firstEndingWith(wanted);
    return Math.max(from, this.starts[k] + wanted - this.before[k]);
  }

  /** The earliest instant from `from` on at which work may begin and go on for `minutes` without a break; Infinity if never. */
  unbrokenFrom(from: Minute, minutes: number): Minute {
    for (let k = this.firstEndingAfter(from); k < this.starts.length; k++) {
      const start = Math.max(from, this.starts[k]);
      if (start + minutes <= this.ends[k]) return start;
    }
    return Infinity;
  }

  /** The latest instant by which an unbroken stretch of `minutes` that ends not after `to` must begin; -Infinity if none fits. */
  unbrokenBefore(to: Minute, minutes: number): Minute {
    for (let k = this.starts.length - 1; k >= 0; k--) {
      const start = Math.min(to, this.ends[k]) - minutes;
      if (start >= this.starts[k]) return start;
    }
    return -Infinity;
  }

  private firstEndingAfter(at: Minute): number {
    return firstTrue(this.starts.length, (k) => this.ends[k] > at);
  }

  private firstWith(worked: number): number {
    return firstTrue(this.starts.length, (k) => this.before[k + 1] >= worked);
  }

  private firstEndingWith(worked: number): number {
    return firstTrue(this.starts.length, (k) => this.before[k + 1] > worked);
  }
}

/** The first index below `length` for which a condition holds that stays true once it is; `length` if none. */
export function firstTrue(length: number, holds: (index: number) => boolean): number {
  let low = 0;
  let high = length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (holds(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
