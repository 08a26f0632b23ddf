/**
 * An instant as whole minutes since 1970-01-01T00:00Z. Benchmark instances use the same type for their period numbers.
 * Calendar days are a different type: see `CalendarDay`.
 */
export type Minute = number;

/** A calendar day in the studio's own zone, written `YYYY-MM-DD`. It has no instant until a zone is named. */
export type CalendarDay = string;

/** A half-open stretch of time, `start` inside and `end` outside. Empty where `end <= start`. */
export interface Span {
  readonly start: Minute;
  readonly end: Minute;
}

/** Length of a span in minutes; never negative. */
export function spanMinutes(span: Span): number {
  return Math.max(0, span.end - span.start);
}

/** Whether two half-open spans share at least one minute. Spans that only touch do not. */
export function spansOverlap(a: Span, b: Span): boolean {
  return a.start < b.end && b.start < a.end;
}
