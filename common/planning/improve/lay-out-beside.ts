import { isMovable } from '../construct/bounds-of-stage';
import { compile } from '../construct/compile';
import type { Compiled } from '../construct/compiled';
import { estimate } from '../construct/estimate';
import { Generator } from '../construct/generator';
import { genomeOf } from '../construct/genome';
import { loadPlan } from '../construct/load-plan';
import { orderBy } from '../construct/priority-rules';
import { toPlan } from '../construct/to-plan';
import type { Placement, Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import { Chance } from './chance';

/** What laying out beside a plan may spend. */
export interface BesideOptions {
  /** Stages that are to be fitted in; every other that the plan places stays exactly where it is. */
  readonly stageIds: ReadonlySet<string>;
  /** Any integer; the same options give the same plan. */
  readonly seed: number;
  /** Orders of the stages to be tried; the one that is done soonest is kept. One at least. */
  readonly tries: number;
  readonly shouldStop: () => boolean;
}

/**
 * Fits some stages into what a plan leaves free. Stages that neither stand in the plan nor are to be fitted in are laid first. Several
 * orders are tried, the first by what follows what and others by chance (random sampling of the serial scheme, Kolisch 1996); the one
 * whose last stage is over first is kept.
 */
export function layOutBeside(problem: Problem, plan: Plan, options: BesideOptions): Plan {
  const compiled = compile(problem);
  const generator = new Generator(compiled);
  const kept = keptPlacements(problem, compiled, generator, plan, options.stageIds);
  const { topological } = estimate(compiled);
  const placed = new Set(kept.map(({ stageId }) => stageId));
  const isAsked = (stage: number): boolean => options.stageIds.has(compiled.stages[stage].id);
  const open = (stage: number): boolean => isMovable(compiled, stage) && !placed.has(compiled.stages[stage].id);
  const chance = new Chance(options.seed);
  let best: { readonly plan: Plan; readonly missing: number; readonly finish: number } | null = null;
  for (let one = 0; one < Math.max(1, options.tries) && (best === null || !options.shouldStop()); one += 1) {
    const keys = new Float64Array(compiled.stageCount);
    for (let stage = 0; stage < keys.length; stage += 1)
      keys[stage] = isAsked(stage) ? 1 + (one > 0 ? chance.share() : 0) : 0;
    loadPlan(generator.layout, { placements: kept });
    generator.broken = 0;
    generator.resume(genomeOf(orderBy(keys, topological).filter(open)));
    const found = judge(toPlan(generator.layout), kept, options.stageIds);
    if (!best || found.missing < best.missing || (found.missing === best.missing && found.finish < best.finish)) {
      best = found;
    }
  }
  return best?.plan ?? { placements: kept };
}

/** What the plan places of the others, and what of the asked is tied to its time (a visit, a pin, work begun). */
function keptPlacements(
  problem: Problem,
  compiled: Compiled,
  generator: Generator,
  plan: Plan,
  asked: ReadonlySet<string>,
): readonly Placement[] {
  generator.begin();
  const others = plan.placements.filter(({ stageId }) => compiled.stageIndex.has(stageId) && !asked.has(stageId));
  const known = new Set(others.map(({ stageId }) => stageId));
  const tied = toPlan(generator.layout).placements.filter(({ stageId }) => !known.has(stageId));
  return [...others, ...tied];
}

/** The laid-out plan with the kept placements as they were, however laying out may have touched them. */
function judge(laid: Plan, kept: readonly Placement[], asked: ReadonlySet<string>) {
  const known = new Set(kept.map(({ stageId }) => stageId));
  const added = laid.placements.filter(({ stageId }) => !known.has(stageId));
  const plan = { placements: [...kept, ...added] };
  const own = plan.placements.filter(({ stageId }) => asked.has(stageId));
  const finish = own.reduce((last, { dwellEnd }) => Math.max(last, dwellEnd), 0);
  return { plan, missing: asked.size - own.length, finish };
}
