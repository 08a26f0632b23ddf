import type { Minute } from '@common/time/span';
import { type TimeScale, xOf } from './time-scale';

/** A date fan as it is drawn: pixels across the wall, and the outline from its own left bottom corner. */
export interface FanShape {
  readonly x: number;
  readonly width: number;
  /** An SVG path in a box of `width` by the height asked for. */
  readonly path: string;
  /** Where P50 and P80 stand, from the left of the box. */
  readonly p50: number;
  readonly p80: number;
}

/** Half of a fan's steps either way of a point are averaged over this share of them, so that the outline is soft. */
const BANDWIDTH_SHARE = 0.12;
const LEAST_WIDTH = 3;
const POINTS = 32;

/**
 * The forecast of a finish as a soft density from P10 to P90 (Gaussian kernel over the fan's quantiles; Silverman 1986), drawn
 * along the wall's own scale, so that folded nights fold it too. `fan` rises and has evenly spaced shares, its first the least
 * finish of all; it has eleven instants at least.
 */
export function fanShape(fan: readonly Minute[], scale: TimeScale, height: number): FanShape {
  const at = (share: number): Minute => fan[Math.round(share * (fan.length - 1))];
  const [from, to] = [xOf(scale, at(0.1)), xOf(scale, at(0.9))];
  const width = Math.max(LEAST_WIDTH, to - from);
  const xs = fan.map((finish) => xOf(scale, finish));
  const bandwidth = Math.max(1.5, width * BANDWIDTH_SHARE);
  const densities = Array.from({ length: POINTS + 1 }, (_, k) => {
    const x = from + (width * k) / POINTS;
    return xs.reduce((sum, one) => sum + Math.exp(-(((x - one) / bandwidth) ** 2) / 2), 0);
  });
  const most = Math.max(...densities);
  const points = densities.map((density, k) => `L${r((width * k) / POINTS)} ${r(height - (height * density) / most)}`);
  return {
    x: from,
    width,
    path: `M0 ${r(height)} ${points.join(' ')} L${r(width)} ${r(height)} Z`,
    p50: xOf(scale, at(0.5)) - from,
    p80: xOf(scale, at(0.8)) - from,
  };
}

/** Two decimals are finer than any screen. */
function r(value: number): number {
  return Math.round(value * 100) / 100;
}
