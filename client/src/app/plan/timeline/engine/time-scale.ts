import type { Minute, Span } from '@common/time/span';

/**
 * Where an instant stands across the wall, in pixels from its left edge, and back. Piecewise linear and strictly rising, so that
 * nights and weekends may be folded to a fraction of their width without ever being lost: a cure that runs through Saturday is
 * still seen to run through Saturday.
 */
export interface TimeScale {
  /** Knots in minutes, strictly rising; at least two. */
  readonly minutes: readonly Minute[];
  /** Knots in pixels, strictly rising, one for each of `minutes`; the first is 0. */
  readonly xs: readonly number[];
  /** Pixels from the first knot to the last. */
  readonly width: number;
}

/** How wide an hour is drawn where work may happen, and where it may not; both above 0. */
export interface HourWidths {
  readonly litPx: number;
  readonly unlitPx: number;
}

/** The scale of a frame. `lit` is sorted and disjoint; what of it lies outside the frame is passed over. */
export function makeTimeScale(frame: Span, lit: readonly Span[], hour: HourWidths): TimeScale {
  const minutes: Minute[] = [frame.start];
  const xs: number[] = [0];
  const advance = (to: Minute, hourPx: number): void => {
    const from = minutes[minutes.length - 1];
    if (to <= from) return;
    minutes.push(to);
    xs.push(xs[xs.length - 1] + ((to - from) * hourPx) / 60);
  };
  for (const span of lit) {
    if (span.end <= frame.start || span.start >= frame.end) continue;
    advance(Math.min(span.start, frame.end), hour.unlitPx);
    advance(Math.min(span.end, frame.end), hour.litPx);
  }
  advance(Math.max(frame.end, frame.start + 1), hour.unlitPx);
  return { minutes, xs, width: xs[xs.length - 1] };
}

/** Pixels of an instant; outside the frame the first or last stretch simply goes on. */
export function xOf(scale: TimeScale, at: Minute): number {
  return interpolate(scale.minutes, scale.xs, at);
}

/** The whole minute nearest to a place across the wall; outside the frame the first or last stretch goes on. */
export function minuteAt(scale: TimeScale, x: number): Minute {
  return Math.round(interpolate(scale.xs, scale.minutes, x));
}

/** Where to scroll so that `at` stands `offset` pixels from the left of the window; never negative. */
export function scrollToShow(scale: TimeScale, at: Minute, offset: number): number {
  return Math.max(0, xOf(scale, at) - offset);
}

function interpolate(from: readonly number[], to: readonly number[], value: number): number {
  const knot = segmentOf(from, value);
  const share = (value - from[knot]) / (from[knot + 1] - from[knot]);
  return to[knot] + share * (to[knot + 1] - to[knot]);
}

/** Index of the stretch that holds `value`, the first or last one where it lies outside. */
function segmentOf(knots: readonly number[], value: number): number {
  let low = 0;
  let high = knots.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >>> 1;
    if (knots[middle] <= value) low = middle;
    else high = middle - 1;
  }
  return low;
}
