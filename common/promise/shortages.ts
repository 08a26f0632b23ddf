import { bayLoad, craftLoad, makerLoad, type LoadRow, type Plan, type Problem } from '../planning';
import { mondayOf } from '../time/calendar-day';
import type { CalendarDay } from '../time/span';

/** One craft or bay, week by week, in person-minutes or minutes of a place. */
export interface ShortRow {
  readonly id: string;
  /** What the plan asks without the enquiry; for a craft, with what its makers do in other crafts. */
  readonly takenMinutes: readonly number[];
  /** What the enquiry would ask on top, had it the studio to itself. */
  readonly askedMinutes: readonly number[];
  readonly capacityMinutes: readonly number[];
  /** What both ask beyond capacity, summed over the days that run over: a quiet Friday does not help a Monday. */
  readonly shortMinutes: readonly number[];
}

/** Where the studio is short, by weeks that begin on Monday; only rows of which the enquiry asks something. */
export interface Shortages {
  readonly weeks: readonly CalendarDay[];
  readonly crafts: readonly ShortRow[];
  readonly bays: readonly ShortRow[];
}

/**
 * Sets the load of the enquiry, laid out as if the studio were free (`alone`), on the load of the plan without it (`others`), by the
 * arithmetic of the load page. A maker with several crafts works in one at a time, so what a craft's makers do in others is taken.
 */
export function shortagesOf(problem: Problem, others: Plan, alone: Plan): Shortages {
  const weeks = [...new Set(problem.days.map(({ day }) => mondayOf(day)))];
  const elsewhere = minutesElsewhere(problem, others);
  const rowsOf = (load: typeof craftLoad): ShortRow[] => {
    const taken = new Map(load(problem, others).map((row) => [row.id, row]));
    return load(problem, alone)
      .filter(({ cells }) => cells.some(({ loadMinutes }) => loadMinutes > 0))
      .map((row) => byWeek(weeks, row, taken.get(row.id), load === craftLoad ? elsewhere(row.id) : null));
  };
  return trimmed({ weeks, crafts: rowsOf(craftLoad), bays: rowsOf(bayLoad) });
}

/** Minutes by day that those who hold a craft are at work in other crafts. */
function minutesElsewhere(problem: Problem, plan: Plan): (craftId: string) => readonly number[] {
  const ofMaker = new Map(makerLoad(problem, plan).map((row) => [row.id, row]));
  const ofCraft = new Map(craftLoad(problem, plan).map((row) => [row.id, row]));
  return (craftId) => {
    const holders = problem.makers.filter(({ crafts }) => crafts.some((craft) => craft.craftId === craftId));
    return problem.days.map((_, d) => {
      const all = holders.reduce((sum, { id }) => sum + (ofMaker.get(id)?.cells[d].loadMinutes ?? 0), 0);
      return Math.max(0, all - (ofCraft.get(craftId)?.cells[d].loadMinutes ?? 0));
    });
  };
}

function byWeek(
  weeks: readonly CalendarDay[],
  asked: LoadRow,
  taken: LoadRow | undefined,
  elsewhere: readonly number[] | null,
): ShortRow {
  const place = new Map(weeks.map((week, k) => [week, k]));
  const sums = { taken: weeks.map(() => 0), asked: weeks.map(() => 0), capacity: weeks.map(() => 0) };
  const short = weeks.map(() => 0);
  asked.cells.forEach((cell, d) => {
    const week = place.get(mondayOf(cell.day)) ?? 0;
    const already = (taken?.cells[d].loadMinutes ?? 0) + (elsewhere?.[d] ?? 0);
    sums.taken[week] += already;
    sums.asked[week] += cell.loadMinutes;
    sums.capacity[week] += cell.capacityMinutes;
    // Where the plan itself runs over, the enquiry is short by what it asks, not by what others owe.
    short[week] += Math.min(cell.loadMinutes, Math.max(0, already + cell.loadMinutes - cell.capacityMinutes));
  });
  const whole = (values: readonly number[]): number[] => values.map(Math.round);
  return {
    id: asked.id,
    takenMinutes: whole(sums.taken),
    askedMinutes: whole(sums.asked),
    capacityMinutes: whole(sums.capacity),
    shortMinutes: whole(short),
  };
}

/** Up to the last week in which the enquiry asks anything. */
function trimmed({ weeks, crafts, bays }: Shortages): Shortages {
  const isAsked = (_: CalendarDay, k: number): boolean =>
    [...crafts, ...bays].some(({ askedMinutes }) => askedMinutes[k] > 0);
  const count = weeks.findLastIndex(isAsked) + 1;
  const cut = (row: ShortRow): ShortRow => ({
    id: row.id,
    takenMinutes: row.takenMinutes.slice(0, count),
    askedMinutes: row.askedMinutes.slice(0, count),
    capacityMinutes: row.capacityMinutes.slice(0, count),
    shortMinutes: row.shortMinutes.slice(0, count),
  });
  return { weeks: weeks.slice(0, count), crafts: crafts.map(cut), bays: bays.map(cut) };
}
