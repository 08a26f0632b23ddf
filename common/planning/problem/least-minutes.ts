import type { AdvanceProfile } from './dwell';
import type { Maker, Stage } from './problem';

/** The paces at which each craft is held, the quickest first. */
export type HeldPaces = ReadonlyMap<string, readonly number[]>;

/** Gathers the paces of all makers once, for all stages. */
export function heldPaces(makers: readonly Maker[]): HeldPaces {
  const paces = new Map<string, number[]>();
  for (const maker of makers) {
    for (const { craftId, pacePermille } of maker.crafts) {
      const known = paces.get(craftId);
      if (known) known.push(pacePermille);
      else paces.set(craftId, [pacePermille]);
    }
  }
  for (const known of paces.values()) known.sort((a, b) => b - a);
  return paces;
}

/** The fewest minutes of work that a stage can take, were every maker free and every window kept; Infinity where nobody can. */
export function leastWorkMinutes(stage: Stage, held: HeldPaces): number {
  if (stage.progress.kind === 'finished') return 0;
  const minutes = stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes;
  if (stage.effort.kind === 'duration' || stage.crew.length === 0) return minutes;
  const paces = stage.crew.flatMap((need) => held.get(need.craftId)?.slice(0, need.most) ?? []);
  let output = 0;
  let best = 0;
  paces.sort((a, b) => b - a);
  paces.forEach((pace, i) => {
    output += pace - (i > 0 ? stage.crewLossPermille : 0);
    best = Math.max(best, output);
  });
  return best > 0 ? Math.ceil((minutes * 1000) / best) : Infinity;
}

/** The fewest minutes by the clock that a stage's dwell can take, at the fastest rate that it may meet anywhere. */
export function leastDwellMinutes(stage: Stage, fastest: FastestRates): number {
  if (!stage.dwell) return 0;
  let rate = 1000;
  for (const id of Object.values(stage.dwell.advance)) rate = Math.max(rate, fastest.get(id) ?? 0);
  return Math.ceil((stage.dwell.minutes * 1000) / rate);
}

/** The highest rate, in permille, of each advance profile. */
export type FastestRates = ReadonlyMap<string, number>;

/** Finds the highest rate of each profile once, for all stages. */
export function fastestRates(advances: readonly AdvanceProfile[]): FastestRates {
  return new Map(
    advances.map((profile) => [profile.id, profile.permille.reduce((most, rate) => Math.max(most, rate), 0)]),
  );
}
