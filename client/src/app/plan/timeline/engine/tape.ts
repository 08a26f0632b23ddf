import type { Placement, Plan, Problem, Stage } from '@common/planning';
import type { Minute, Span } from '@common/time/span';

/** One part of a stage as drawn: hands on it, done already, someone staying by it, setting by itself, or keeping its bay. */
export interface TapePart {
  readonly kind: 'work' | 'done' | 'attend' | 'dwell' | 'hold';
  readonly span: Span;
}

/** A stage as it stands in one row: a length of tape on the wall. */
export interface Tape {
  readonly stageId: string;
  /** From the first thing drawn to the last; at least a minute long. */
  readonly span: Span;
  /** From the first hands-on minute to the last, nights between included. */
  readonly body: Span;
  /** In drawing order: what lies underneath first. */
  readonly parts: readonly TapePart[];
}

/** How a stage stands in its piece's row: the work and the dwell after it. */
export function pieceTape(stage: Stage, placement: Placement): Tape {
  const body = bodyOf(placement);
  return assemble(placement, body, [...dwellParts(stage, placement, body), ...workParts(placement)]);
}

/** How a stage stands in a maker's row: only what needs the maker; a curing piece asks for nobody's hands. */
export function makerTape(stage: Stage, placement: Placement): Tape {
  const body = bodyOf(placement);
  const attended = dwellParts(stage, placement, body).filter((part) => part.kind === 'attend');
  return assemble(placement, body, [...attended, ...workParts(placement)]);
}

/** How a stage stands in a bay's row: what it keeps occupied, and inside that the work and the dwell. */
export function bayTape(stage: Stage, placement: Placement, held: Span): Tape {
  const body = bodyOf(placement);
  const dwell = dwellParts(stage, placement, body)
    .map((part) => ({ ...part, span: { start: part.span.start, end: Math.min(part.span.end, held.end) } }))
    .filter((part) => part.span.end > part.span.start);
  return assemble(placement, body, [{ kind: 'hold', span: held }, ...dwell, ...workParts(placement)]);
}

/** Where a stage keeps a bay and for how long, one for each of its places that is placed. */
export function heldBays(problem: Problem, plan: Plan): { stageId: string; bayId: string; span: Span }[] {
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  return problem.stages.flatMap((stage) => {
    const placement = placed.get(stage.id);
    if (!placement) return [];
    return stage.places.flatMap((place, index) => {
      const bayId = placement.bayIds[index];
      if (bayId === undefined) return [];
      const end = holdEnd(place.hold, placement, placed);
      return [{ stageId: stage.id, bayId, span: longEnough({ start: workStart(placement), end }) }];
    });
  });
}

/** When the hands-on work begins. */
export function workStart(placement: Placement): Minute {
  return placement.work[0].start;
}

/** When the hands-on work is over. */
export function workEnd(placement: Placement): Minute {
  return placement.work[placement.work.length - 1].end;
}

function holdEnd(
  hold: Stage['places'][number]['hold'],
  placement: Placement,
  placed: ReadonlyMap<string, Placement>,
): Minute {
  if (hold.kind === 'work') return workEnd(placement);
  if (hold.kind === 'dwell') return placement.dwellEnd;
  const release = placed.get(hold.stageId);
  return release ? Math.max(workEnd(release), placement.dwellEnd) : placement.dwellEnd;
}

function bodyOf(placement: Placement): Span {
  return longEnough({ start: workStart(placement), end: workEnd(placement) });
}

/** A visit agreed or a stage done in no time is still something that one can see and take hold of. */
function longEnough(span: Span): Span {
  return span.end > span.start ? span : { start: span.start, end: span.start + 1 };
}

/** Hands-on parts. The empty span that a started stage begins with stands for what is done, up to what remains. */
function workParts(placement: Placement): TapePart[] {
  const spans = placement.work.filter((span) => span.end > span.start);
  if (spans.length === 0) return [{ kind: 'work', span: bodyOf(placement) }];
  const work = spans.map((span): TapePart => ({ kind: 'work', span }));
  const begun = placement.work[0];
  if (begun.end > begun.start || begun.start >= spans[0].start) return work;
  return [{ kind: 'done', span: { start: begun.start, end: spans[0].start } }, ...work];
}

function dwellParts(stage: Stage, placement: Placement, body: Span): TapePart[] {
  const from = workEnd(placement);
  if (!stage.dwell || placement.dwellEnd <= from) return [];
  const attendedUntil = Math.min(placement.dwellEnd, from + stage.dwell.attendedMinutes);
  const parts: TapePart[] = [{ kind: 'dwell', span: { start: Math.max(from, body.start), end: placement.dwellEnd } }];
  if (attendedUntil > from) parts.push({ kind: 'attend', span: { start: from, end: attendedUntil } });
  return parts;
}

function assemble(placement: Placement, body: Span, parts: readonly TapePart[]): Tape {
  const start = Math.min(body.start, ...parts.map((part) => part.span.start));
  const end = Math.max(body.end, ...parts.map((part) => part.span.end));
  return { stageId: placement.stageId, span: { start, end }, body, parts };
}
