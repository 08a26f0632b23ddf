/** How near to an edge the hand must be for the wall to start sliding, and how fast it slides at the edge itself. */
const EDGE_PX = 56;
const FASTEST_PX_PER_SECOND = 900;

/** A stretch of the screen along one axis, in pixels. */
export interface EdgeWindow {
  readonly from: number;
  readonly to: number;
}

/** Pixels a second to scroll while a stage is held near an edge: 0 inside, rising as the square towards and past it. */
export function edgeSpeed(pointer: number, window: EdgeWindow): number {
  const room = Math.min(EDGE_PX, Math.max(1, (window.to - window.from) / 4));
  const early = depth(window.from + room - pointer, room);
  const late = depth(pointer - (window.to - room), room);
  return (late * late - early * early) * FASTEST_PX_PER_SECOND;
}

function depth(into: number, room: number): number {
  return Math.min(1, Math.max(0, into / room));
}
