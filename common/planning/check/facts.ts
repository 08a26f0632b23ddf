import type { Minute, Span } from '../../time/span';
import type { Placement, Plan } from '../problem/plan';
import type { Bay, Maker, Problem, Stage } from '../problem/problem';
import type { Rule, Unmet } from '../problem/result';

/** A problem and a plan looked up by id, as every rule wants them. Nothing here is shared with the search. */
export interface Facts {
  readonly problem: Problem;
  readonly stages: ReadonlyMap<string, Stage>;
  readonly makers: ReadonlyMap<string, Maker>;
  readonly bays: ReadonlyMap<string, Bay>;
  /** The placement of each stage of the problem that has one; the first, where a plan holds several. */
  readonly placed: ReadonlyMap<string, Placement>;
  /** A maker's shifts and overtime together, merged; nothing for an unknown maker. */
  readonly presence: (makerId: string) => readonly Span[];
  /** A maker's ordinary shifts, merged; nothing for an unknown maker. */
  readonly shifts: (makerId: string) => readonly Span[];
  /** When a bay is open, merged; null for always. */
  readonly open: (bayId: string) => readonly Span[] | null;
  /** When the studio is at work, merged. */
  readonly working: readonly Span[];
  /** For each stage, those whose dwell end leads to its start, each once. */
  readonly curesBefore: (stageId: string) => readonly string[];
}

/** Looks a problem and a plan up by id. */
export function gatherFacts(problem: Problem, plan: Plan): Facts {
  const byId = <T extends { readonly id: string }>(items: readonly T[]): Map<string, T> =>
    new Map(items.map((item) => [item.id, item]));
  const stages = byId(problem.stages);
  const placed = new Map<string, Placement>();
  for (const placement of plan.placements) {
    const wellFormed = stages.has(placement.stageId) && placement.work.length > 0;
    if (wellFormed && !placed.has(placement.stageId)) placed.set(placement.stageId, placement);
  }
  const makers = byId(problem.makers);
  const bays = byId(problem.bays);
  const cures = leadingCures(problem);
  const none: readonly Span[] = [];
  return {
    problem,
    stages,
    makers,
    bays,
    placed,
    presence: remember((id) =>
      mergeSpans([...(makers.get(id)?.shifts ?? none), ...(makers.get(id)?.overtime ?? none)]),
    ),
    shifts: remember((id) => mergeSpans(makers.get(id)?.shifts ?? none)),
    open: remember((id) => {
      const open = bays.get(id)?.open;
      return open ? mergeSpans(open) : null;
    }),
    working: mergeSpans(problem.workingTime),
    curesBefore: (id) => cures.get(id) ?? [],
  };
}

function leadingCures(problem: Problem): Map<string, string[]> {
  const cures = new Map<string, string[]>();
  for (const link of problem.links) {
    if (link.kind !== 'finish-start' || link.after !== 'dwell') continue;
    const known = cures.get(link.toStageId) ?? [];
    if (!known.includes(link.fromStageId)) known.push(link.fromStageId);
    cures.set(link.toStageId, known);
  }
  return cures;
}

/** A function of an id that works out each answer once. */
function remember<T>(workOut: (id: string) => T): (id: string) => T {
  const known = new Map<string, T>();
  return (id) => {
    if (!known.has(id)) known.set(id, workOut(id));
    return known.get(id) as T;
  };
}

/** A broken rule with only what applies filled in. */
export function unmet(rule: Rule, about: Partial<Omit<Unmet, 'rule'>>): Unmet {
  return { rule, stageIds: [], keyDateId: null, makerIds: [], bayIds: [], craftIds: [], by: 0, ...about };
}

/** When the hands-on work begins. */
export function workStart(placement: Placement): Minute {
  return placement.work[0].start;
}

/** When the hands-on work is over. */
export function workEnd(placement: Placement): Minute {
  return placement.work[placement.work.length - 1].end;
}

/** Minutes of work in a list of spans. */
export function totalMinutes(spans: readonly Span[]): number {
  return spans.reduce((sum, span) => sum + Math.max(0, span.end - span.start), 0);
}

/** The union of spans as sorted spans that neither meet nor overlap. */
export function mergeSpans(spans: readonly Span[]): Span[] {
  const sorted = spans.filter((span) => span.end > span.start).sort((a, b) => a.start - b.start);
  const merged: Span[] = [];
  for (const span of sorted) {
    const last = merged[merged.length - 1];
    if (last && span.start <= last.end)
      merged[merged.length - 1] = { start: last.start, end: Math.max(last.end, span.end) };
    else merged.push(span);
  }
  return merged;
}

/** What two merged lists of spans have in common. */
export function commonSpans(a: readonly Span[], b: readonly Span[]): Span[] {
  const common: Span[] = [];
  // Whatever ends before the other list begins has nothing in common with it.
  const first = (list: readonly Span[], other: readonly Span[]): number =>
    other.length === 0 ? list.length : firstEndingAfter(list, other[0].start);
  for (let i = first(a, b), j = first(b, a); i < a.length && j < b.length;) {
    const start = Math.max(a[i].start, b[j].start);
    const end = Math.min(a[i].end, b[j].end);
    if (start < end) common.push({ start, end });
    if (a[i].end < b[j].end) i += 1;
    else j += 1;
  }
  return common;
}

/** The first of merged spans that ends after an instant. */
function firstEndingAfter(spans: readonly Span[], instant: Minute): number {
  let low = 0;
  let high = spans.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (spans[middle].end > instant) high = middle;
    else low = middle + 1;
  }
  return low;
}

/** Minutes of `span` that lie outside merged `spans`. */
export function minutesOutside(span: Span, spans: readonly Span[]): number {
  return totalMinutes([span]) - totalMinutes(commonSpans([span], spans));
}

/** Whether a stage is history, or has begun to be: its facts are not up to the plan. */
export function hasBegun(stage: Stage): boolean {
  return stage.progress.kind !== 'to-do';
}

/** Work that is still to be done by the plan: all of it, but for what a begun stage did before. */
export function plannedWork(stage: Stage, placement: Placement): readonly Span[] {
  if (stage.progress.kind === 'finished') return [];
  if (stage.progress.kind === 'started') return placement.work.slice(1);
  return placement.work;
}
