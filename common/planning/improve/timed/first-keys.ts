import type { Chance } from '../chance';
import type { TimedProblem } from './timed-problem';

/**
 * Keys for the first members: latest starts along the lags, drawn with more chance the later the member, in the manner of
 * regret-based sampling (Drexl 1991) by a rule that does well (latest start, Kolisch & Hartmann 1999).
 */
export function drawFirstKeys(problem: TimedProblem, chance: Chance, member: number, keys: Int32Array): void {
  const { count, latestStart } = problem;
  let most = 1;
  for (let stage = 0; stage < count; stage += 1) most = Math.max(most, latestStart[stage]);
  const spread = member === 0 ? 0 : Math.floor(most * (0.3 + 0.5 * chance.share()));
  for (let stage = 0; stage < count; stage += 1)
    keys[stage] = latestStart[stage] + (spread > 0 ? chance.below(spread + 1) : 0);
}
