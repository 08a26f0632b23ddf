import type { Minute } from '../../time/span';
import type { TimeArc, TimeNetwork } from './time-network';

/** What longest paths through a network give: the earliest or latest instant of each node, or arcs that cannot all hold. */
export interface PathResult {
  readonly instants: Float64Array;
  /** By node: the arc that gave its instant, null where that was given. */
  readonly parents: readonly (TimeArc | null)[];
  /** A cycle of arcs that asks an instant to be after itself, in the order of time; null where there is none. */
  readonly cycle: readonly TimeArc[] | null;
}

/** Rounds of relaxation after which labels that still creep along calendars are left as they are: they stay true bounds. */
const MAX_ROUNDS = 1000;

/** Earliest instants by Bellman–Ford label correction (Bellman 1958, Ford 1956), for arcs that may be any monotone functions. */
export function earliestInstants(network: TimeNetwork): PathResult {
  const labels = Float64Array.from(network.notBefore);
  const leaving = arcsBy(network, (arc) => arc.from);
  return correctLabels(
    labels,
    leaving,
    (arc) => arc.to,
    (arc, at) => arc.reach(at),
    (next, now) => next > now,
  );
}

/** Latest instants, with nothing after `end` but the ends of dwells that may run past it. */
export function latestInstants(network: TimeNetwork, end: Minute): PathResult {
  const labels = Float64Array.from(network.notAfter, (instant) => Math.min(instant, end));
  const entering = arcsBy(network, (arc) => arc.to);
  return correctLabels(
    labels,
    entering,
    (arc) => arc.from,
    (arc, at) => arc.retreat(at),
    (next, now) => next < now,
  );
}

function arcsBy(network: TimeNetwork, node: (arc: TimeArc) => number): TimeArc[][] {
  const lists: TimeArc[][] = network.notBefore.map(() => []);
  for (const arc of network.arcs) lists[node(arc)].push(arc);
  return lists;
}

function correctLabels(
  labels: Float64Array,
  arcsOf: readonly (readonly TimeArc[])[],
  target: (arc: TimeArc) => number,
  step: (arc: TimeArc, at: Minute) => Minute,
  isTighter: (next: Minute, now: Minute) => boolean,
): PathResult {
  const parents: (TimeArc | null)[] = new Array<TimeArc | null>(labels.length).fill(null);
  let current = [...labels.keys()];
  for (let round = 0; current.length > 0 && round < MAX_ROUNDS + labels.length; round++) {
    const queued = new Set<number>();
    for (const node of current)
      for (const arc of arcsOf[node]) {
        const next = step(arc, labels[node]);
        const to = target(arc);
        if (!isTighter(next, labels[to])) continue;
        labels[to] = next;
        parents[to] = arc;
        queued.add(to);
      }
    if (round % 8 === 7) {
      const cycle = impossibleCycle(parents, (arc) => (target(arc) === arc.to ? arc.from : arc.to));
      if (cycle !== null) return { instants: labels, parents, cycle };
    }
    current = [...queued];
  }
  return { instants: labels, parents, cycle: null };
}

/**
 * A cycle among the parent arcs whose least lags add up to more than nothing: no plan keeps all of them. Where calendars only
 * push labels along for a while, the lags do not add up, and the search goes on.
 */
function impossibleCycle(parents: readonly (TimeArc | null)[], source: (arc: TimeArc) => number): TimeArc[] | null {
  const seenFrom = new Int32Array(parents.length).fill(-1);
  for (let first = 0; first < parents.length; first++) {
    let node = first;
    for (let arc = parents[node]; seenFrom[node] < 0 && arc !== null; arc = parents[node]) {
      seenFrom[node] = first;
      node = source(arc);
    }
    if (seenFrom[node] !== first) continue;
    const cycle = cycleThrough(node, parents, source);
    if (cycle.reduce((sum, arc) => sum + (arc.lag ?? -Infinity), 0) > 0) return cycle;
  }
  return null;
}

function cycleThrough(node: number, parents: readonly (TimeArc | null)[], source: (arc: TimeArc) => number): TimeArc[] {
  const cycle: TimeArc[] = [];
  let at = node;
  do {
    const arc = parents[at];
    if (arc === null) break;
    cycle.push(arc);
    at = source(arc);
  } while (at !== node);
  return cycle.length > 0 && cycle[0].to === node ? cycle.reverse() : cycle;
}
