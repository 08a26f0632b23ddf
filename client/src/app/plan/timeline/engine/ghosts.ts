import type { BoardRow } from './board-rows';
import { type BoardLayout, extentOf, laneTop, type LaidRow, type LaidTape } from './board-layout';
import type { TimeScale } from './time-scale';

/** A stage where it would come to stand, drawn over the wall while another is held. */
export interface Ghost extends LaidTape {
  /** Whether the row is another than the one it stands in now. */
  readonly elsewhere: boolean;
}

/**
 * Ghosts of the stages that stand otherwise in `after`. Rows keep their places and heights while a stage is held, so that nothing
 * jumps away from under the hand: a ghost keeps its lane in its own row, and in another takes the first that is free.
 */
export function ghostsOf(
  layout: BoardLayout,
  scale: TimeScale,
  after: readonly BoardRow[],
  moved: ReadonlySet<string>,
): Ghost[] {
  const rowsAfter = new Map(after.map((row) => [row.key, row]));
  return layout.rows.flatMap((laidRow) => ghostsOfRow(laidRow, scale, rowsAfter.get(laidRow.row.key), moved));
}

function ghostsOfRow(
  laidRow: LaidRow,
  scale: TimeScale,
  after: BoardRow | undefined,
  moved: ReadonlySet<string>,
): Ghost[] {
  const stays = laidRow.tapes.filter((laid) => !moved.has(laid.tape.stageId));
  const now = new Map(laidRow.tapes.map((laid) => [laid.tape.stageId, laid]));
  const ghosts: Ghost[] = [];
  for (const tape of after?.tapes ?? []) {
    if (!moved.has(tape.stageId)) continue;
    const extent = extentOf(tape, scale);
    const own = now.get(tape.stageId);
    const lane = own?.lane ?? freeLane(laidRow, extent, [...stays, ...ghosts]);
    ghosts.push({
      tape,
      rowKey: laidRow.row.key,
      lane,
      x: extent.x,
      y: laidRow.top + laneTop(lane),
      width: extent.width,
      room: extent.width,
      elsewhere: own === undefined,
    });
  }
  return ghosts;
}

function freeLane(
  row: LaidRow,
  extent: { readonly x: number; readonly width: number },
  taken: readonly LaidTape[],
): number {
  const lanes = Array.from({ length: row.lanes }, (_, lane) => lane);
  const free = lanes.find((lane) =>
    taken.every((laid) => laid.lane !== lane || laid.x >= extent.x + extent.width || laid.x + laid.width <= extent.x),
  );
  return free ?? row.lanes - 1;
}
