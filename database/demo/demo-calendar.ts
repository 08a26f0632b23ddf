import { addDays, dayNumber, weekdayOf } from '@common/time/calendar-day';
import { type LocalTime, minuteOfDay } from '@common/time/local-time';
import type { CalendarDay, Minute } from '@common/time/span';
import { instantOfLocal, MINUTES_PER_DAY } from '@common/time/zone';

/** The zone of the demo studio. */
export const DEMO_ZONE = 'Europe/London';

/** Dates of the demo, counted from the anchor: today, whenever it is set up. */
export interface DemoCalendar {
  readonly today: CalendarDay;
  /** The Monday of the anchor's week: what fortnights are counted from. */
  readonly monday: CalendarDay;
  /**
   * The weekday that many Mondays-to-Fridays from today; at a weekend, 0 is the Monday after and −1 the Friday before. So
   * the same work lies ahead whatever day the demo is set up.
   */
  readonly workday: (count: number) => CalendarDay;
  /** A clock reading on such a weekday. */
  readonly at: (count: number, time: LocalTime) => Minute;
}

/** Counts a demo's dates from an anchor day. */
export function demoCalendar(today: CalendarDay): DemoCalendar {
  const workday = (count: number) => workdayFrom(today, count);
  return {
    today,
    monday: addDays(today, 1 - weekdayOf(today)),
    workday,
    at: (count, time) => instantOfLocal(dayNumber(workday(count)) * MINUTES_PER_DAY + minuteOfDay(time), DEMO_ZONE),
  };
}

function workdayFrom(today: CalendarDay, count: number): CalendarDay {
  const weekday = Math.min(weekdayOf(today), 6);
  // At a weekend the count starts on Monday, so going back from it crosses the weekend.
  const monday = addDays(today, 1 - weekdayOf(today));
  const fromMonday = weekday - 1 + count;
  const weeks = Math.floor(fromMonday / 5);
  return addDays(monday, weeks * 7 + (fromMonday - weeks * 5));
}
