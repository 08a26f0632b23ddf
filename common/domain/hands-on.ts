/** Hands-on person-minutes of a stage: what it takes when all goes well, as a rule, and when much goes wrong. */
export interface HandsOn {
  readonly lowMinutes: number;
  readonly likelyMinutes: number;
  readonly highMinutes: number;
}

/** Minutes of a dwell at the material's reference climate: short, usual, long. */
export interface ThreePoint {
  readonly low: number;
  readonly likely: number;
  readonly high: number;
}
