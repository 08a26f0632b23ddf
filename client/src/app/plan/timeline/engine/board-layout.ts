import type { BoardRow } from './board-rows';
import { packLanes } from './lanes';
import type { Tape } from './tape';
import { type TimeScale, xOf } from './time-scale';

/** Heights in pixels; a tape is tall enough for a finger with the room around it (WCAG 2.2, 2.5.8). */
export const TAPE_HEIGHT = 26;
export const LANE_GAP = 4;
export const ROW_PADDING = 5;
/** Narrower than this a tape could not be hit; it is drawn true and taken hold of wider. */
export const LEAST_TAPE_WIDTH = 14;
export const FLAG_HEIGHT = 22;
const LEAST_HEAD_HEIGHT = 40;

/** A tape with its place on the wall; `x` and `y` in pixels from the wall's own corner. */
export interface LaidTape {
  readonly tape: Tape;
  readonly rowKey: string;
  readonly lane: number;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  /** Pixels from its own start to the next tape in its lane; infinite where none follows. What may be written there. */
  readonly room: number;
}

/** A row with its place on the wall. */
export interface LaidRow {
  readonly row: BoardRow;
  readonly top: number;
  readonly height: number;
  readonly lanes: number;
  readonly tapes: readonly LaidTape[];
}

/** The whole wall, laid out; rows in order from the top, without gaps. */
export interface BoardLayout {
  readonly rows: readonly LaidRow[];
  readonly width: number;
  readonly height: number;
}

/** Lays rows out on a scale. `flagLanes` says how many lines of flags a production's own row has to carry. */
export function layOutBoard(
  rows: readonly BoardRow[],
  scale: TimeScale,
  flagLanes: ReadonlyMap<string, number>,
): BoardLayout {
  const laid: LaidRow[] = [];
  let top = 0;
  for (const row of rows) {
    const next =
      row.kind === 'production' ? layOutHead(row, top, flagLanes.get(row.id) ?? 0) : layOutRow(row, top, scale);
    laid.push(next);
    top += next.height;
  }
  return { rows: laid, width: scale.width, height: top };
}

function layOutHead(row: BoardRow, top: number, flags: number): LaidRow {
  const height = Math.max(LEAST_HEAD_HEIGHT, flags * (FLAG_HEIGHT + 2) + 8);
  return { row, top, height, lanes: 0, tapes: [] };
}

function layOutRow(row: BoardRow, top: number, scale: TimeScale): LaidRow {
  const drawn = row.tapes.map((tape) => extentOf(tape, scale));
  const { laneOf, count } = packLanes(drawn.map(({ x, width }) => ({ from: x, to: x + width })));
  const rooms = roomsOf(drawn, laneOf);
  const tapes = row.tapes.map((tape, index) => ({
    tape,
    rowKey: row.key,
    lane: laneOf[index],
    x: drawn[index].x,
    y: top + laneTop(laneOf[index]),
    width: drawn[index].width,
    room: rooms[index],
  }));
  return { row, top, height: rowHeight(count), lanes: count, tapes };
}

function roomsOf(drawn: readonly { readonly x: number }[], laneOf: readonly number[]): number[] {
  const rooms = new Array<number>(drawn.length).fill(Infinity);
  const nextX = new Map<number, number>();
  const backwards = drawn.map((_, index) => index).sort((a, b) => drawn[b].x - drawn[a].x || b - a);
  for (const index of backwards) {
    rooms[index] = (nextX.get(laneOf[index]) ?? Infinity) - drawn[index].x;
    nextX.set(laneOf[index], drawn[index].x);
  }
  return rooms;
}

/** Where a tape begins and how wide it is taken hold of. */
export function extentOf(tape: Tape, scale: TimeScale): { readonly x: number; readonly width: number } {
  const x = xOf(scale, tape.span.start);
  return { x, width: Math.max(LEAST_TAPE_WIDTH, xOf(scale, tape.span.end) - x) };
}

/** Pixels from a row's top to a lane's. */
export function laneTop(lane: number): number {
  return ROW_PADDING + lane * (TAPE_HEIGHT + LANE_GAP);
}

function rowHeight(lanes: number): number {
  return laneTop(lanes) - LANE_GAP + ROW_PADDING;
}
