import { criticalPath } from '../bounds/critical-path';
import { earliestInstants } from '../bounds/longest-paths';
import { startNode, stageOfNode, timeNetwork, type TimeArc, type TimeNetwork } from '../bounds/time-network';
import type { Minute } from '../../time/span';
import type { Problem, Stage } from '../problem/problem';
import { collision } from './collision';
import type { Conflict, ConflictBudget, LateLimit } from './conflict-data';

/** Why a problem has no plan that keeps every requirement; null where no reason was found (which proves nothing). */
export function findConflict(problem: Problem, budget: ConflictBudget): Conflict | null {
  const path = criticalPath(problem);
  if (path.kind === 'cycle') return path;
  return tooLate(problem) ?? collision(problem, budget);
}

/** The chain that ends furthest past a limit, if any does. */
function tooLate(problem: Problem): Conflict | null {
  const network = timeNetwork(problem);
  const { instants, parents } = earliestInstants(network);
  let worst = -1;
  let excess = 0;
  for (let node = 0; node < instants.length; node++) {
    const over = instants[node] - Math.min(network.notAfter[node], problem.horizon.end);
    if (over > excess) {
      worst = node;
      excess = over;
    }
  }
  if (worst < 0) return null;
  const chain = chainTo(worst, parents);
  const root = chain.length > 0 ? chain[0].from : worst;
  const stage = network.stages[stageOfNode(worst)];
  return {
    kind: 'too-late',
    steps: chain.map((arc) => ({ cause: arc.cause, lagMinutes: arc.lag ?? 0 })),
    notBefore: instants[root],
    firstStageId: network.stages[stageOfNode(root)].id,
    stageId: stage.id,
    ...limitAt(network, stage, worst, problem),
    excessMinutes: excess,
  };
}

function chainTo(node: number, parents: readonly (TimeArc | null)[]): TimeArc[] {
  const chain: TimeArc[] = [];
  for (let arc = parents[node]; arc !== null && chain.length <= parents.length; arc = parents[arc.from])
    chain.push(arc);
  return chain.reverse();
}

function limitAt(
  network: TimeNetwork,
  stage: Stage,
  node: number,
  problem: Problem,
): { limit: LateLimit; notAfter: Minute } {
  const notAfter = Math.min(network.notAfter[node], problem.horizon.end);
  if (notAfter === problem.horizon.end && network.notAfter[node] >= notAfter) return { limit: 'horizon', notAfter };
  if (stage.progress.kind !== 'to-do') return { limit: 'progress', notAfter };
  if (node !== startNode(stageOfNode(node))) return { limit: 'latest', notAfter };
  return { limit: stage.fixedStart === null ? 'pin' : 'fixed', notAfter };
}
