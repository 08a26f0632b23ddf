import type { Minute } from '../../time/span';
import type { Link } from '../problem/link';
import type { Problem, Stage } from '../problem/problem';
import { PossibleHours } from './availability';
import { dwellReach } from './dwell-reach';
import { workReach, type WorkReach } from './work-reach';
import { WorkingMeasure } from './working-measure';

/** Why one instant cannot be before another; what a conflict is told with. */
export type ArcCause =
  | { readonly kind: 'work'; readonly stageId: string }
  | { readonly kind: 'dwell'; readonly stageId: string }
  | { readonly kind: 'window'; readonly stageId: string; readonly followerId: string }
  | { readonly kind: 'min-gap' | 'max-gap'; readonly link: Link };

/** `to` is not before `reach(from)`, and so `from` not after `retreat(to)`. */
export interface TimeArc {
  readonly from: number;
  readonly to: number;
  /** The least minutes that always lie between the two; null where calendars leave no such number. */
  readonly lag: number | null;
  readonly reach: (from: Minute) => Minute;
  readonly retreat: (to: Minute) => Minute;
  readonly cause: ArcCause;
}

/**
 * All that time alone says about a problem: three instants for each stage (start and end of its work, end of its dwell) and
 * what keeps them apart. Capacity is left out, so whatever follows from it is true of every plan.
 */
export interface TimeNetwork {
  readonly stages: readonly Stage[];
  readonly works: readonly WorkReach[];
  readonly arcs: readonly TimeArc[];
  /** By node: not before, and not after (Infinity for none). */
  readonly notBefore: readonly Minute[];
  readonly notAfter: readonly Minute[];
}

/** The node of a stage's start of work, by the stage's position in the problem. */
export const startNode = (position: number): number => 3 * position;
/** The node of a stage's end of work. */
export const endNode = (position: number): number => 3 * position + 1;
/** The node of the end of a stage's dwell. */
export const readyNode = (position: number): number => 3 * position + 2;

/** The position of the stage that a node belongs to. */
export const stageOfNode = (node: number): number => Math.floor(node / 3);

/** Builds the network of a problem; links to stages that do not exist are left out. */
export function timeNetwork(problem: Problem): TimeNetwork {
  const possible = new PossibleHours(problem);
  const works = problem.stages.map((stage) => workReach(problem, stage, possible));
  const positions = new Map(problem.stages.map((stage, k) => [stage.id, k]));
  const measure = new WorkingMeasure(problem.workingTime);
  const arcs: TimeArc[] = [];
  const notBefore: Minute[] = [];
  const notAfter: Minute[] = [];
  problem.stages.forEach((stage, k) => {
    arcs.push(...stageArcs(problem, stage, k, works[k]));
    const limits = stageLimits(problem, stage, works[k]);
    notBefore.push(...limits.notBefore);
    notAfter.push(...limits.notAfter);
  });
  for (const link of problem.links) {
    const from = positions.get(link.fromStageId);
    const to = positions.get(link.toStageId);
    if (from === undefined || to === undefined) continue;
    arcs.push(...linkArcs(link, from, to, measure), ...windowArcs(link, problem.stages[from], from, to));
  }
  return { stages: problem.stages, works, arcs, notBefore, notAfter };
}

function stageArcs(problem: Problem, stage: Stage, k: number, work: WorkReach): TimeArc[] {
  if (stage.progress.kind !== 'to-do') return [dwellArc(problem, stage, k)];
  const cause: ArcCause = { kind: 'work', stageId: stage.id };
  const { minutes, reach, retreat } = work;
  const arcs: TimeArc[] = [{ from: startNode(k), to: endNode(k), lag: minutes, reach, retreat, cause }];
  if (work.isExact) arcs.push(constantArc(endNode(k), startNode(k), -work.minutes, cause));
  arcs.push(dwellArc(problem, stage, k));
  if (isConstantDwell(stage))
    arcs.push(
      constantArc(readyNode(k), endNode(k), -(stage.dwell?.minutes ?? 0), { kind: 'dwell', stageId: stage.id }),
    );
  return arcs;
}

function dwellArc(problem: Problem, stage: Stage, k: number): TimeArc {
  const cause: ArcCause = { kind: 'dwell', stageId: stage.id };
  if (isConstantDwell(stage)) return constantArc(endNode(k), readyNode(k), stage.dwell?.minutes ?? 0, cause);
  return { from: endNode(k), to: readyNode(k), lag: 0, cause, ...dwellReach(problem, stage) };
}

function isConstantDwell({ dwell }: Stage): boolean {
  return dwell === null || dwell.minutes === 0 || Object.keys(dwell.advance).length === 0;
}

function constantArc(from: number, to: number, lag: number, cause: ArcCause): TimeArc {
  return { from, to, lag, cause, reach: (at) => at + lag, retreat: (at) => at - lag };
}

interface NodeLimits {
  readonly notBefore: readonly Minute[];
  readonly notAfter: readonly Minute[];
}

function stageLimits(problem: Problem, stage: Stage, work: WorkReach): NodeLimits {
  const { progress } = stage;
  const opening = problem.horizon.start;
  const latestEnd = stage.latestEnd ?? Infinity;
  if (progress.kind === 'finished')
    return {
      notBefore: [progress.start, progress.end, progress.end],
      notAfter: [progress.start, progress.end, Infinity],
    };
  if (progress.kind === 'started')
    return {
      notBefore: [progress.start, work.reach(Math.max(opening, progress.start)), opening],
      notAfter: [progress.start, latestEnd, Infinity],
    };
  const fixed = stage.fixedStart ?? stage.pin?.start ?? null;
  const earliest = work.begin(Math.max(opening, stage.earliestStart, fixed ?? -Infinity));
  return { notBefore: [earliest, opening, opening], notAfter: [fixed ?? Infinity, latestEnd, Infinity] };
}

function linkArcs(link: Link, fromStage: number, toStage: number, measure: WorkingMeasure): TimeArc[] {
  const leavesFinish = link.kind === 'finish-start' || link.kind === 'finish-finish';
  const entersStart = link.kind === 'finish-start' || link.kind === 'start-start';
  const finishOf = link.after === 'work' ? endNode : readyNode;
  const from = leavesFinish ? finishOf(fromStage) : startNode(fromStage);
  const to = entersStart ? startNode(toStage) : finishOf(toStage);
  const arcs = [minGapArc(link, from, to, measure)];
  if (link.maxGapMinutes !== null) arcs.push(maxGapArc(link, link.maxGapMinutes, from, to, measure));
  return arcs;
}

function minGapArc(link: Link, from: number, to: number, measure: WorkingMeasure): TimeArc {
  const gap = link.minGapMinutes;
  const cause: ArcCause = { kind: 'min-gap', link };
  if (link.time === 'clock' || gap === 0) return constantArc(from, to, gap, cause);
  if (gap > 0)
    return {
      from,
      to,
      lag: gap,
      cause,
      reach: (at) => measure.reach(at, gap),
      retreat: (at) => measure.retreat(at, gap),
    };
  return {
    from,
    to,
    lag: null,
    cause,
    reach: (at) => measure.earliestWithin(at, -gap),
    retreat: (at) => measure.latestWithin(at, -gap),
  };
}

function maxGapArc(link: Link, gap: number, from: number, to: number, measure: WorkingMeasure): TimeArc {
  const cause: ArcCause = { kind: 'max-gap', link };
  if (link.time === 'clock' || gap < 0) return constantArc(to, from, -gap, cause);
  return {
    from: to,
    to: from,
    lag: null,
    cause,
    reach: (at) => measure.earliestWithin(at, gap),
    retreat: (at) => measure.latestWithin(at, gap),
  };
}

/** A hard window is a maximum gap from the end of work to the follower's start; told here only where the rate is constant. */
function windowArcs(link: Link, stage: Stage, from: number, to: number): TimeArc[] {
  const window = stage.dwell?.window;
  if (window?.kind !== 'hard' || link.kind !== 'finish-start' || link.after !== 'dwell' || !isConstantDwell(stage))
    return [];
  const cause: ArcCause = { kind: 'window', stageId: stage.id, followerId: link.toStageId };
  return [constantArc(startNode(to), endNode(from), -window.minutes, cause)];
}
