import type { Span } from '../../time/span';
import type { Maker, Problem, StudioDay } from '../problem/problem';
import { Calendar } from './calendar';
import type { CompiledMakers } from './compiled';

/**
 * Makers' calendars. Limits are kept by cutting overtime down to what they bear beside all ordinary shifts, so that any use of
 * an extended calendar keeps them.
 */
export function compileMakers(problem: Problem, makers: readonly Maker[]): CompiledMakers {
  const { start: origin, end } = problem.horizon;
  const weeks = Int32Array.from(problem.days, weekOf);
  const ordinary = makers.map((maker) => Calendar.of(maker.shifts, origin, end - origin));
  const extended = makers.map((maker) => {
    const overtime = maker.limits ? overtimeWithinLimits(problem.days, maker, weeks) : maker.overtime;
    return Calendar.of([...maker.shifts, ...overtime], origin, end - origin);
  });
  return {
    ordinary,
    extended,
    hasOvertime: Uint8Array.from(makers, (maker) => (maker.overtime.length > 0 ? 1 : 0)),
    hourCost: Float64Array.from(makers, (maker) => (maker.paidByTheHour === true ? maker.hourCostMinor : 0)),
    overtimeCost: Float64Array.from(makers, (maker) => maker.overtimeHourCostMinor),
  };
}

/** Walks the days once with both lists of spans in step; what is cut off is what a limit would not bear. */
function overtimeWithinLimits(days: readonly StudioDay[], maker: Maker, weeks: Int32Array): Span[] {
  const { limits, shifts, overtime } = maker;
  if (!limits) return [...overtime];
  const kept: Span[] = [];
  const weekLeft = weekAllowances(days, maker, limits.weekMinutes, weeks);
  let nextShift = 0;
  let nextOvertime = 0;
  let lastEnd = -Infinity;
  days.forEach((day, d) => {
    const restedFrom = lastEnd + limits.restBetweenMinutes;
    let left = Math.min(limits.dayMinutes - minutesWithin(shifts, day), weekLeft.get(weeks[d]) ?? 0);
    for (; nextShift < shifts.length && shifts[nextShift].start < day.end; nextShift += 1)
      lastEnd = Math.max(lastEnd, shifts[nextShift].end);
    const restFrom = (shifts[nextShift]?.start ?? Infinity) - limits.restBetweenMinutes;
    while (nextOvertime < overtime.length && overtime[nextOvertime].end <= day.start) nextOvertime += 1;
    for (let i = nextOvertime; i < overtime.length && overtime[i].start < day.end; i += 1) {
      const start = Math.max(overtime[i].start, day.start, restedFrom);
      const end = Math.min(overtime[i].end, day.end, restFrom, start + Math.max(0, left));
      if (end <= start) continue;
      kept.push({ start, end });
      left -= end - start;
      weekLeft.set(weeks[d], (weekLeft.get(weeks[d]) ?? 0) - (end - start));
      lastEnd = Math.max(lastEnd, end);
    }
  });
  return kept;
}

function weekAllowances(
  days: readonly StudioDay[],
  maker: Maker,
  weekMinutes: number,
  weeks: Int32Array,
): Map<number, number> {
  const left = new Map<number, number>();
  days.forEach((day, d) => left.set(weeks[d], (left.get(weeks[d]) ?? weekMinutes) - minutesWithin(maker.shifts, day)));
  return left;
}

/** Weeks counted from the Monday 1970-01-05. */
function weekOf(day: StudioDay): number {
  return Math.floor((Date.parse(`${day.day}T00:00:00Z`) / 86_400_000 - 4) / 7);
}

function minutesWithin(spans: readonly Span[], day: Span): number {
  let low = 0;
  let high = spans.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (spans[middle].end > day.start) high = middle;
    else low = middle + 1;
  }
  let minutes = 0;
  for (let i = low; i < spans.length && spans[i].start < day.end; i += 1) {
    minutes += Math.min(spans[i].end, day.end) - Math.max(spans[i].start, day.start);
  }
  return minutes;
}
