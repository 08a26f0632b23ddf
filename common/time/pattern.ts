import { addDays, dayNumber, dayOfInstant, isCalendarDay, type DayRange } from './calendar-day';
import { type RecurrenceRule, recurrenceDays, recurrenceRuleFault } from './recurrence-rule';
import type { CalendarDay, Span } from './span';
import { clipSpans, normaliseSpans, type SpanList } from './span-list';
import { instantOfLocal, MINUTES_PER_DAY } from './zone';

/**
 * A stretch of the day that comes again by a rule: when a maker works, when a bay is open. It runs from clock reading to clock
 * reading, so a night on which the clocks change is an hour shorter or longer. A break is told by two patterns.
 */
export interface Pattern {
  /** The day from which the rule counts (DTSTART); nothing before it. */
  readonly firstDay: CalendarDay;
  readonly rule: RecurrenceRule;
  /** Minutes after midnight by the clock on the wall, 0 to 1439. */
  readonly startMinuteOfDay: number;
  /** Minutes by the clock on the wall, 1 to 1440; it may run into the next day. */
  readonly lengthMinutes: number;
  /** Days on which it falls out though the rule says so (EXDATE). */
  readonly exceptDays: readonly CalendarDay[];
}

/** What is wrong with a pattern, as a sentence that a person can act on; null where nothing is. */
export function patternFault(pattern: Pattern): string | null {
  const day = [pattern.firstDay, ...pattern.exceptDays].find((one) => !isCalendarDay(one));
  if (day !== undefined) {
    return `“${day}” is not a day of the calendar.`;
  }
  if (!isWithin(pattern.startMinuteOfDay, 0, MINUTES_PER_DAY - 1)) {
    return 'A pattern starts between 00:00 and 23:59.';
  }
  if (!isWithin(pattern.lengthMinutes, 1, MINUTES_PER_DAY)) {
    return 'A pattern lasts between one minute and one day.';
  }
  return recurrenceRuleFault(pattern.rule);
}

/** The time of all patterns together inside `frame`, in a named zone, right over changes of clocks; overlaps melt together. */
export function expandPatterns(patterns: readonly Pattern[], frame: Span, zone: string): SpanList {
  if (frame.end <= frame.start) {
    return [];
  }
  // A shift that begins the evening before the frame may reach into it.
  const days: DayRange = {
    from: addDays(dayOfInstant(frame.start, zone), -1),
    until: addDays(dayOfInstant(frame.end - 1, zone), 1),
  };
  return clipSpans(normaliseSpans(patterns.flatMap((pattern) => spansOf(pattern, days, zone))), frame);
}

function spansOf(pattern: Pattern, days: DayRange, zone: string): readonly Span[] {
  const start = { day: pattern.firstDay, minuteOfDay: pattern.startMinuteOfDay, zone };
  const except = new Set(pattern.exceptDays);
  return recurrenceDays(pattern.rule, start, days)
    .filter((day) => !except.has(day))
    .map((day) => {
      const from = dayNumber(day) * MINUTES_PER_DAY + pattern.startMinuteOfDay;
      return { start: instantOfLocal(from, zone), end: instantOfLocal(from + pattern.lengthMinutes, zone) };
    });
}

function isWithin(value: number, least: number, most: number): boolean {
  return Number.isInteger(value) && value >= least && value <= most;
}
