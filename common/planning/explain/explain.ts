import type { StageReasons } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import { Explainer } from './explainer';

/** Why each placed stage starts when it does, in the order of stage ids; the reason that binds last comes first. */
export function explain(problem: Problem, plan: Plan): StageReasons[] {
  const explainer = new Explainer(problem, plan);
  const found: StageReasons[] = [];
  explainer.compiled.stages.forEach((stage, i) => {
    if (explainer.layout.isPlaced[i] === 1) found.push({ stageId: stage.id, reasons: explainer.reasonsFor(i) });
  });
  return found;
}
