import type { DayRange, Pattern } from '@common/contract';
import { availableSpans } from '@common/time/availability';
import { addDays, daySpan } from '@common/time/calendar-day';
import { localTimeOf } from '@common/time/local-time';
import type { Span } from '@common/time/span';
import { clipSpans, subtractSpans, totalMinutes } from '@common/time/span-list';
import { localOfInstant, MINUTES_PER_DAY } from '@common/time/zone';

/** Days on which somebody or the studio is away, and what to call it. */
export interface Away {
  readonly days: DayRange;
  readonly word: string;
}

/** One day of a week strip. */
export interface WeekDay {
  readonly day: string;
  readonly minutes: number;
  /** "08:00–12:00", one for each unbroken stretch. */
  readonly shifts: readonly string[];
  /** Stretches that are worked at the overtime price, if asked. */
  readonly overtime: readonly string[];
  /** Leave or a closure on this day; empty otherwise. */
  readonly away: string;
}

/** The seven days from `monday` of somebody who works these patterns, in a named zone. */
export function weekOf(
  patterns: readonly Pattern[],
  away: readonly Away[],
  monday: string,
  zone: string,
): readonly WeekDay[] {
  const frame = { start: daySpan(monday, zone).start, end: daySpan(addDays(monday, 7), zone).start };
  const days = away.map((one) => one.days);
  const spansOf = (kind: Pattern['kind']): readonly Span[] =>
    availableSpans({ patterns: patterns.filter((pattern) => pattern.kind === kind), away: days }, frame, zone);
  const ordinary = spansOf('ordinary');
  const overtime = subtractSpans(spansOf('overtime'), ordinary);
  return Array.from({ length: 7 }, (_, index) => {
    const day = addDays(monday, index);
    const span = daySpan(day, zone);
    const shifts = clipSpans(ordinary, span);
    return {
      day,
      minutes: totalMinutes(shifts),
      shifts: shifts.map((shift) => sayShift(shift, zone)),
      overtime: clipSpans(overtime, span).map((shift) => sayShift(shift, zone)),
      away: away.find((one) => one.days.from <= day && day < one.days.until)?.word ?? '',
    };
  });
}

function sayShift(shift: Span, zone: string): string {
  const start = localOfInstant(shift.start, zone);
  const midnight = Math.floor(start / MINUTES_PER_DAY) * MINUTES_PER_DAY;
  return `${localTimeOf(start - midnight)}–${localTimeOf(localOfInstant(shift.end, zone) - midnight)}`;
}
