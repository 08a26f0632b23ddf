import type { Minute } from '../time/span';
import { advanceRate } from './advance';
import type { Climate, ClimateHistory } from './climate';
import type { DwellBehaviour } from './law';

/** A dwell: minutes at its reference climate, and how it behaves in others. */
export interface DwellTime extends DwellBehaviour {
  readonly minutes: number;
}

/** Tenths of a degree are as fine as a room is heated. */
const CELSIUS_STEP = 0.1;

/**
 * When a dwell that begins at `start` is over under a course of climates, to the nearest minute; null where it never is
 * (it stays too cold or too damp at the end of the course). Time below the minimum temperature earns nothing.
 */
export function readyAt(start: Minute, dwell: DwellTime, history: ClimateHistory): Minute | null {
  const exact = readyExactly(start, dwell, history);
  return exact === null ? null : Math.round(exact);
}

/** As `readyAt`, with fractions of a minute. */
export function readyExactly(start: Minute, dwell: DwellTime, history: ClimateHistory): number | null {
  let at = start;
  let left = dwell.minutes;
  for (let i = 0; i < history.length; i += 1) {
    const until = history[i + 1]?.from ?? Infinity;
    if (left <= 0) {
      return at;
    }
    if (until <= at) {
      continue;
    }
    const rate = advanceRate(dwell, history[i]);
    const whole = rate > 0 ? left / rate : Infinity;
    if (at + whole <= until && whole !== Infinity) {
      return at + whole;
    }
    left -= rate * (until - at);
    at = until;
  }
  return left <= 0 ? at : null;
}

/**
 * The last minute at which a dwell may begin to be over by `readyBy`; null where none is early enough (it stands still in
 * the climate before the course begins).
 */
export function latestStart(readyBy: Minute, dwell: DwellTime, history: ClimateHistory): Minute | null {
  const exact = latestStartExactly(readyBy + 0.5, dwell, history);
  if (exact === null) {
    return null;
  }
  const candidate = Math.floor(exact);
  const ready = readyAt(candidate, dwell, history);
  // readyAt rounds, so a candidate on the very half minute may come out one too late.
  return ready !== null && ready <= readyBy ? candidate : candidate - 1;
}

function latestStartExactly(readyBy: number, dwell: DwellTime, history: ClimateHistory): number | null {
  let at = readyBy;
  let left = dwell.minutes;
  for (let i = history.length - 1; i >= 0; i -= 1) {
    const since = i === 0 ? -Infinity : history[i].from;
    if (since >= at) {
      continue;
    }
    const rate = advanceRate(dwell, history[i]);
    const whole = left <= 0 ? 0 : rate > 0 ? left / rate : Infinity;
    if (whole !== Infinity && at - whole >= since) {
      return at - whole;
    }
    left -= rate * (at - since);
    at = since;
  }
  return null;
}

/** Reference minutes that a dwell earns between two instants; 0 where `end` is not after `start`. */
export function creditMinutes(start: Minute, end: Minute, dwell: DwellBehaviour, history: ClimateHistory): number {
  let credit = 0;
  for (let i = 0; i < history.length; i += 1) {
    const from = Math.max(start, i === 0 ? -Infinity : history[i].from);
    const until = Math.min(end, history[i + 1]?.from ?? Infinity);
    if (from < until) {
      credit += advanceRate(dwell, history[i]) * (until - from);
    }
  }
  return credit;
}

/**
 * The lowest steady temperature, to a tenth of a degree, at which a dwell from `start` is over by `readyBy`; null where the
 * maximum of its law is not warm enough or none is known to be safe. Humidity is taken as it is.
 */
export function temperatureFor(start: Minute, readyBy: Minute, dwell: DwellTime, air: Climate): number | null {
  if (dwell.maximumCelsius === null) {
    return null;
  }
  const needed = dwell.minutes / Math.max(0, readyBy - start);
  const steps = (celsius: number) => Math.round(celsius / CELSIUS_STEP);
  const enough = (step: number) => advanceRate(dwell, { ...air, celsius: step * CELSIUS_STEP }) >= needed - 1e-9;
  let low = steps(dwell.minimumCelsius ?? 0);
  let high = steps(dwell.maximumCelsius);
  if (!enough(high)) {
    return null;
  }
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    if (enough(middle)) {
      high = middle;
    } else {
      low = middle + 1;
    }
  }
  return Math.round(high) / 10;
}
