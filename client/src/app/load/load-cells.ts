import type { LoadView } from '@common/contract';
import { mondayOf } from '@common/time/calendar-day';
import { formatDay } from '@common/time/format-instant';

/** How long a stretch one vessel stands for. */
export const GRAINS = ['day', 'week', 'month'] as const;
export type Grain = (typeof GRAINS)[number];

/** One craft, maker or bay over one stretch of time; minutes. */
export interface LoadCell {
  readonly committedMinutes: number;
  readonly tentativeMinutes: number;
  readonly capacityMinutes: number;
  /** Minutes over the brim, summed over the days that run over: a quiet Friday does not help a Monday. */
  readonly overMinutes: number;
  readonly daysOver: number;
}

/** A stretch of time with its heading. */
export interface Stretch {
  /** First day that is in it. */
  readonly key: string;
  readonly title: string;
}

/** A load view poured into stretches of time. */
export interface LoadTable {
  readonly stretches: readonly Stretch[];
  readonly rows: readonly { readonly id: string; readonly name: string; readonly cells: readonly LoadCell[] }[];
}

const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

/** Sums a load view by day, week or month. Days on which nobody works and nothing is asked are left out. */
export function loadTable(view: LoadView, grain: Grain): LoadTable {
  const groups = new Map<string, number[]>();
  view.days.forEach((day, index) => {
    if (grain === 'day' && isIdle(view, index)) return;
    const key = keyOf(day, grain);
    groups.set(key, [...(groups.get(key) ?? []), index]);
  });
  return {
    stretches: [...groups.keys()].map((key) => ({ key, title: titleOf(key, grain) })),
    rows: view.rows.map((row) => ({
      id: row.id,
      name: row.name,
      cells: [...groups.values()].map((days) => sumCell(row, days)),
    })),
  };
}

function sumCell(row: LoadView['rows'][number], days: readonly number[]): LoadCell {
  const sum = (minutes: readonly number[]): number => days.reduce((total, day) => total + (minutes[day] ?? 0), 0);
  const overs = days.map((day) => Math.max(0, (row.loadMinutes[day] ?? 0) - (row.capacityMinutes[day] ?? 0)));
  const tentativeMinutes = sum(row.tentativeMinutes);
  return {
    committedMinutes: Math.max(0, sum(row.loadMinutes) - tentativeMinutes),
    tentativeMinutes,
    capacityMinutes: sum(row.capacityMinutes),
    overMinutes: overs.reduce((total, over) => total + over, 0),
    daysOver: overs.filter((over) => over > 0).length,
  };
}

function isIdle(view: LoadView, day: number): boolean {
  return view.rows.every((row) => (row.loadMinutes[day] ?? 0) === 0 && (row.capacityMinutes[day] ?? 0) === 0);
}

function keyOf(day: string, grain: Grain): string {
  if (grain === 'day') return day;
  return grain === 'week' ? mondayOf(day) : `${day.slice(0, 7)}-01`;
}

function titleOf(key: string, grain: Grain): string {
  if (grain === 'day') return formatDay(key);
  const [year, month, date] = key.split('-').map(Number);
  return grain === 'week' ? `Week of ${date} ${MONTHS[month - 1].slice(0, 3)}` : `${MONTHS[month - 1]} ${year}`;
}
