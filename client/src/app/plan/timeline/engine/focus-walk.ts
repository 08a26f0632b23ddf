import type { BoardLayout, LaidRow, LaidTape } from './board-layout';

/** A step that an arrow key asks for among the tapes of the wall. */
export type WalkStep = 'earlier' | 'later' | 'above' | 'below' | 'row-start' | 'row-end' | 'first' | 'last';

/** A tape on the wall by where it hangs: one stage may hang in several rows. */
export interface TapeKey {
  readonly rowKey: string;
  readonly stageId: string;
}

/** The tape to go to; null where there is none that way, so that the focus stays. From nowhere, the first of all. */
export function walk(layout: BoardLayout, from: TapeKey | null, step: WalkStep): LaidTape | null {
  const rows = layout.rows.filter((row) => row.tapes.length > 0);
  const rowIndex = rows.findIndex((row) => row.row.key === from?.rowKey);
  const current = rows[rowIndex]?.tapes.find((laid) => laid.tape.stageId === from?.stageId);
  if (!current) return firstOf(rows[0]);
  const row = inOrder(rows[rowIndex]);
  const at = row.indexOf(current);
  switch (step) {
    case 'earlier':
      return row[at - 1] ?? lastOf(rows[rowIndex - 1]);
    case 'later':
      return row[at + 1] ?? firstOf(rows[rowIndex + 1]);
    case 'above':
      return nearestIn(rows[rowIndex - 1], current);
    case 'below':
      return nearestIn(rows[rowIndex + 1], current);
    case 'row-start':
      return row[0];
    case 'row-end':
      return row[row.length - 1];
    case 'first':
      return firstOf(rows[0]);
    case 'last':
      return lastOf(rows[rows.length - 1]);
  }
}

function inOrder(row: LaidRow): LaidTape[] {
  return [...row.tapes].sort((a, b) => a.x - b.x || a.lane - b.lane);
}

function firstOf(row: LaidRow | undefined): LaidTape | null {
  return row ? inOrder(row)[0] : null;
}

function lastOf(row: LaidRow | undefined): LaidTape | null {
  return row ? (inOrder(row).at(-1) ?? null) : null;
}

function nearestIn(row: LaidRow | undefined, current: LaidTape): LaidTape | null {
  if (!row) return null;
  return inOrder(row).reduce((best, laid) =>
    Math.abs(laid.x - current.x) < Math.abs(best.x - current.x) ? laid : best,
  );
}
