import type { Minute } from '../../time/span';
import type { Problem } from '../problem/problem';
import { earliestInstants, latestInstants } from './longest-paths';
import {
  readyNode,
  stageOfNode,
  startNode,
  timeNetwork,
  type ArcCause,
  type TimeArc,
  type TimeNetwork,
} from './time-network';

/** When a stage can be at the earliest and must be at the latest, if capacity were no matter. */
export interface StageTimes {
  readonly stageId: string;
  readonly earliestStart: Minute;
  /** The earliest end of its dwell (of its work, where there is none). */
  readonly earliestFinish: Minute;
  readonly latestStart: Minute;
  readonly latestFinish: Minute;
  /** Minutes by the clock that its start may slip without moving the end of the whole. */
  readonly totalSlackMinutes: number;
  /** Minutes by the clock that its start may slip without moving any other stage from its earliest. */
  readonly freeSlackMinutes: number;
}

/** One step of a cycle that no plan can keep: what asks for the time, and how much at least (negative for a maximum gap). */
export interface CycleStep {
  readonly cause: ArcCause;
  readonly lagMinutes: number;
}

/** The critical path of a problem, or the cycle of gaps that leaves it no plan. */
export type CriticalPath =
  | {
      readonly kind: 'found';
      /** Length from the horizon's start to the last earliest finish; Infinity where a stage has no hours to be worked in. */
      readonly lengthMinutes: number;
      readonly stages: ReadonlyMap<string, StageTimes>;
      /** Stages without slack, by their earliest start. */
      readonly criticalStageIds: readonly string[];
    }
  | { readonly kind: 'cycle'; readonly steps: readonly CycleStep[]; readonly excessMinutes: number };

/**
 * Earliest and latest times by longest paths with minimum and maximum gaps (metra potential method, Roy 1959; Neumann &
 * Schwindt 1997 for maximum gaps), through calendars where a stage has any. The latest times hold for the earliest end.
 */
export function criticalPath(problem: Problem): CriticalPath {
  const network = timeNetwork(problem);
  const forward = earliestInstants(network);
  if (forward.cycle !== null) return cycleOf(forward.cycle);
  const earliest = forward.instants;
  const end = earliest.reduce((latest, at) => Math.max(latest, at), problem.horizon.start);
  const latest = latestInstants(network, end).instants;
  const free = freeSlacks(network, earliest, end);
  const stages = new Map<string, StageTimes>();
  problem.stages.forEach((stage, k) => {
    stages.set(stage.id, {
      stageId: stage.id,
      earliestStart: earliest[startNode(k)],
      earliestFinish: earliest[readyNode(k)],
      latestStart: latest[startNode(k)],
      latestFinish: latest[readyNode(k)],
      totalSlackMinutes: latest[startNode(k)] - earliest[startNode(k)],
      freeSlackMinutes: free[k],
    });
  });
  const criticalStageIds = [...stages.values()]
    .filter((times) => times.totalSlackMinutes === 0)
    .sort((a, b) => a.earliestStart - b.earliestStart || a.earliestFinish - b.earliestFinish)
    .map((times) => times.stageId);
  return { kind: 'found', lengthMinutes: end - problem.horizon.start, stages, criticalStageIds };
}

function cycleOf(cycle: readonly TimeArc[]): CriticalPath {
  const steps = cycle.map((arc): CycleStep => ({ cause: arc.cause, lagMinutes: arc.lag ?? 0 }));
  return { kind: 'cycle', steps, excessMinutes: steps.reduce((sum, step) => sum + step.lagMinutes, 0) };
}

/** How far each start may slip while all others stay at their earliest, through its own end and dwell. */
function freeSlacks(network: TimeNetwork, earliest: Float64Array, end: Minute): number[] {
  const latest = new Float64Array(earliest.length).fill(end);
  const own: TimeArc[][] = network.stages.map(() => []);
  for (const arc of network.arcs) {
    const stage = stageOfNode(arc.from);
    if (stage === stageOfNode(arc.to)) own[stage].push(arc);
    else latest[arc.from] = Math.min(latest[arc.from], arc.retreat(earliest[arc.to]));
  }
  return own.map((arcs, k) => {
    // Three instants of one stage settle in as many passes.
    for (let pass = 0; pass < 3; pass++)
      for (const arc of arcs) latest[arc.from] = Math.min(latest[arc.from], arc.retreat(latest[arc.to]));
    return Math.max(0, latest[startNode(k)] - earliest[startNode(k)]);
  });
}
