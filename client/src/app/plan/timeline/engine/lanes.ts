/** Something with an extent along one axis, in pixels. */
export interface Extent {
  readonly from: number;
  readonly to: number;
}

/** A lane for each extent, in the order given, and how many lanes that takes; at least one. */
export interface Lanes {
  readonly laneOf: readonly number[];
  readonly count: number;
}

/**
 * Puts extents into as few lanes as their overlap allows (interval partitioning: taken by their start, each goes into the first
 * lane that is free). Extents that only touch share a lane. Ties are settled by the order given, so that a redraw moves nothing.
 */
export function packLanes(extents: readonly Extent[]): Lanes {
  const order = extents.map((_, index) => index).sort((a, b) => extents[a].from - extents[b].from || a - b);
  const laneEnds: number[] = [];
  const laneOf = new Array<number>(extents.length).fill(0);
  for (const index of order) {
    const { from, to } = extents[index];
    const free = laneEnds.findIndex((end) => end <= from);
    const lane = free >= 0 ? free : laneEnds.length;
    laneEnds[lane] = Math.max(to, from);
    laneOf[index] = lane;
  }
  return { laneOf, count: Math.max(1, laneEnds.length) };
}
