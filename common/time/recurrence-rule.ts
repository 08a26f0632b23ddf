import { RRule } from 'rrule';
import { dayFromNumber, dayNumber, type DayRange } from './calendar-day';
import type { CalendarDay, Minute } from './span';
import { instantOfLocal, localOfInstant, type LocalMinute, MINUTES_PER_DAY } from './zone';

/**
 * The value of an RFC 5545 RRULE property, such as `FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,WE,FR`, limited to the parts that choose
 * days; the time of day is said beside it. Check it with `recurrenceRuleFault` where it enters.
 */
export type RecurrenceRule = string;

const MS_PER_MINUTE = 60_000;
const UNTIL = /^(\d{4})(\d{2})(\d{2})(?:T(\d{2})(\d{2})(\d{2})(Z?))?$/;

/** The grammar of RFC 5545 section 3.3.10, part by part, for rules that choose days. */
const PARTS: Readonly<Record<string, RegExp>> = {
  FREQ: /^(DAILY|WEEKLY|MONTHLY|YEARLY)$/,
  UNTIL,
  COUNT: /^[1-9]\d{0,3}$/,
  INTERVAL: /^[1-9]\d{0,2}$/,
  BYDAY: /^[+-]?\d{0,2}(MO|TU|WE|TH|FR|SA|SU)(,[+-]?\d{0,2}(MO|TU|WE|TH|FR|SA|SU))*$/,
  BYMONTHDAY: listOf('[+-]?([1-9]|[12]\\d|3[01])'),
  BYYEARDAY: listOf('[+-]?([1-9]\\d?|[12]\\d\\d|3[0-5]\\d|36[0-6])'),
  BYWEEKNO: listOf('[+-]?([1-9]|[1-4]\\d|5[0-3])'),
  BYMONTH: listOf('([1-9]|1[0-2])'),
  BYSETPOS: listOf('[+-]?([1-9]\\d?|[12]\\d\\d|3[0-5]\\d|36[0-6])'),
  WKST: /^(MO|TU|WE|TH|FR|SA|SU)$/,
};

function listOf(item: string): RegExp {
  return new RegExp(`^${item}(,${item})*$`);
}

/** What is wrong with a rule, as a sentence that a person can act on; null where nothing is. */
export function recurrenceRuleFault(rule: RecurrenceRule): string | null {
  const seen = new Set<string>();
  for (const part of rule.split(';')) {
    const [name, value = ''] = part.split('=');
    const shape = PARTS[name];
    if (!shape) {
      return `“${name}” is not a part of a recurrence rule that chooses days.`;
    }
    if (!shape.test(value)) {
      return `“${value}” is not a value that ${name} can have.`;
    }
    if (seen.has(name)) {
      return `${name} is said twice.`;
    }
    seen.add(name);
  }
  if (!seen.has('FREQ')) {
    return 'A recurrence rule needs FREQ: DAILY, WEEKLY, MONTHLY or YEARLY.';
  }
  if (seen.has('UNTIL') && seen.has('COUNT')) {
    return 'A recurrence rule ends with UNTIL or with COUNT, not with both.';
  }
  return null;
}

/** When a rule starts counting: the DTSTART of RFC 5545 with its zone. */
export interface RecurrenceStart {
  readonly day: CalendarDay;
  /** Minutes after midnight on the wall. */
  readonly minuteOfDay: number;
  readonly zone: string;
}

/**
 * The days of a range on which a rule falls, in order. The rule is expanded on the wall clock and
 * so is blind to changes of clocks; the caller settles each day in its zone. The first day counts only where the rule
 * itself falls on it. Throws where the rule is faulty.
 */
export function recurrenceDays(rule: RecurrenceRule, start: RecurrenceStart, days: DayRange): readonly CalendarDay[] {
  const fault = recurrenceRuleFault(rule);
  if (fault) {
    throw new RangeError(fault);
  }
  const { until, ...parts } = RRule.parseString(rule);
  const expanded = new RRule({
    ...parts,
    dtstart: wallDate(dayNumber(start.day) * MINUTES_PER_DAY + start.minuteOfDay),
    until: until ? wallDate(localUntil(rule, start.zone)) : null,
  });
  const from = wallDate(dayNumber(days.from) * MINUTES_PER_DAY);
  // rrule's upper end is inclusive and its readings have no fractions of a minute.
  const to = wallDate(dayNumber(days.until) * MINUTES_PER_DAY - 1);
  return expanded.between(from, to, true).map((date) => dayFromNumber(Math.floor(localOf(date) / MINUTES_PER_DAY)));
}

/** The same occurrences as instants, settled by the rule of `instantOfLocal`; for feeds and checks. */
export function recurrenceInstants(rule: RecurrenceRule, start: RecurrenceStart, days: DayRange): readonly Minute[] {
  return recurrenceDays(rule, start, days).map((day) =>
    instantOfLocal(dayNumber(day) * MINUTES_PER_DAY + start.minuteOfDay, start.zone),
  );
}

/**
 * The last moment of a rule on the wall. RFC 5545 section 3.3.10 wants UTC beside a zoned start; a bare date, which people
 * write, includes that whole day.
 */
function localUntil(rule: RecurrenceRule, zone: string): LocalMinute {
  const text = rule.split(';').find((part) => part.startsWith('UNTIL=')) ?? '';
  const [, year, month, date, hours, minutes, , utc] = UNTIL.exec(text.slice('UNTIL='.length)) ?? [];
  const dayStart = dayNumber(`${year}-${month}-${date}`) * MINUTES_PER_DAY;
  if (hours === undefined) {
    return dayStart + MINUTES_PER_DAY - 1;
  }
  const reading = dayStart + Number(hours) * 60 + Number(minutes);
  return utc === 'Z' ? localOfInstant(reading, zone) : reading;
}

/** rrule reads dates by their UTC fields; a wall reading is passed in those, so that no zone of this machine takes part. */
function wallDate(local: LocalMinute): Date {
  return new Date(local * MS_PER_MINUTE);
}

function localOf(date: Date): LocalMinute {
  return Math.floor(date.getTime() / MS_PER_MINUTE);
}
