import type { ThreePoint } from '@common/forecast';
import { type Chance } from '@common/planning';
import { normalQuantile } from '@common/forecast/normal';

/** How long something truly takes, in multiples of its median, as a rising function of a standard normal value. */
export interface TruthLaw {
  readonly name: string;
  readonly at: (z: number) => number;
  /** The likeliest multiple. */
  readonly mode: number;
}

/** An estimator's low and high are undercut and overrun by one job in a hundred; that is all the forecaster is told. */
const LOW_Z = -2.3263;
const HIGH_Z = 2.3263;

const logNormal = (sd: number): TruthLaw => ({
  name: `log-normal ${sd}`,
  at: (z) => Math.exp(sd * z),
  mode: Math.exp(-sd * sd),
});

/** Gamma of a shape, by the cube-root transformation of Wilson & Hilferty 1931. */
const gamma = (shape: number): TruthLaw => {
  const cube = (z: number): number => Math.max(0.02, 1 - 1 / (9 * shape) + z / (3 * Math.sqrt(shape))) ** 3;
  return { name: `gamma ${shape}`, at: (z) => cube(z) / cube(0), mode: (shape - 1) / shape / cube(0) };
};

/** Goes as planned nine times in ten; the tenth time there is trouble. */
const trouble: TruthLaw = {
  name: 'trouble',
  at: (z) => Math.exp(0.14 * z) * (1 + 0.5 * Math.max(0, z - 1.2816)),
  mode: 0.98,
};

/** None of them is the law that the forecaster draws by. */
export const WORK_LAWS: readonly TruthLaw[] = [logNormal(0.3), gamma(9), trouble];
export const DWELL_LAWS: readonly TruthLaw[] = [logNormal(0.15), gamma(30)];

/** What an estimator who knows the law says of something whose median is `minutes`. */
export function statedPoints({ at, mode }: TruthLaw, minutes: number): ThreePoint {
  return { low: minutes * at(LOW_Z), likely: minutes * mode, high: minutes * at(HIGH_Z) };
}

/** One standard normal value. */
export function drawZ(chance: Chance): number {
  return normalQuantile(Math.min(1 - 1e-9, Math.max(1e-9, chance.share())));
}
