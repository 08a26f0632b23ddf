import type { Span } from '../../time/span';
import type { CrewNeed, Maker, PlaceNeed, Problem } from '../problem/problem';

/** When at least `least` of several sorted sets of disjoint spans are running; sorted and disjoint itself. */
export function spansWithAtLeast(sets: readonly (readonly Span[])[], least: number): Span[] {
  const edges: { at: number; change: number }[] = [];
  for (const set of sets)
    for (const { start, end } of set) if (end > start) edges.push({ at: start, change: 1 }, { at: end, change: -1 });
  edges.sort((a, b) => a.at - b.at || b.change - a.change);
  const spans: Span[] = [];
  let running = 0;
  let since = 0;
  for (const { at, change } of edges) {
    const was = running;
    running += change;
    if (was < least && running >= least) since = at;
    if (was >= least && running < least && at > since) spans.push({ start: since, end: at });
  }
  return spans;
}

/** A maker's ordinary and overtime hours together. */
export function allHours(maker: Maker): Span[] {
  return spansWithAtLeast([maker.shifts, maker.overtime], 1);
}

/**
 * The widest hours in which a stage could possibly be worked on: enough makers of each craft there and, for each place, one of
 * its bays open. Null where nothing limits it. True for every plan: it ignores who is busy and that a crew stays the same.
 */
export function possibleHours(
  problem: Problem,
  crew: readonly CrewNeed[],
  places: readonly PlaceNeed[],
): readonly Span[] | null {
  const needed: Span[][] = [];
  for (const { craftId, least } of crew) {
    if (least <= 0) continue;
    const holders = problem.makers.filter((maker) => maker.crafts.some((craft) => craft.craftId === craftId));
    needed.push(spansWithAtLeast(holders.map(allHours), least));
  }
  for (const { bayIds } of places) {
    const bays = problem.bays.filter((bay) => bayIds.includes(bay.id));
    if (bays.some((bay) => bay.open === null)) continue;
    needed.push(
      spansWithAtLeast(
        bays.map((bay) => bay.open ?? []),
        1,
      ),
    );
  }
  return needed.length === 0 ? null : spansWithAtLeast(needed, needed.length);
}
