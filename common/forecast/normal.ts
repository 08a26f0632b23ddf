/** Probability that a standard normal value stays below z; absolute error below 1.5e-7 (Abramowitz & Stegun 1964, 7.1.26). */
export function normalShareBelow(z: number): number {
  const x = Math.abs(z) / Math.SQRT2;
  const t = 1 / (1 + 0.3275911 * x);
  const polynomial = t * (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  const erf = 1 - polynomial * Math.exp(-x * x);
  return z < 0 ? (1 - erf) / 2 : (1 + erf) / 2;
}

/** The standard normal value that is stayed below with probability `share`; relative error below 1.15e-9 (Acklam's rational fit, from memory). */
export function normalQuantile(share: number): number {
  if (share <= 0) return -Infinity;
  if (share >= 1) return Infinity;
  if (share < TAIL) return tail(Math.sqrt(-2 * Math.log(share)));
  if (share > 1 - TAIL) return -tail(Math.sqrt(-2 * Math.log(1 - share)));
  const q = share - 0.5;
  const r = q * q;
  return (q * horner(CENTRE_ABOVE, r)) / (r * horner(CENTRE_BELOW, r) + 1);
}

const TAIL = 0.02425;
const CENTRE_ABOVE = [
  -3.969683028665376e1, 2.209460984245205e2, -2.759285104469687e2, 1.38357751867269e2, -3.066479806614716e1,
  2.506628277459239,
];
const CENTRE_BELOW = [
  -5.447609879822406e1, 1.615858368580409e2, -1.556989798598866e2, 6.680131188771972e1, -1.328068155288572e1,
];
const TAIL_ABOVE = [
  -7.784894002430293e-3, -3.223964580411365e-1, -2.400758277161838, -2.549732539343734, 4.374664141464968,
  2.938163982698783,
];
const TAIL_BELOW = [7.784695709041462e-3, 3.224671290700398e-1, 2.445134137142996, 3.754408661907416];

function tail(q: number): number {
  return horner(TAIL_ABOVE, q) / (q * horner(TAIL_BELOW, q) + 1);
}

function horner(coefficients: readonly number[], x: number): number {
  return coefficients.reduce((sum, coefficient) => sum * x + coefficient, 0);
}
