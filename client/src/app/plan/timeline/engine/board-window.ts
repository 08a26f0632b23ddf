import type { BoardLayout, LaidRow, LaidTape } from './board-layout';

/** The part of the wall that is looked at, in its own pixels; `bottom` and `right` are outside. */
export interface BoardWindow {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** What is drawn beyond each edge, so that a quick scroll doesn't meet bare plaster. */
const OVERSCAN_PX = 240;

/**
 * A window with room around it, in whole steps of that room: while one scrolls inside a step, what is drawn stays the same and
 * nothing is worked out anew.
 */
export function withOverscan(window: BoardWindow): BoardWindow {
  const before = (edge: number): number => (Math.floor(edge / OVERSCAN_PX) - 1) * OVERSCAN_PX;
  const after = (edge: number): number => (Math.ceil(edge / OVERSCAN_PX) + 1) * OVERSCAN_PX;
  return {
    left: before(window.left),
    top: before(window.top),
    right: after(window.right),
    bottom: after(window.bottom),
  };
}

/** Whether two windows show the same. */
export function sameWindow(a: BoardWindow, b: BoardWindow): boolean {
  return a.left === b.left && a.top === b.top && a.right === b.right && a.bottom === b.bottom;
}

/** The rows that a window touches, found by halving: rows follow each other from the top. */
export function rowsIn(layout: BoardLayout, window: BoardWindow): readonly LaidRow[] {
  const first = firstIndex(layout.rows, (row) => row.top + row.height > window.top);
  const last = firstIndex(layout.rows, (row) => row.top >= window.bottom);
  return layout.rows.slice(first, last);
}

/** The tapes of a row that a window touches from side to side. */
export function tapesIn(row: LaidRow, window: BoardWindow): readonly LaidTape[] {
  return row.tapes.filter((tape) => tape.x < window.right && tape.x + tape.width > window.left);
}

/** The row at a height on the wall; null above the first and below the last. */
export function rowAt(layout: BoardLayout, y: number): LaidRow | null {
  if (y < 0) return null;
  const index = firstIndex(layout.rows, (row) => row.top + row.height > y);
  return layout.rows[index] ?? null;
}

/** The tape under a point, the one drawn last where two lie there; null on bare wall. `height` is a tape's own. */
export function tapeAt(
  layout: BoardLayout,
  point: { readonly x: number; readonly y: number },
  height: number,
): LaidTape | null {
  const row = rowAt(layout, point.y);
  const hit = row?.tapes.filter(
    (tape) => point.x >= tape.x && point.x < tape.x + tape.width && point.y >= tape.y && point.y < tape.y + height,
  );
  return hit?.at(-1) ?? null;
}

/** Every laid tape of a stage, in the order of the rows. */
export function tapesOf(layout: BoardLayout, stageId: string): readonly LaidTape[] {
  return layout.rows.flatMap((row) => row.tapes.filter((laid) => laid.tape.stageId === stageId));
}

function firstIndex<T>(items: readonly T[], holds: (item: T) => boolean): number {
  let low = 0;
  let high = items.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (holds(items[middle])) high = middle;
    else low = middle + 1;
  }
  return low;
}
