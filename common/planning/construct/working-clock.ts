import type { Calendar } from './calendar';
import { NEVER } from './calendar';

/** Adds working minutes to instants by the studio's own calendar. */
export class WorkingClock {
  private readonly before: Int32Array;
  private readonly total: number;

  constructor(private readonly calendar: Calendar) {
    this.before = new Int32Array(calendar.count);
    let sum = 0;
    for (let i = 0; i < calendar.count; i += 1) {
      this.before[i] = sum;
      sum += calendar.ends[i] - calendar.starts[i];
    }
    this.total = sum;
  }

  /** Working minutes from the horizon's start until an instant. */
  minutesUntil(instant: number): number {
    const { calendar } = this;
    const i = calendar.indexAt(instant);
    if (i >= calendar.count) return this.total;
    return this.before[i] + Math.max(0, instant - calendar.starts[i]);
  }

  /** The first instant with at least `gap` working minutes since `from`, not before `from` where the gap is 0 or more. */
  earliestAfter(from: number, gap: number): number {
    const target = this.minutesUntil(from) + gap;
    if (gap >= 0 && target <= this.minutesUntil(from)) return from;
    return this.firstWith(target);
  }

  /** The last instant with at most `gap` working minutes since `from`. */
  latestAfter(from: number, gap: number): number {
    const target = this.minutesUntil(from) + gap;
    if (target < 0) return -NEVER;
    return this.firstWith(target + 1) - 1;
  }

  private firstWith(minutes: number): number {
    if (minutes <= 0) return -NEVER;
    if (minutes > this.total) return NEVER;
    let low = 0;
    let high = this.before.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.before[middle] < minutes) low = middle;
      else high = middle - 1;
    }
    return this.calendar.starts[low] + minutes - this.before[low];
  }
}
