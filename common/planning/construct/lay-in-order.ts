import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import { isMovable } from './bounds-of-stage';
import { compile } from './compile';
import { Generator } from './generator';
import { genomeOf } from './genome';
import { toPlan } from './to-plan';

/**
 * Lays each stage where it is done soonest, in the order in which the problem lists them: what a studio does that takes jobs as
 * they come. One pass of serial generation, without overtime; unlike in levelling, the order of the list matters.
 */
export function layInOrder(problem: Problem): Plan {
  const compiled = compile(problem);
  const order = problem.stages.map((stage) => compiled.stageIndex.get(stage.id) ?? -1).filter((stage) => isMovable(compiled, stage));
  const generator = new Generator(compiled);
  generator.decode(genomeOf(order));
  return toPlan(generator.layout);
}
