import type { WorkingPlanView } from '@common/contract';
import { type DaySpan, daySpansIn } from '@common/time/calendar-day';
import type { CalendarDay, Minute, Span } from '@common/time/span';
import type { DateMargin } from '../date-margins';
import { workEnd, workStart } from '../timeline/engine/tape';

/** Hands-on work of one stage on one day. */
export interface DayWork {
  readonly stageId: string;
  /** First and last minute that anybody is at it that day. */
  readonly span: Span;
  /** Whether it began on an earlier day, and whether it goes on on a later one. */
  readonly goesOn: 'whole' | 'begins' | 'continues' | 'ends';
}

/** What happens on one day, read from the wall. */
export interface DayEntry {
  readonly day: CalendarDay;
  readonly start: Minute;
  readonly work: readonly DayWork[];
  /** Stages whose dwell ends that day: they may be touched again. */
  readonly firm: readonly { readonly stageId: string; readonly at: Minute }[];
  readonly dates: readonly DateMargin[];
}

/** A plan read day by day from today on, quiet days left out; at most `most` days. */
export function readDays(view: WorkingPlanView, margins: readonly DateMargin[], most: number): DayEntry[] {
  const last = view.plan.placements.reduce((end, placement) => Math.max(end, placement.dwellEnd), view.now);
  const dates = margins.reduce((end, one) => Math.max(end, one.keyDate.at), last);
  const days = daySpansIn({ start: view.now, end: dates + 1 }, view.zone);
  return days
    .map((day) => readDay(day, view, margins))
    .filter((entry) => entry.work.length + entry.firm.length + entry.dates.length > 0)
    .slice(0, most);
}

function readDay(day: DaySpan, view: WorkingPlanView, margins: readonly DateMargin[]): DayEntry {
  const within = (at: Minute): boolean => at >= day.start && at < day.end;
  const placements = view.plan.placements.filter((placement) => placement.work.length > 0);
  const work = placements.flatMap((placement): DayWork[] => {
    const spans = placement.work.filter(
      (span) => span.start < day.end && Math.max(span.end, span.start + 1) > day.start,
    );
    if (spans.length === 0) return [];
    const span = { start: Math.max(day.start, spans[0].start), end: Math.min(day.end, spans[spans.length - 1].end) };
    const before = workStart(placement) < day.start;
    const after = workEnd(placement) > day.end;
    const goesOn = before ? (after ? 'continues' : 'ends') : after ? 'begins' : 'whole';
    return [{ stageId: placement.stageId, span, goesOn }];
  });
  const firm = placements
    .filter((placement) => placement.dwellEnd > workEnd(placement) && within(placement.dwellEnd))
    .map((placement) => ({ stageId: placement.stageId, at: placement.dwellEnd }));
  return {
    day: day.day,
    start: day.start,
    work: work.sort((a, b) => a.span.start - b.span.start || (a.stageId < b.stageId ? -1 : 1)),
    firm: firm.sort((a, b) => a.at - b.at),
    dates: margins.filter((one) => within(one.keyDate.at)),
  };
}
