import type { Minute } from '../time/span';
import type { Climate, ClimateHistory } from './climate';
import { arrheniusFactor, nurseSaulFactor, tenDegreeFactor } from './equivalent-age';
import { DRYING_LIMIT_PERCENT, evaporationTimeFactor } from './humidity';
import type { DwellBehaviour } from './law';

/**
 * Bounds on what still air may do to drying: beyond them the film itself is the limit, and Dalton's law with its one figure
 * for the air says more than it knows. Common practice, no source.
 */
export const FASTEST_DRYING = 2;
export const SLOWEST_DRYING = 1 / 6;

/** How fast a dwell advances in a climate: 1 at its reference, 0 where it stands still. */
export function advanceRate(behaviour: DwellBehaviour, air: Climate): number {
  if (behaviour.minimumCelsius !== null && air.celsius < behaviour.minimumCelsius) {
    return 0;
  }
  const trusted = { ...air, celsius: Math.min(air.celsius, behaviour.maximumCelsius ?? Infinity) };
  return lawRate(behaviour, trusted);
}

function lawRate({ law, referenceCelsius, referenceHumidityPercent }: DwellBehaviour, air: Climate): number {
  switch (law.kind) {
    case 'none':
      return 1;
    case 'arrhenius':
      return arrheniusFactor(air.celsius, referenceCelsius, law.activationEnergyJPerMol);
    case 'factor-per-10-degrees':
      return tenDegreeFactor(air.celsius, referenceCelsius, law.factor);
    case 'nurse-saul':
      return nurseSaulFactor(air.celsius, referenceCelsius, law.datumCelsius);
    case 'evaporation':
      return dryingRate(air, { celsius: referenceCelsius, humidityPercent: referenceHumidityPercent });
  }
}

function dryingRate(air: Climate, reference: Climate): number {
  if (air.humidityPercent > DRYING_LIMIT_PERCENT) {
    return 0;
  }
  return Math.min(FASTEST_DRYING, Math.max(SLOWEST_DRYING, 1 / evaporationTimeFactor(air, reference)));
}

/** A rate in integer thousandths that holds from an instant until the next step; the engine's measure of a climate. */
export interface AdvanceSteps {
  /** In order of time; the first also holds before, the last for ever. */
  readonly from: readonly Minute[];
  readonly permille: readonly number[];
}

/** The course of rates that a course of climates gives a dwell; steps of the same rate are one. */
export function advanceSteps(behaviour: DwellBehaviour, history: ClimateHistory): AdvanceSteps {
  const from: Minute[] = [];
  const permille: number[] = [];
  for (const step of history) {
    const rate = Math.round(advanceRate(behaviour, step) * 1000);
    if (rate !== permille.at(-1)) {
      from.push(step.from);
      permille.push(rate);
    }
  }
  return { from, permille };
}

/** Whether a dwell runs at its stated pace throughout. */
export function isSteady(steps: AdvanceSteps): boolean {
  return steps.permille.length === 1 && steps.permille[0] === 1000;
}
