import { type DaySpan, weekdayOf } from '@common/time/calendar-day';
import type { Minute, Span } from '@common/time/span';

/** A break shorter than this is part of the day: lunch is not folded away. */
const BREAK_MINUTES = 150;

/** Working spans with the breaks between them closed: the stretches of a day when the light is on. `working` is sorted. */
export function litStretches(working: readonly Span[]): Span[] {
  const lit: { start: Minute; end: Minute }[] = [];
  for (const span of working) {
    const last = lit.at(-1);
    if (last && span.start - last.end < BREAK_MINUTES) last.end = Math.max(last.end, span.end);
    else if (span.end > span.start) lit.push({ ...span });
  }
  return lit;
}

/**
 * Lit stretches for every day, those before the known time included: a day that ended before `knownFrom` is given the hours
 * of the first like weekday that is known, so that finished work stands in a day as wide as those to come.
 */
export function litDays(days: readonly DaySpan[], working: readonly Span[], knownFrom: Minute): Span[] {
  const known = litStretches(working);
  const borrowed = days
    .filter((day) => day.start < knownFrom)
    .flatMap((day) => borrowHours(day, days, known, knownFrom));
  const cut = borrowed.map((span) => ({ start: span.start, end: Math.min(span.end, knownFrom) }));
  return litStretches([...cut.filter((span) => span.end > span.start), ...known]);
}

function borrowHours(day: DaySpan, days: readonly DaySpan[], known: readonly Span[], knownFrom: Minute): Span[] {
  const weekday = weekdayOf(day.day);
  const like = days.find((other) => other.start >= knownFrom && weekdayOf(other.day) === weekday);
  if (!like) return [];
  return known
    .filter((span) => span.start >= like.start && span.start < like.end)
    .map((span) => ({ start: span.start - like.start + day.start, end: span.end - like.start + day.start }));
}

/** What lies between lit stretches inside a frame: nights, weekends, closures. */
export function unlitStretches(frame: Span, lit: readonly Span[]): Span[] {
  const unlit: Span[] = [];
  let from = frame.start;
  for (const span of lit) {
    if (span.end <= from || span.start >= frame.end) continue;
    if (span.start > from) unlit.push({ start: from, end: span.start });
    from = span.end;
  }
  if (from < frame.end) unlit.push({ start: from, end: frame.end });
  return unlit;
}
