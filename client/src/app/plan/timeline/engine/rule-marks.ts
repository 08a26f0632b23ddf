import { type DaySpan, weekdayOf } from '@common/time/calendar-day';
import { formatDay } from '@common/time/format-instant';
import type { Minute, Span } from '@common/time/span';
import { localOfInstant } from '@common/time/zone';
import { type TimeScale, xOf } from './time-scale';

/** A graduation of the rule at the head of the wall: the longer the stroke, the longer the time. */
export interface RuleMark {
  readonly at: Minute;
  readonly x: number;
  readonly stroke: 'long' | 'middle' | 'short';
}

/** Words between two graduations: `wide` on the upper line, `narrow` on the lower. */
export interface RuleLabel {
  readonly at: Minute;
  readonly x: number;
  readonly width: number;
  readonly line: 'wide' | 'narrow';
  readonly text: string;
  /** Whether the stretch named is a weekend or a closure, from end to end. */
  readonly dark: boolean;
}

/** All that is written on the rule between two instants. */
export interface Rule {
  readonly marks: readonly RuleMark[];
  readonly labels: readonly RuleLabel[];
}

const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];
const WEEKDAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const HOUR_LABEL_PX = 26;
const DAY_LABEL_PX = 46;
const DATE_LABEL_PX = 19;

interface RuleInput {
  readonly scale: TimeScale;
  readonly days: readonly DaySpan[];
  readonly lit: readonly Span[];
  readonly zoom: number;
  readonly zone: string;
}

/** What to write on the rule for the days that touch `visible`. */
export function writeRule(input: RuleInput, visible: Span): Rule {
  const days = input.days.filter((day) => day.end > visible.start && day.start < visible.end);
  if (input.zoom >= HOUR_LABEL_PX) return hourRule(input, days);
  return dayRule(input, days);
}

/** Days above, hours below, quarters as short strokes. */
function hourRule(input: RuleInput, days: readonly DaySpan[]): Rule {
  const marks: RuleMark[] = [];
  const labels: RuleLabel[] = [];
  for (const day of days) {
    marks.push({ at: day.start, x: xOf(input.scale, day.start), stroke: 'long' });
    labels.push(labelOf(input, day, 'wide', formatDay(day.day)));
    for (const hour of hoursOf(day)) {
      const x = xOf(input.scale, hour);
      const width = xOf(input.scale, hour + 60) - x;
      if (hour !== day.start && width >= 6) marks.push({ at: hour, x, stroke: 'middle' });
      if (width < HOUR_LABEL_PX) continue;
      const clock = (localOfInstant(hour, input.zone) % 1440) / 60;
      labels.push({ at: hour, x, width, line: 'narrow', text: `${Math.floor(clock)}`, dark: false });
      for (const quarter of [15, 30, 45])
        marks.push({ at: hour + quarter, x: xOf(input.scale, hour + quarter), stroke: 'short' });
    }
  }
  return { marks, labels };
}

/** Weeks or months above, days below as far as they can be read. */
function dayRule(input: RuleInput, days: readonly DaySpan[]): Rule {
  const marks: RuleMark[] = [];
  const labels: RuleLabel[] = [];
  const byMonth = input.zoom * 10 < DATE_LABEL_PX * 1.5;
  for (const day of days) {
    const starts = byMonth ? day.day.endsWith('-01') : weekdayOf(day.day) === 1;
    const monday = weekdayOf(day.day) === 1;
    const stroke = starts ? 'long' : byMonth && !monday ? 'short' : 'middle';
    marks.push({ at: day.start, x: xOf(input.scale, day.start), stroke });
    const text = dayText(input, day, byMonth);
    if (text) labels.push(text);
    if (!byMonth && input.zoom >= 10) marks.push(...workingHourMarks(input, day));
  }
  labels.push(...wideLabels(input, days, byMonth));
  return { marks, labels };
}

function dayText(input: RuleInput, day: DaySpan, byMonth: boolean): RuleLabel | null {
  const monday = weekdayOf(day.day) === 1;
  const date = `${Number(day.day.slice(8))}`;
  if (byMonth) {
    if (!monday) return null;
    const week = { ...day, end: day.start + 7 * 1440 };
    const label = labelOf(input, week, 'narrow', date);
    return label.width >= DATE_LABEL_PX ? { ...label, dark: false } : null;
  }
  const label = labelOf(input, day, 'narrow', date);
  if (label.width >= DAY_LABEL_PX) return { ...label, text: `${WEEKDAYS[weekdayOf(day.day) - 1]} ${date}` };
  return label.width >= DATE_LABEL_PX ? label : null;
}

function workingHourMarks(input: RuleInput, day: DaySpan): RuleMark[] {
  return hoursOf(day)
    .filter((hour) => hour !== day.start && input.lit.some((span) => hour >= span.start && hour <= span.end))
    .map((at) => ({ at, x: xOf(input.scale, at), stroke: 'short' as const }));
}

/** The upper line: each week or month once, from its first visible day to its last. */
function wideLabels(input: RuleInput, days: readonly DaySpan[], byMonth: boolean): RuleLabel[] {
  const groups: { key: string; first: DaySpan; last: DaySpan }[] = [];
  for (const day of days) {
    const startsGroup = byMonth ? day.day.endsWith('-01') : weekdayOf(day.day) === 1;
    const group = groups.at(-1);
    if (group && !startsGroup) group.last = day;
    else groups.push({ key: day.day, first: day, last: day });
  }
  return groups.map(({ first, last }) => {
    const [year, month] = first.day.split('-').map(Number);
    const text = byMonth
      ? `${MONTHS[month - 1]} ${year}`
      : `${Number(first.day.slice(8))} ${MONTHS[month - 1]} ${year}`;
    return { ...labelOf(input, { ...first, end: last.end }, 'wide', text), dark: false };
  });
}

function labelOf(input: RuleInput, span: Span, line: RuleLabel['line'], text: string): RuleLabel {
  const x = xOf(input.scale, span.start);
  const dark = !input.lit.some((lit) => lit.start < span.end && span.start < lit.end);
  return { at: span.start, x, width: xOf(input.scale, span.end) - x, line, text, dark };
}

function hoursOf(day: Span): Minute[] {
  return Array.from({ length: Math.ceil((day.end - day.start) / 60) }, (_, hour) => day.start + hour * 60);
}
