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
  const ordinary = makers.map((maker) => new Calendar(maker.shifts, origin, end - origin));
  const extended = makers.map((maker) => {
    const overtime = maker.limits ? overtimeWithinLimits(problem.days, maker) : maker.overtime;
    return new Calendar([...maker.shifts, ...overtime], origin, end - origin);
  });
  return {
    ordinary,
    extended,
    hasOvertime: Uint8Array.from(makers, (maker) => (maker.overtime.length > 0 ? 1 : 0)),
    hourCost: Float64Array.from(makers, (maker) => (maker.paidByTheHour === true ? maker.hourCostMinor : 0)),
    overtimeCost: Float64Array.from(makers, (maker) => maker.overtimeHourCostMinor),
  };
}

function overtimeWithinLimits(days: readonly StudioDay[], maker: Maker): Span[] {
  const limits = maker.limits;
  if (!limits) return [...maker.overtime];
  const kept: Span[] = [];
  const weekLeft = weekAllowances(days, maker, limits.weekMinutes);
  days.forEach((day, d) => {
    const shiftMinutes = minutesWithin(maker.shifts, day);
    const nextShift = maker.shifts.find((shift) => shift.start >= day.end);
    const previous = lastEnd([...maker.shifts, ...kept], day.start);
    let left = Math.min(limits.dayMinutes - shiftMinutes, weekLeft[weekOf(day)]);
    for (const span of maker.overtime) {
      const start = Math.max(span.start, day.start, previous + limits.restBetweenMinutes);
      const latest = (nextShift?.start ?? Infinity) - limits.restBetweenMinutes;
      const end = Math.min(span.end, days[d].end, latest, start + Math.max(0, left));
      if (end <= start) continue;
      kept.push({ start, end });
      left -= end - start;
      weekLeft[weekOf(day)] -= end - start;
    }
  });
  return kept;
}

function weekAllowances(days: readonly StudioDay[], maker: Maker, weekMinutes: number): Record<number, number> {
  const left: Record<number, number> = {};
  for (const day of days) {
    const week = weekOf(day);
    left[week] = (left[week] ?? weekMinutes) - minutesWithin(maker.shifts, day);
  }
  return left;
}

/** Weeks counted from the Monday 1970-01-05. */
function weekOf(day: StudioDay): number {
  return Math.floor((Date.parse(`${day.day}T00:00:00Z`) / 86_400_000 - 4) / 7);
}

function minutesWithin(spans: readonly Span[], day: Span): number {
  return spans.reduce((sum, span) => sum + Math.max(0, Math.min(span.end, day.end) - Math.max(span.start, day.start)), 0);
}

/** The end of the last span that starts before an instant. */
function lastEnd(spans: readonly Span[], instant: number): number {
  return spans.reduce((last, span) => (span.start < instant ? Math.max(last, span.end) : last), -Infinity);
}
