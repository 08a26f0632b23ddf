import type { Span } from '../../time/span';
import type { CrewNeed, Maker, PlaceNeed, Problem } from '../problem/problem';
import { WorkingMeasure } from './working-measure';

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
 * The widest hours in which stages could possibly be worked on, remembered by what they ask for, since many ask for the same.
 * True for every plan: who is busy, and that a crew stays the same, is left out.
 */
export class PossibleHours {
  private readonly known = new Map<string, WorkingMeasure | null>();

  constructor(private readonly problem: Problem) {}

  /** Hours with enough makers of each craft there and, for each place, one of its bays open; null where nothing limits them. */
  of(crew: readonly CrewNeed[], places: readonly PlaceNeed[]): WorkingMeasure | null {
    const key = JSON.stringify([crew.map((need) => [need.craftId, need.least]), places.map((place) => place.bayIds)]);
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const hours = this.find(crew, places);
    this.known.set(key, hours);
    return hours;
  }

  private find(crew: readonly CrewNeed[], places: readonly PlaceNeed[]): WorkingMeasure | null {
    const { makers, bays } = this.problem;
    const needed: Span[][] = [];
    for (const { craftId, least } of crew) {
      if (least <= 0) continue;
      const holders = makers.filter((maker) => maker.crafts.some((craft) => craft.craftId === craftId));
      needed.push(spansWithAtLeast(holders.map(allHours), least));
    }
    for (const { bayIds } of places) {
      const choice = bays.filter((bay) => bayIds.includes(bay.id));
      if (choice.length === 0 || choice.some((bay) => bay.open === null)) continue;
      needed.push(
        spansWithAtLeast(
          choice.map((bay) => bay.open ?? []),
          1,
        ),
      );
    }
    return needed.length === 0 ? null : new WorkingMeasure(spansWithAtLeast(needed, needed.length));
  }
}
