/** Universal gas constant in J/(mol·K), as ASTM C1074 takes it. */
export const GAS_CONSTANT = 8.314;

const KELVIN_AT_ZERO_CELSIUS = 273.15;

/**
 * How many hours at the reference an hour at `celsius` is worth: the equivalent-age factor of ASTM C1074 (Arrhenius form),
 * exp(−E/R · (1/T − 1/Tref)) with temperatures in kelvin.
 */
export function arrheniusFactor(celsius: number, referenceCelsius: number, activationEnergyJPerMol: number): number {
  return Math.exp((-activationEnergyJPerMol / GAS_CONSTANT) * (1 / kelvin(celsius) - 1 / kelvin(referenceCelsius)));
}

/** The same by the rule of thumb that ten degrees more divide the time by `factor`. */
export function tenDegreeFactor(celsius: number, referenceCelsius: number, factor: number): number {
  return factor ** ((celsius - referenceCelsius) / 10);
}

/**
 * The same by the Nurse–Saul maturity of ASTM C1074: degrees above a datum at which nothing advances, as a share of those at
 * the reference. Zero at and below the datum.
 */
export function nurseSaulFactor(celsius: number, referenceCelsius: number, datumCelsius: number): number {
  return Math.max(0, celsius - datumCelsius) / (referenceCelsius - datumCelsius);
}

/** The factor per ten degrees that an activation energy comes to between two temperatures. */
export function tenDegreeFactorOf(activationEnergyJPerMol: number, lowCelsius: number, highCelsius: number): number {
  return arrheniusFactor(highCelsius, lowCelsius, activationEnergyJPerMol) ** (10 / (highCelsius - lowCelsius));
}

/** A time that a data sheet states at a temperature. */
export interface StatedTime {
  readonly celsius: number;
  readonly minutes: number;
}

/**
 * The factor per ten degrees that fits a data sheet's table best: least squares of the logarithm of time over temperature.
 * Needs two temperatures at least; NaN otherwise.
 */
export function fitTenDegreeFactor(table: readonly StatedTime[]): number {
  const meanCelsius = table.reduce((sum, row) => sum + row.celsius, 0) / table.length;
  const meanLog = table.reduce((sum, row) => sum + Math.log(row.minutes), 0) / table.length;
  let covariance = 0;
  let variance = 0;
  for (const { celsius, minutes } of table) {
    covariance += (celsius - meanCelsius) * (Math.log(minutes) - meanLog);
    variance += (celsius - meanCelsius) ** 2;
  }
  return Math.exp((-10 * covariance) / variance);
}

function kelvin(celsius: number): number {
  return celsius + KELVIN_AT_ZERO_CELSIUS;
}
