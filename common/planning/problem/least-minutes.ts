import type { AdvanceProfile } from './dwell';
import type { Maker, Stage } from './problem';

/** The fewest minutes of work that a stage can take, were every maker free and every window kept; Infinity where nobody can. */
export function leastWorkMinutes(stage: Stage, makers: readonly Maker[]): number {
  if (stage.progress.kind === 'finished') return 0;
  const minutes = stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes;
  if (stage.effort.kind === 'duration' || stage.crew.length === 0) return minutes;
  const paces = stage.crew.flatMap((need) => bestPaces(makers, need.craftId, need.most));
  let output = 0;
  let best = 0;
  paces.sort((a, b) => b - a);
  paces.forEach((pace, i) => {
    output += pace - (i > 0 ? stage.crewLossPermille : 0);
    best = Math.max(best, output);
  });
  return best > 0 ? Math.ceil((minutes * 1000) / best) : Infinity;
}

function bestPaces(makers: readonly Maker[], craftId: string, most: number): number[] {
  const paces = makers.flatMap((maker) => maker.crafts.filter((craft) => craft.craftId === craftId).map((craft) => craft.pacePermille));
  return paces.sort((a, b) => b - a).slice(0, most);
}

/** The fewest minutes by the clock that a stage's dwell can take, at the fastest rate it may meet. */
export function leastDwellMinutes(stage: Stage, advances: readonly AdvanceProfile[]): number {
  if (!stage.dwell) return 0;
  const ids = new Set(Object.values(stage.dwell.advance));
  const rates = advances.filter((profile) => ids.has(profile.id)).flatMap((profile) => profile.permille);
  const fastest = Math.max(1000, ...rates);
  return Math.ceil((stage.dwell.minutes * 1000) / fastest);
}
