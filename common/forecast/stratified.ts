import { Chance } from '../planning';

/**
 * Ranks 0 to `draws - 1` in an order of their own for every name: one stratum of a quantity's distribution for each draw (Latin
 * hypercube sampling, McKay, Beckman & Conover 1979). The same seed and name give the same ranks whatever else is in the forecast,
 * so that two plans are compared on the same draws (common random numbers).
 */
export function stratifiedRanks(seed: number, name: string, draws: number): Int32Array {
  const chance = new Chance(mixName(seed, name));
  const ranks = new Int32Array(draws);
  for (let k = 0; k < draws; k += 1) ranks[k] = k;
  for (let k = draws - 1; k > 0; k -= 1) {
    const other = chance.below(k + 1);
    const kept = ranks[k];
    ranks[k] = ranks[other];
    ranks[other] = kept;
  }
  return ranks;
}

/** The middle of a stratum as a probability. */
export function shareOfRank(rank: number, draws: number): number {
  return (rank + 0.5) / draws;
}

/** A seed of a name's own: FNV-1a over its characters, begun from the forecast's seed. */
export function mixName(seed: number, name: string): number {
  let hash = (0x811c9dc5 ^ seed) | 0;
  for (let k = 0; k < name.length; k += 1) hash = Math.imul(hash ^ name.charCodeAt(k), 0x01000193);
  return hash | 0;
}
