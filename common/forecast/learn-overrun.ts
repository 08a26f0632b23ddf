import type { Overrun } from './uncertainty';
import { betaPertMoments, pertMoments, type ThreePoint } from './three-point';

/** A finished stage: what was estimated and what it took, in minutes of effort. */
export interface PastStage {
  readonly productionId: string;
  readonly estimate: ThreePoint;
  readonly actualMinutes: number;
}

/**
 * What is believed of a studio before its first finished stage: that it runs over by 5 per cent, give or take 20, and that
 * productions differ among themselves by 8 per cent. Common practice, no source; a settings page shows it.
 */
export const PRIOR_OVERRUN = { meanLog: Math.log(1.05), sdLog: 0.2, productionSdLog: 0.08, noiseSdLog: 0.25 } as const;

/**
 * How a studio runs against its estimates, learnt from finished work: the conjugate update of a normal mean with the prior above.
 * Stages of one production share its luck, so that fifty stages of one job say less than fifty of ten (a random effect a
 * production, its spread as in the prior). What comes back is for a production to come: it adds that spread. Where stages scatter
 * about their production's luck more than their three points say, what these lack comes back as the stretch.
 */
export function learnOverrun(past: readonly PastStage[]): Overrun {
  const byProduction = new Map<string, number[]>();
  const stated: number[] = [];
  for (const { productionId, estimate, actualMinutes } of past) {
    const { mean } = pertMoments(estimate);
    if (mean <= 0 || actualMinutes <= 0) continue;
    stated.push(Math.log1p(betaPertMoments(estimate).variance / mean ** 2));
    const logs = byProduction.get(productionId) ?? [];
    logs.push(Math.log(actualMinutes / mean));
    byProduction.set(productionId, logs);
  }
  const noise = noiseVariance([...byProduction.values()]);
  const between = PRIOR_OVERRUN.productionSdLog ** 2;
  let precision = 1 / PRIOR_OVERRUN.sdLog ** 2;
  let weighted = PRIOR_OVERRUN.meanLog * precision;
  for (const logs of byProduction.values()) {
    const mean = logs.reduce((sum, one) => sum + one, 0) / logs.length;
    // The mean of logarithms lies below the logarithm of the mean by half the variance.
    const weight = 1 / (between + noise / logs.length);
    precision += weight;
    weighted += weight * (mean + noise / 2);
  }
  const stretchSdLog = stretchOf([...byProduction.values()], stated);
  return { meanLog: weighted / precision, sdLog: Math.sqrt(1 / precision + between), stretchSdLog };
}

/** Stages whose word the priors of spread count for. */
const PRIOR_STAGES = 10;

/** By how much the spread within productions exceeds what the estimates state; shrunk towards nothing as by ten stages. */
function stretchOf(groups: readonly (readonly number[])[], stated: readonly number[]): number {
  if (stated.length === 0) return 0;
  const implied = stated.reduce((sum, one) => sum + one, 0) / stated.length;
  return Math.max(0, Math.sqrt(noiseVariance(groups, implied)) - Math.sqrt(implied));
}

/** Spread within productions, shrunk towards the prior as by ten stages. */
function noiseVariance(groups: readonly (readonly number[])[], prior: number = PRIOR_OVERRUN.noiseSdLog ** 2): number {
  let squares = PRIOR_STAGES * prior;
  let freedom = PRIOR_STAGES;
  for (const logs of groups) {
    const mean = logs.reduce((sum, one) => sum + one, 0) / logs.length;
    squares += logs.reduce((sum, one) => sum + (one - mean) ** 2, 0);
    freedom += logs.length - 1;
  }
  return squares / freedom;
}
