import { isMovable } from '../construct/bounds-of-stage';
import { compile } from '../construct/compile';
import { FINISHED, STARTED } from '../construct/compiled';
import { estimate } from '../construct/estimate';
import { Generator } from '../construct/generator';
import { genomeOf } from '../construct/genome';
import { orderBy } from '../construct/priority-rules';
import { toPlan } from '../construct/to-plan';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';

/**
 * The plan of a studio that takes work as it comes: stages choose their places in the given order, each at its earliest, and
 * nothing is weighed against anything. Stages that are not named come last. One pass of the generation scheme, no search.
 */
export function layOutInOrder(problem: Problem, stageIds: readonly string[]): Plan {
  const compiled = compile(problem);
  const keys = new Float64Array(compiled.stageCount).fill(stageIds.length);
  stageIds.forEach((id, place) => {
    const stage = compiled.stageIndex.get(id);
    if (stage !== undefined) keys[stage] = place;
  });
  const order = orderBy(keys, estimate(compiled).topological).filter((stage) => isMovable(compiled, stage));
  const generator = new Generator(compiled);
  generator.decode(genomeOf(order));
  return toPlan(generator.layout);
}

/**
 * A plan brought up to what has happened since it was laid out: stages begun or finished stand as they were done, stages that are
 * no more have gone, and every other stays where it is. What no longer fits shows when the plan is checked.
 */
export function takeInProgress(problem: Problem, plan: Plan): Plan {
  const compiled = compile(problem);
  const generator = new Generator(compiled);
  generator.begin();
  const hasBegun = (stageId: string): boolean => {
    const stage = compiled.stageIndex.get(stageId);
    const fixity = stage === undefined ? -1 : compiled.work.fixity[stage];
    return fixity === STARTED || fixity === FINISHED;
  };
  const begun = toPlan(generator.layout).placements.filter((placement) => hasBegun(placement.stageId));
  const others = plan.placements.filter(
    (placement) => compiled.stageIndex.has(placement.stageId) && !hasBegun(placement.stageId),
  );
  return { placements: [...begun, ...others] };
}
