import type { TimedBay, TimedCrews } from './timed-model';

/** Sets of crafts beyond which more would cost more time than they save. */
const MOST_SETS = 24;

/**
 * What makers with several crafts can do at once, as renewable resources: for a set of crafts, the demands on the set against
 * the makers who hold any of it. By Hall's theorem (1935) the demands at one instant can be met exactly where no set is
 * overdrawn; that a crew stays together is not told by it. The sets most asked for come first.
 */
export function hallBays(crews: TimedCrews, durations: readonly number[]): TimedBay[] {
  const count = crews.craftIds.length;
  if (count > 12) return singleCrafts(crews);
  const seen = new Set<string>();
  const bays: { bay: TimedBay; strain: number }[] = [];
  for (let set = 1; set < 1 << count; set++) {
    const holders = crews.holds.map((holds) => holds.some((holdsIt, craft) => holdsIt && isIn(set, craft)));
    const key = holders.map(Number).join('');
    if (seen.has(key)) continue;
    seen.add(key);
    // All crafts that nobody else holds belong to the set as well: they tighten it for nothing.
    const crafts = crews.craftIds.map((_, craft) =>
      crews.holds.every((holds, maker) => !holds[craft] || holders[maker]),
    );
    const capacity = holders.filter(Boolean).length;
    const demands = crews.needs.map((needs) => needs.reduce((sum, need, craft) => sum + (crafts[craft] ? need : 0), 0));
    const busiest = [...demands].sort((a, b) => b - a);
    if ((busiest[0] ?? 0) + (busiest[1] ?? 0) <= capacity && demands.reduce((sum, need) => sum + need, 0) <= capacity)
      continue;
    const energy = demands.reduce((sum, need, stage) => sum + need * durations[stage], 0);
    bays.push({ bay: { capacity, demands }, strain: energy / Math.max(1, capacity) });
  }
  bays.sort((a, b) => b.strain - a.strain);
  return bays.slice(0, MOST_SETS).map(({ bay }) => bay);
}

const isIn = (set: number, craft: number): boolean => (set & (1 << craft)) !== 0;

function singleCrafts(crews: TimedCrews): TimedBay[] {
  return crews.craftIds.map((_, craft) => ({
    capacity: crews.holds.filter((holds) => holds[craft]).length,
    demands: crews.needs.map((needs) => needs[craft]),
  }));
}
