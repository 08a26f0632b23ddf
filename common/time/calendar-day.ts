import type { CalendarDay, Minute, Span } from './span';
import { instantOfLocal, localOfInstant, MINUTES_PER_DAY } from './zone';

const MS_PER_DAY = 86_400_000;
const SHAPE = /^\d{4}-\d{2}-\d{2}$/;

/** A run of calendar days: `from` inside, `until` outside. Empty where `until <= from`. */
export interface DayRange {
  readonly from: CalendarDay;
  readonly until: CalendarDay;
}

/** A calendar day with the instants at which it begins and ends in a named zone: 23, 24 or 25 hours in most. */
export interface DaySpan extends Span {
  readonly day: CalendarDay;
}

/** Whether `text` is a day of the Gregorian calendar written `YYYY-MM-DD`; 2026-02-29 is not. */
export function isCalendarDay(text: string): boolean {
  return SHAPE.test(text) && !Number.isNaN(Date.parse(text)) && new Date(text).toISOString().startsWith(text);
}

/** Days since 1970-01-01, which is day 0. */
export function dayNumber(day: CalendarDay): number {
  const number = Date.parse(`${day}T00:00:00Z`) / MS_PER_DAY;
  if (!Number.isInteger(number)) {
    throw new RangeError(`“${day}” is not a calendar day.`);
  }
  return number;
}

/** The calendar day with that number, counted from 1970-01-01. */
export function dayFromNumber(number: number): CalendarDay {
  return new Date(number * MS_PER_DAY).toISOString().slice(0, 10);
}

/** The day `days` later, or earlier where negative. */
export function addDays(day: CalendarDay, days: number): CalendarDay {
  return dayFromNumber(dayNumber(day) + days);
}

/** Days from `from` to `to`; negative where `to` is earlier. */
export function daysBetween(from: CalendarDay, to: CalendarDay): number {
  return dayNumber(to) - dayNumber(from);
}

/** ISO 8601 weekday: 1 for Monday to 7 for Sunday. */
export function weekdayOf(day: CalendarDay): number {
  return ((((dayNumber(day) + 3) % 7) + 7) % 7) + 1;
}

/** The Monday on or before `day`. */
export function mondayOf(day: CalendarDay): CalendarDay {
  return addDays(day, 1 - weekdayOf(day));
}

/** The days of a range, in order; none where it is empty. */
export function daysIn(range: DayRange): readonly CalendarDay[] {
  const first = dayNumber(range.from);
  const count = Math.max(0, dayNumber(range.until) - first);
  return Array.from({ length: count }, (_, index) => dayFromNumber(first + index));
}

/** The calendar day that an instant falls on in `zone`. */
export function dayOfInstant(instant: Minute, zone: string): CalendarDay {
  return dayFromNumber(Math.floor(localOfInstant(instant, zone) / MINUTES_PER_DAY));
}

/** The first instant of a day in `zone`: midnight, or the end of the gap where clocks skip midnight. */
export function startOfDay(day: CalendarDay, zone: string): Minute {
  return instantOfLocal(dayNumber(day) * MINUTES_PER_DAY, zone);
}

/** A day as a span of instants. */
export function daySpan(day: CalendarDay, zone: string): DaySpan {
  return { day, start: startOfDay(day, zone), end: startOfDay(addDays(day, 1), zone) };
}

/** A run of days as one span of instants; empty where the range is. */
export function dayRangeSpan(range: DayRange, zone: string): Span {
  return { start: startOfDay(range.from, zone), end: startOfDay(range.until, zone) };
}

/** Every calendar day of which at least a minute lies inside `frame`, in order, whole: the first may begin before the frame. */
export function daySpansIn(frame: Span, zone: string): readonly DaySpan[] {
  if (frame.end <= frame.start) {
    return [];
  }
  const until = addDays(dayOfInstant(frame.end - 1, zone), 1);
  return daysIn({ from: dayOfInstant(frame.start, zone), until }).map((day) => daySpan(day, zone));
}
