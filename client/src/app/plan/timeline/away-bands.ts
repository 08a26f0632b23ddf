import type { BoardStore } from './board-store';
import type { LaidRow } from './engine/board-layout';
import { unlitStretches } from './engine/lit-time';
import { minuteAt, xOf } from './engine/time-scale';

/** A stretch of the wall in pixels. */
export interface Band {
  readonly x: number;
  readonly width: number;
}

/** Absences and openings shorter than these, in minutes, are not worth a band. */
const LEAST_AWAY = 90;
const LEAST_LIT = 30;

/** A maker's leave, a bay's closed hours: dark in a row while the studio is lit. */
export function awayBands(row: LaidRow, board: BoardStore): readonly Band[] {
  const lit = row.row.lit;
  if (lit === null) return [];
  const { left, right } = board.drawn();
  const scale = board.scale();
  const frame = { start: minuteAt(scale, left), end: minuteAt(scale, right) };
  const away = unlitStretches(frame, lit).filter((span) => span.end - span.start > LEAST_AWAY);
  return board
    .lit()
    .flatMap((light) =>
      away.map((dark) => ({ start: Math.max(light.start, dark.start), end: Math.min(light.end, dark.end) })),
    )
    .filter((span) => span.end - span.start > LEAST_LIT)
    .map((span) => ({ x: xOf(scale, span.start), width: xOf(scale, span.end) - xOf(scale, span.start) }));
}
