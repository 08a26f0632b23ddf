import type { Placement } from '../problem/plan';
import type { Problem } from '../problem/problem';

/** To-do stages that begin or are crewed otherwise than issued. A stage that was never issued is no change. */
export function countChanges(problem: Problem, placed: ReadonlyMap<string, Placement>): number {
  if (!problem.issued) return 0;
  const toDo = new Set(problem.stages.filter((stage) => stage.progress.kind === 'to-do').map((stage) => stage.id));
  let changes = 0;
  for (const issued of problem.issued.placements) {
    if (!toDo.has(issued.stageId)) continue;
    const now = placed.get(issued.stageId);
    const same = now && now.work[0].start === issued.work[0]?.start && crewOf(now) === crewOf(issued);
    if (!same) changes += 1;
  }
  return changes;
}

function crewOf(placement: Placement): string {
  return placement.crew
    .map((member) => member.makerId)
    .sort()
    .join('\n');
}
