import type { Climate } from './climate';

/** Magnus formula over water: coefficients of the WMO guide, good to about 0.1 °C between −45 and 60 °C. */
const MAGNUS_FACTOR = 17.62;
const MAGNUS_CELSIUS = 243.12;
const PRESSURE_AT_ZERO_HPA = 6.112;

/** Psychrometer constant of a ventilated wet bulb at sea level, in hPa per degree of depression. */
const PSYCHROMETER_HPA_PER_DEGREE = 0.662;

/** Above this relative humidity a film is not to be relied on to dry at all. */
export const DRYING_LIMIT_PERCENT = 85;

/** A surface to be coated stays at least this far above the dew point. */
export const DEW_POINT_DISTANCE_CELSIUS = 3;

/** Pressure of saturated vapour over water, in hPa. */
export function saturationPressure(celsius: number): number {
  return PRESSURE_AT_ZERO_HPA * Math.exp((MAGNUS_FACTOR * celsius) / (MAGNUS_CELSIUS + celsius));
}

/** The temperature at which this air begins to leave dew; −Infinity for air without any vapour. */
export function dewPoint(air: Climate): number {
  return dewPointOf((saturationPressure(air.celsius) * air.humidityPercent) / 100);
}

/** The dew point from the readings of a dry and a wet bulb at sea level. */
export function dewPointFromBulbs(dryCelsius: number, wetCelsius: number): number {
  return dewPointOf(saturationPressure(wetCelsius) - PSYCHROMETER_HPA_PER_DEGREE * (dryCelsius - wetCelsius));
}

/**
 * How many times longer than at the reference a film takes to dry in still air: Dalton's law, by which evaporation goes with
 * the air's vapour deficit. An approximation that knows no air movement; Infinity in saturated air.
 */
export function evaporationTimeFactor(air: Climate, reference: Climate): number {
  return vapourDeficit(reference) / vapourDeficit(air);
}

/** What forbids coating a surface in this air, as a sentence; null where nothing does. */
export function coatingFault(air: Climate, surfaceCelsius: number): string | null {
  if (air.humidityPercent > DRYING_LIMIT_PERCENT) {
    return `The air is at ${Math.round(air.humidityPercent)} % humidity; a coat may not dry above ${DRYING_LIMIT_PERCENT} %.`;
  }
  const dew = dewPoint(air);
  if (surfaceCelsius - dew < DEW_POINT_DISTANCE_CELSIUS) {
    return (
      `The surface is at ${surfaceCelsius.toFixed(1)} °C and dew forms at ${dew.toFixed(1)} °C; ` +
      `keep it ${DEW_POINT_DISTANCE_CELSIUS} °C above the dew point.`
    );
  }
  return null;
}

function vapourDeficit(air: Climate): number {
  return saturationPressure(air.celsius) * Math.max(0, 1 - air.humidityPercent / 100);
}

function dewPointOf(vapourPressure: number): number {
  const log = Math.log(vapourPressure / PRESSURE_AT_ZERO_HPA);
  return vapourPressure > 0 ? (MAGNUS_CELSIUS * log) / (MAGNUS_FACTOR - log) : -Infinity;
}
