import type { Pattern } from '@common/contract';
import { localTimeOf, minuteOfDay } from '@common/time/local-time';
import { recurrenceRuleFault } from '@common/time/recurrence-rule';
import { MINUTES_PER_DAY } from '@common/time/zone';

/** Days of the week as RFC 5545 writes them, with their names. */
export const WEEKDAYS = [
  { code: 'MO', short: 'Mon', name: 'Monday' },
  { code: 'TU', short: 'Tue', name: 'Tuesday' },
  { code: 'WE', short: 'Wed', name: 'Wednesday' },
  { code: 'TH', short: 'Thu', name: 'Thursday' },
  { code: 'FR', short: 'Fri', name: 'Friday' },
  { code: 'SA', short: 'Sat', name: 'Saturday' },
  { code: 'SU', short: 'Sun', name: 'Sunday' },
] as const;

/** How a pattern comes again: each week, every other week, or by a rule of one's own. */
export type PatternShape = 'weekly' | 'alternate' | 'rule';

const WEEKLY = /^FREQ=WEEKLY(?:;INTERVAL=([12]))?;BYDAY=((?:MO|TU|WE|TH|FR|SA|SU)(?:,(?:MO|TU|WE|TH|FR|SA|SU))*)$/;

/** What a rule says where it is one of the two usual shapes; otherwise it is shown as it stands. */
export function shapeOfRule(rule: string): { readonly shape: PatternShape; readonly days: readonly string[] } {
  const match = WEEKLY.exec(rule);
  return match === null
    ? { shape: 'rule', days: [] }
    : { shape: match[1] === '2' ? 'alternate' : 'weekly', days: match[2].split(',') };
}

/** The rule of one of the two usual shapes, its days in the order of the week. */
export function ruleOfShape(shape: 'weekly' | 'alternate', days: readonly string[]): string {
  const inOrder = WEEKDAYS.map((day) => day.code).filter((code) => days.includes(code));
  return `FREQ=WEEKLY${shape === 'alternate' ? ';INTERVAL=2' : ''};BYDAY=${inOrder.join(',')}`;
}

/** The clock reading at which a pattern ends; past midnight it is of the next day. */
export function endOf(pattern: Pick<Pattern, 'startMinuteOfDay' | 'lengthMinutes'>): string {
  return localTimeOf((pattern.startMinuteOfDay + pattern.lengthMinutes) % MINUTES_PER_DAY);
}

/** Minutes from one clock reading to the next of another; the same reading is a whole day. */
export function minutesBetween(from: string, until: string): number {
  const length = minuteOfDay(until) - minuteOfDay(from);
  return length > 0 ? length : length + MINUTES_PER_DAY;
}

/** "Mon, Tue, Wed 08:00–16:30, every other week": a pattern in words. */
export function sayPattern(pattern: Pattern): string {
  const { shape, days } = shapeOfRule(pattern.rule);
  const when = `${localTimeOf(pattern.startMinuteOfDay)}–${endOf(pattern)}`;
  const which =
    shape === 'rule'
      ? pattern.rule
      : WEEKDAYS.filter((day) => days.includes(day.code))
          .map((day) => day.short)
          .join(', ');
  return `${which} ${when}${shape === 'alternate' ? ', every other week' : ''}${
    pattern.kind === 'overtime' ? ', overtime if asked' : ''
  }`;
}

/** What is wrong with a rule typed by hand, as a sentence; null where nothing is. */
export function ruleFault(rule: string): string | null {
  return recurrenceRuleFault(rule.trim().toUpperCase());
}
