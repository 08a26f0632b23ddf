import type { ChainStep, DrivingChain, Reason } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import { Explainer } from './explainer';

/**
 * What leads to a key date without slack: from the last of its stages back through whatever each one waited for, until something
 * that waits for nothing in the plan. A stage that waited for a shift, and before that for other work, has a step for each.
 * Throws on an unknown key date; no steps where none of its stages has a place.
 */
export function drivingChain(problem: Problem, plan: Plan, keyDateId: string): DrivingChain {
  const date = problem.keyDates.find((one) => one.id === keyDateId);
  if (!date) throw new Error(`There is no key date ${keyDateId}.`);
  const explainer = new Explainer(problem, plan);
  const { compiled, layout } = explainer;
  const placed = date.stageIds
    .map((id) => compiled.stageIndex.get(id) ?? -1)
    .filter((stage) => stage >= 0 && layout.isPlaced[stage] === 1);
  if (placed.length === 0)
    return { keyDateId, finish: problem.horizon.end, marginMinutes: date.at - problem.horizon.end, steps: [] };
  const last = placed.reduce((a, b) => (layout.finish[b] > layout.finish[a] ? b : a));
  const finish = layout.finish[last] + compiled.origin;
  const steps: ChainStep[] = [];
  const seen = new Set<number>();
  for (let stage = last; stage >= 0 && !seen.has(stage);) {
    seen.add(stage);
    let next = -1;
    for (const because of explainer.reasonsFor(stage)) {
      steps.push({ stageId: compiled.stages[stage].id, because });
      const stageId = leadingStage(because);
      if (stageId === null) continue;
      next = compiled.stageIndex.get(stageId) ?? -1;
      break;
    }
    stage = next;
  }
  return { keyDateId, finish, marginMinutes: date.at - finish, steps };
}

/** The stage that a reason leads back to; null where it names none that comes before. */
function leadingStage(reason: Reason): string | null {
  switch (reason.kind) {
    case 'work-before':
    case 'dwell-before':
    case 'gap-after':
    case 'bay-taken':
    case 'crew-busy':
      return reason.stageId;
    default:
      return null;
  }
}
