import { type Minute, type Span, spanMinutes } from './span';

/**
 * Sorted spans that neither overlap nor touch, none of them empty: the one form in which this folder hands spans on.
 * Made by `normaliseSpans`; the other functions here keep it.
 */
export type SpanList = readonly Span[];

/** Sorts spans, drops the empty ones and melts together those that overlap or touch. */
export function normaliseSpans(spans: readonly Span[]): SpanList {
  const sorted = spans.filter((span) => span.end > span.start).sort((a, b) => a.start - b.start);
  const merged: { start: Minute; end: Minute }[] = [];
  for (const { start, end } of sorted) {
    const last = merged.at(-1);
    if (last && start <= last.end) {
      last.end = Math.max(last.end, end);
    } else {
      merged.push({ start, end });
    }
  }
  return merged;
}

/** All time in either list; the lists need not be normalised. */
export function uniteSpans(a: readonly Span[], b: readonly Span[]): SpanList {
  return normaliseSpans([...a, ...b]);
}

/** Time in both lists, each of which is normalised. Touching spans share nothing. Linear in the length of both. */
export function intersectSpans(a: SpanList, b: SpanList): SpanList {
  const shared: Span[] = [];
  let i = 0;
  let j = 0;
  while (i < a.length && j < b.length) {
    const start = Math.max(a[i].start, b[j].start);
    const end = Math.min(a[i].end, b[j].end);
    if (start < end) {
      shared.push({ start, end });
    }
    if (a[i].end < b[j].end) {
      i += 1;
    } else {
      j += 1;
    }
  }
  return shared;
}

/** Time in `from` that is not in `taken`; both are normalised. Linear in the length of both. */
export function subtractSpans(from: SpanList, taken: SpanList): SpanList {
  const left: Span[] = [];
  let first = 0;
  for (const span of from) {
    while (first < taken.length && taken[first].end <= span.start) {
      first += 1;
    }
    let start = span.start;
    for (let i = first; i < taken.length && taken[i].start < span.end; i += 1) {
      if (taken[i].start > start) {
        left.push({ start, end: taken[i].start });
      }
      start = Math.max(start, taken[i].end);
    }
    if (start < span.end) {
      left.push({ start, end: span.end });
    }
  }
  return left;
}

/** The part of a normalised list inside `frame`. */
export function clipSpans(spans: SpanList, frame: Span): SpanList {
  return intersectSpans(spans, frame.end > frame.start ? [frame] : []);
}

/** Sum of the lengths of a normalised list, in minutes. */
export function totalMinutes(spans: SpanList): number {
  return spans.reduce((sum, span) => sum + spanMinutes(span), 0);
}

/** The span of a normalised list that holds `minute`, or null. A span's end is outside it. */
export function spanAt(spans: SpanList, minute: Minute): Span | null {
  let low = 0;
  let high = spans.length - 1;
  while (low <= high) {
    const middle = (low + high) >>> 1;
    const span = spans[middle];
    if (minute < span.start) {
      high = middle - 1;
    } else if (minute >= span.end) {
      low = middle + 1;
    } else {
      return span;
    }
  }
  return null;
}
