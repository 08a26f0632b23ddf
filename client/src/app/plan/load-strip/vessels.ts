import type { LoadRow } from '@common/planning';
import type { CalendarDay, Span } from '@common/time/span';
import { type TimeScale, xOf } from '../timeline/engine/time-scale';

/** A day of a craft as a vessel: its brim is the capacity, what is poured in the load; what does not fit stands over the brim. */
export interface Vessel {
  readonly day: CalendarDay;
  readonly x: number;
  readonly width: number;
  /** Pixels from the floor of the row. */
  readonly brim: number;
  readonly level: number;
  readonly loadMinutes: number;
  readonly capacityMinutes: number;
  /** Minutes over the brim; 0 where all fits. */
  readonly overMinutes: number;
}

/** A craft's days in order. */
export interface VesselRow {
  readonly id: string;
  readonly vessels: readonly Vessel[];
  readonly overMinutes: number;
}

/** Height of a row of vessels in pixels; the tallest of the row, brim or level, comes up to just below it. */
export const VESSEL_ROW_HEIGHT = 40;
const HEADROOM = 9;

interface VesselInput {
  readonly rows: readonly LoadRow[];
  readonly days: readonly (Span & { readonly day: CalendarDay })[];
  readonly lit: readonly Span[];
  readonly scale: TimeScale;
}

/** Vessels for every craft that is asked for at all, the most overfull first, then the fullest. */
export function pourVessels({ rows, days, lit, scale }: VesselInput): VesselRow[] {
  const spans = new Map(days.map((day) => [day.day, litPart(day, lit)]));
  return rows
    .filter((row) => row.cells.some((cell) => cell.loadMinutes > 0))
    .map((row) => pourRow(row, spans, scale))
    .sort((a, b) => b.overMinutes - a.overMinutes || fullness(b) - fullness(a) || (a.id < b.id ? -1 : 1));
}

function pourRow(row: LoadRow, spans: ReadonlyMap<CalendarDay, Span | null>, scale: TimeScale): VesselRow {
  const tallest = row.cells.reduce((most, cell) => Math.max(most, cell.loadMinutes, cell.capacityMinutes), 1);
  const pxPerMinute = (VESSEL_ROW_HEIGHT - HEADROOM) / tallest;
  const vessels = row.cells.flatMap((cell): Vessel[] => {
    const span = spans.get(cell.day);
    if (!span || (cell.loadMinutes === 0 && cell.capacityMinutes === 0)) return [];
    const x = xOf(scale, span.start);
    return [
      {
        day: cell.day,
        x,
        width: Math.max(1, xOf(scale, span.end) - x - 1),
        brim: cell.capacityMinutes * pxPerMinute,
        level: cell.loadMinutes * pxPerMinute,
        loadMinutes: cell.loadMinutes,
        capacityMinutes: cell.capacityMinutes,
        overMinutes: Math.max(0, cell.loadMinutes - cell.capacityMinutes),
      },
    ];
  });
  return { id: row.id, vessels, overMinutes: vessels.reduce((sum, vessel) => sum + vessel.overMinutes, 0) };
}

/** A day is drawn as wide as its working hours; a day without them as wide as itself. */
function litPart(day: Span, lit: readonly Span[]): Span {
  const within = lit.filter((span) => span.start < day.end && span.end > day.start);
  if (within.length === 0) return day;
  return { start: Math.max(day.start, within[0].start), end: Math.min(day.end, within[within.length - 1].end) };
}

function fullness(row: VesselRow): number {
  const load = row.vessels.reduce((sum, vessel) => sum + vessel.loadMinutes, 0);
  return (
    load /
    Math.max(
      1,
      row.vessels.reduce((sum, vessel) => sum + vessel.capacityMinutes, 0),
    )
  );
}
