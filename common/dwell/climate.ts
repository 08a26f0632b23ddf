import type { Minute } from '../time/span';

/** Air around a piece: temperature in degrees Celsius and relative humidity in percent. */
export interface Climate {
  readonly celsius: number;
  readonly humidityPercent: number;
}

/** A climate that holds from an instant until the next step. */
export interface ClimateStep extends Climate {
  readonly from: Minute;
}

/**
 * A piecewise constant course of climates, in order of time, at least one: the first holds before its instant too, the last
 * for ever.
 */
export type ClimateHistory = readonly ClimateStep[];

/** One climate for all time. */
export function constantClimate(climate: Climate): ClimateHistory {
  return [{ from: 0, ...climate }];
}

/** The climate at an instant. */
export function climateAt(history: ClimateHistory, instant: Minute): Climate {
  return history.findLast((step) => step.from <= instant) ?? history[0];
}
