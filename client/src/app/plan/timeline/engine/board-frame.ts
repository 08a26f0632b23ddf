import type { WorkingPlanView } from '@common/contract';
import { dayOfInstant, startOfDay, addDays } from '@common/time/calendar-day';
import type { Span } from '@common/time/span';
import { workStart } from './tape';

const DAYS_BEFORE = 1;
const DAYS_AFTER = 10;
/** History further back than this is not drawn: it is in the studio's books. */
const MOST_DAYS_BACK = 21;

/**
 * From when to when the wall goes: from the day before the first thing that is still of interest to some days after the last, in
 * whole days of the studio.
 */
export function boardFrame({
  problem,
  plan,
  now,
  zone,
}: Pick<WorkingPlanView, 'problem' | 'plan' | 'now' | 'zone'>): Span {
  const starts = plan.placements.filter((placement) => placement.work.length > 0).map(workStart);
  const ends = plan.placements.map((placement) => placement.dwellEnd);
  const dates = problem.keyDates.map((date) => date.at);
  const oldest = addDays(dayOfInstant(now, zone), -MOST_DAYS_BACK);
  const first = addDays(dayOfInstant(lowest([now, ...starts]), zone), -DAYS_BEFORE);
  const last = addDays(dayOfInstant(highest([now, ...ends, ...dates]), zone), DAYS_AFTER);
  return { start: startOfDay(first < oldest ? oldest : first, zone), end: startOfDay(last, zone) };
}

function lowest(minutes: readonly number[]): number {
  return minutes.reduce((low, minute) => Math.min(low, minute), Infinity);
}

function highest(minutes: readonly number[]): number {
  return minutes.reduce((high, minute) => Math.max(high, minute), -Infinity);
}
