/** An estimate by its least, likeliest and greatest value, in any unit. `low <= likely <= high`. */
export interface ThreePoint {
  readonly low: number;
  readonly likely: number;
  readonly high: number;
}

/** Mean and variance of a distribution, in the unit of its estimate and that unit squared. */
export interface Moments {
  readonly mean: number;
  readonly variance: number;
}

/**
 * The textbook's moments: (a + 4m + b) / 6 and ((b − a) / 6)². Source: PERT Summary Report Phase 1, US Navy Special Projects
 * Office, 1958; Malcolm et al., Operations Research 7, 1959.
 */
export function pertMoments({ low, likely, high }: ThreePoint): Moments {
  return { mean: (low + 4 * likely + high) / 6, variance: ((high - low) / 6) ** 2 };
}

/** The moments of the beta distribution that has the PERT mean and ends at low and high: variance (μ − a)(b − μ) / 7. */
export function betaPertMoments(estimate: ThreePoint): Moments {
  const { mean } = pertMoments(estimate);
  return { mean, variance: ((mean - estimate.low) * (estimate.high - mean)) / 7 };
}

/** The moments of the triangular distribution. */
export function triangularMoments({ low: a, likely: m, high: b }: ThreePoint): Moments {
  return { mean: (a + m + b) / 3, variance: (a * a + m * m + b * b - a * m - a * b - m * b) / 18 };
}

/** The two shapes of the beta distribution of an estimate: 1 + 4(m − a)/(b − a) and 1 + 4(b − m)/(b − a); 3 and 3 for a width of 0. */
export function betaPertShapes({ low, likely, high }: ThreePoint): readonly [number, number] {
  const lean = high > low ? (likely - low) / (high - low) : 0.5;
  return [1 + 4 * lean, 5 - 4 * lean];
}

/** An estimate that is known for sure. */
export function exactly(value: number): ThreePoint {
  return { low: value, likely: value, high: value };
}
