import type { Minute, Span } from '../time/span';

const MINUTES_PER_HOUR = 60;

/**
 * The first whole hour at or after an instant at which the studio is at work, so that something can be handed over; the start of a
 * working span counts, whole hour or not. Null where the working time ends before. `workingTime` is sorted and disjoint.
 */
export function handOverFrom(finish: Minute, workingTime: readonly Span[]): Minute | null {
  const hour = Math.ceil(finish / MINUTES_PER_HOUR) * MINUTES_PER_HOUR;
  const span = workingTime.find(({ end }) => end >= hour);
  return span ? Math.max(hour, span.start) : null;
}
