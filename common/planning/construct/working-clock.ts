import type { Calendar } from './calendar';
import { NEVER } from './calendar';

/** Adds working minutes to instants by the studio's own calendar. */
export class WorkingClock {
  constructor(private readonly calendar: Calendar) {}

  /** Working minutes from the horizon's start until an instant. */
  minutesUntil(instant: number): number {
    const { calendar } = this;
    const i = calendar.indexAt(instant);
    if (i >= calendar.count) return calendar.total;
    return calendar.before[i] + Math.max(0, instant - calendar.starts[i]);
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
    const { before, starts, total } = this.calendar;
    if (minutes <= 0) return -NEVER;
    if (minutes > total) return NEVER;
    let low = 0;
    let high = before.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (before[middle] < minutes) low = middle;
      else high = middle - 1;
    }
    return starts[low] + minutes - before[low];
  }
}
