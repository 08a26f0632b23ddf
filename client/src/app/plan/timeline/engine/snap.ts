import type { Plan, Problem, Stage } from '@common/planning';
import type { Minute, Span } from '@common/time/span';
import { workEnd } from './tape';

/** Starts are put on quarter hours, as on a day sheet. Every zone in use is off UTC by whole quarters. */
export const QUARTER = 15;

/** Where a start may be put down. */
export interface SnapField {
  /** Nothing starts before this. */
  readonly earliest: Minute;
  /** When somebody could begin: sorted, disjoint; null where nobody's hands are needed. */
  readonly workable: readonly Span[] | null;
  /** Instants worth catching on: the end of a cure, the end of the work before. */
  readonly magnets: readonly Minute[];
  /** How near a magnet must be to catch, in minutes. */
  readonly reachMinutes: number;
}

/** The start nearest to `at` that can be put down; where nothing is workable any more, the nearest quarter. */
export function snapStart(at: Minute, field: SnapField): Minute {
  const magnet = nearest(
    field.magnets.filter((minute) => canStart(minute, field)),
    at,
  );
  if (magnet !== null && Math.abs(magnet - at) <= field.reachMinutes) return magnet;
  const quarter = Math.max(ceilQuarter(field.earliest), Math.round(at / QUARTER) * QUARTER);
  if (canStart(quarter, field) || field.workable === null) return quarter;
  return nearest(edgeStarts(field.workable, field.earliest), quarter) ?? quarter;
}

/** The next start `steps` quarters later (earlier where negative), counted only in workable time. */
export function nudgeStart(at: Minute, steps: number, field: SnapField): Minute {
  const direction = Math.sign(steps);
  let start = at;
  for (let left = Math.abs(steps); left > 0; left -= 1) {
    const next = nextQuarter(start, direction, field);
    if (next === null) return start;
    start = next;
  }
  return start;
}

function nextQuarter(at: Minute, direction: number, field: SnapField): Minute | null {
  const beside =
    direction > 0 ? Math.floor(at / QUARTER) * QUARTER + QUARTER : Math.ceil(at / QUARTER) * QUARTER - QUARTER;
  if (canStart(beside, field)) return beside;
  const starts = edgeStarts(field.workable ?? [], field.earliest);
  const beyond = starts.filter((start) => (direction > 0 ? start > at : start < at));
  return nearest(beyond, at);
}

/** When the makers named, or else anyone with the first craft asked for, could begin; null for a stage without a crew. */
export function workableSpans(problem: Problem, stage: Stage, makerIds: readonly string[] | null): Span[] | null {
  if (stage.crew.length === 0) return null;
  const named = problem.makers.filter((maker) => makerIds?.includes(maker.id));
  if (named.length > 0) return named.map(hoursOf).reduce(inBoth);
  const craftId = stage.crew[0].craftId;
  return problem.makers
    .filter((maker) => maker.crafts.some((craft) => craft.craftId === craftId))
    .map(hoursOf)
    .reduce((all, hours) => melt([...all, ...hours]), []);
}

/** Ends of what a stage waits for: the dwells and the work of the stages linked before it. */
export function magnetsOf(problem: Problem, plan: Plan, stageId: string): Minute[] {
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  return problem.links
    .filter((link) => link.toStageId === stageId && link.kind === 'finish-start' && link.time === 'clock')
    .flatMap((link) => {
      const before = placed.get(link.fromStageId);
      if (!before) return [];
      return [(link.after === 'dwell' ? before.dwellEnd : workEnd(before)) + link.minGapMinutes];
    });
}

function canStart(at: Minute, field: SnapField): boolean {
  if (at < field.earliest) return false;
  return field.workable === null || field.workable.some((span) => at >= span.start && at < span.end);
}

/** First minute and last quarter of every stretch that can still be worked in. */
function edgeStarts(workable: readonly Span[], earliest: Minute): Minute[] {
  return workable.flatMap((span) => {
    const first = Math.max(span.start, earliest);
    if (first >= span.end) return [];
    return [first, Math.max(first, Math.floor((span.end - 1) / QUARTER) * QUARTER)];
  });
}

function nearest(minutes: readonly Minute[], at: Minute): Minute | null {
  return minutes.reduce<Minute | null>(
    (best, minute) => (best === null || Math.abs(minute - at) < Math.abs(best - at) ? minute : best),
    null,
  );
}

function ceilQuarter(at: Minute): Minute {
  return Math.ceil(at / QUARTER) * QUARTER;
}

function hoursOf(maker: Problem['makers'][number]): Span[] {
  return melt([...maker.shifts, ...maker.overtime]);
}

function melt(spans: readonly Span[]): Span[] {
  const sorted = [...spans].sort((a, b) => a.start - b.start);
  const merged: { start: Minute; end: Minute }[] = [];
  for (const span of sorted) {
    const last = merged.at(-1);
    if (last && span.start <= last.end) last.end = Math.max(last.end, span.end);
    else merged.push({ ...span });
  }
  return merged;
}

function inBoth(a: readonly Span[], b: readonly Span[]): Span[] {
  return a.flatMap((span) =>
    b
      .map((other) => ({ start: Math.max(span.start, other.start), end: Math.min(span.end, other.end) }))
      .filter((shared) => shared.end > shared.start),
  );
}
