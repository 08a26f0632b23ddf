import { TimedSolver } from '../exact/solve-timed';
import { timedModel } from '../exact/timed-model';
import type { Link } from '../problem/link';
import type { Problem } from '../problem/problem';
import type { Conflict, ConflictBudget } from './conflict-data';

/** One requirement that may be left out to see whether the conflict is still there. */
type Part =
  | { readonly kind: 'stage'; readonly id: string }
  | { readonly kind: 'bay'; readonly id: string }
  | { readonly kind: 'craft'; readonly id: string }
  | { readonly kind: 'maximum'; readonly link: Link };

/**
 * A set of stages, bays, crafts and maximum gaps of a timed problem that has no plan, from which nothing can be left out: parts
 * are dropped in ever smaller groups as long as the rest is still proved to have none (deletion filter, Chinneck & Dravnieks
 * 1991, by groups as in QuickXplain, Junker 2004). Null where the whole is not proved to have none within the budget.
 */
export function collision(problem: Problem, budget: ConflictBudget): Conflict | null {
  const isProved = (parts: readonly Part[]): boolean => hasNoPlan(reduced(problem, parts), budget);
  let kept = allParts(problem);
  if (!isProved(kept)) return null;
  for (let size = Math.ceil(kept.length / 2); ; size = Math.ceil(size / 2)) {
    for (let at = 0; at < kept.length && !budget.shouldStop();) {
      const rest = [...kept.slice(0, at), ...kept.slice(at + size)];
      if (isProved(rest)) kept = rest;
      else at += size;
    }
    if (size === 1) break;
  }
  const idsOf = (kind: 'stage' | 'bay' | 'craft'): string[] =>
    kept.flatMap((part) => (part.kind === kind ? [part.id] : []));
  const stageIds = idsOf('stage');
  const maxima = new Set(kept.flatMap((part) => (part.kind === 'maximum' ? [part.link] : [])));
  const joins = (link: Link): boolean => stageIds.includes(link.fromStageId) && stageIds.includes(link.toStageId);
  return {
    kind: 'collision',
    stageIds,
    bayIds: idsOf('bay'),
    craftIds: idsOf('craft'),
    links: problem.links.filter((link) => maxima.has(link) || joins(link)),
  };
}

function allParts(problem: Problem): Part[] {
  const crafts = new Set(problem.stages.flatMap((stage) => stage.crew.map((need) => need.craftId)));
  return [
    ...problem.stages.map((stage): Part => ({ kind: 'stage', id: stage.id })),
    ...problem.links.filter((link) => link.maxGapMinutes !== null).map((link): Part => ({ kind: 'maximum', link })),
    ...problem.bays.map((bay): Part => ({ kind: 'bay', id: bay.id })),
    ...[...crafts].sort().map((id): Part => ({ kind: 'craft', id })),
  ];
}

/**
 * The problem with only these parts: a stage left out still takes its time, so that the links through it hold, but asks for
 * nothing; a bay or craft left out is asked for by nobody.
 */
function reduced(problem: Problem, parts: readonly Part[]): Problem {
  const ids = (kind: Part['kind']): Set<string> =>
    new Set(parts.flatMap((part) => (part.kind === kind && 'id' in part ? [part.id] : [])));
  const stages = ids('stage');
  const bays = ids('bay');
  const crafts = ids('craft');
  const maxima = new Set(parts.flatMap((part) => (part.kind === 'maximum' ? [part.link] : [])));
  return {
    ...problem,
    stages: problem.stages.map((stage) => ({
      ...stage,
      places: stages.has(stage.id) ? stage.places.filter((place) => place.bayIds.some((id) => bays.has(id))) : [],
      crew: stages.has(stage.id) ? stage.crew.filter((need) => crafts.has(need.craftId)) : [],
    })),
    links: problem.links.map((link) => (maxima.has(link) ? link : { ...link, maxGapMinutes: null })),
  };
}

function hasNoPlan(problem: Problem, budget: ConflictBudget): boolean {
  const model = timedModel(problem);
  if (model === null) return false;
  const { maxConflicts, shouldStop } = budget;
  return new TimedSolver(model).run({ maxConflicts, shouldStop }) === 'infeasible';
}
