import type { Chance } from '../chance';
import type { TimedProblem } from './timed-problem';

/**
 * Keys of a child that keeps what the mother does in a stretch of time in which she uses resources most, and takes what comes
 * before and after from the father: the peak crossover of Valls, Ballestin & Quintanilla 2008 in the form of Debels & Vanhoucke
 * 2005, where the stretch is of a random length and the fullest of its kind. The share `shaken` of children (0 to 1) has a few
 * keys moved by chance besides.
 */
export function crossPeak(
  problem: TimedProblem,
  mother: Int32Array,
  motherSpan: number,
  father: Int32Array,
  fatherSpan: number,
  chance: Chance,
  shaken: number,
  keys: Int32Array,
): void {
  const length = Math.max(1, Math.floor(motherSpan * (0.1 + 0.3 * chance.share())));
  const from = fullestStretch(problem, mother, motherSpan, length, chance);
  const until = from + length;
  const apart = Math.max(motherSpan, fatherSpan) + 1;
  for (let stage = 0; stage < problem.count; stage += 1) {
    const start = mother[stage];
    if (start >= from && start < until) keys[stage] = start + apart;
    else if (father[stage] < from) keys[stage] = father[stage];
    else if (father[stage] >= until) keys[stage] = father[stage] + 2 * apart;
    else keys[stage] = father[stage] + apart;
  }
  if (chance.share() >= shaken) return;
  const shakes = 1 + chance.below(3);
  for (let k = 0; k < shakes; k += 1) {
    const stage = chance.below(problem.count);
    const reach = 1 + (motherSpan >> 2);
    keys[stage] = Math.max(0, keys[stage] + chance.below(2 * reach + 1) - reach);
  }
}

const TRIES = 3;

/** Where the most work lies of a few stretches of a length, drawn at random. */
function fullestStretch(
  problem: TimedProblem,
  starts: Int32Array,
  span: number,
  length: number,
  chance: Chance,
): number {
  let best = 0;
  let bestWork = -1;
  for (let k = 0; k < TRIES; k += 1) {
    const from = chance.below(Math.max(1, span - length + 1));
    let work = 0;
    for (let stage = 0; stage < problem.count; stage += 1) {
      const begin = starts[stage] > from ? starts[stage] : from;
      const finish = starts[stage] + problem.durations[stage];
      const end = finish < from + length ? finish : from + length;
      if (end > begin) work += (end - begin) * problem.weight[stage];
    }
    if (work <= bestWork) continue;
    bestWork = work;
    best = from;
  }
  return best;
}
