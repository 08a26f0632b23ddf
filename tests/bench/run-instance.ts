import { check } from '@common/planning/check/check';
import { criticalPath } from '@common/planning/bounds/critical-path';
import { level } from '@common/planning/improve/level';
import type { InstanceData } from './instances/instance-data';
import { instancePlan, type InstancePlan } from './instances/instance-plan';
import { instanceProblem } from './instances/instance-problem';
import { validatePlan } from './instances/validate-plan';
import { levelOptions, startStopwatch, type Budget } from './budget';

/** What came of one instance. */
export interface InstanceOutcome {
  /** The plan found, checked twice; null where none was found or there is none. */
  readonly plan: InstancePlan | null;
  /** Whether it is proved that there is no plan. */
  readonly isInfeasible: boolean;
  /** Proved; 0 where nothing better is known. */
  readonly lowerBound: number;
  /** Length of the critical path; null where a cycle of gaps leaves none. */
  readonly criticalPathLength: number | null;
  readonly schedules: number;
  readonly seconds: number;
  /** What the checker or the format's own validator found wrong with the plan; empty for a valid one. */
  readonly faults: readonly string[];
}

/** Levels an instance within a budget and puts the plan before both the checker and the format's own validator. */
export function runInstance(data: InstanceData, budget: Budget, seed: number): InstanceOutcome {
  const watch = startStopwatch();
  const problem = instanceProblem(data);
  const result = level(problem, levelOptions(budget, seed, watch));
  const seconds = watch.seconds();
  const path = criticalPath(problem);
  const criticalPathLength = path.kind === 'found' ? path.lengthMinutes : null;
  const isInfeasible = path.kind === 'cycle' || (result.bound.unplaced ?? 0) > 0;
  const lowerBound = isInfeasible ? 0 : Math.max(criticalPathLength ?? 0, result.bound.finishSum ?? 0);
  const common = { isInfeasible, lowerBound, criticalPathLength, schedules: result.schedules, seconds };
  const isWhole = result.objective.unplaced === 0;
  const plan = isWhole ? instancePlan(data, result.plan) : null;
  if (plan === null) return { ...common, plan: null, faults: [] };
  const faults = [
    ...check(problem, result.plan).map((unmet) => `The checker: ${unmet.rule} (${unmet.stageIds.join(', ')}).`),
    ...validatePlan(data, plan),
  ];
  if (plan.makespan < lowerBound) faults.push(`The makespan ${plan.makespan} is below the lower bound ${lowerBound}.`);
  if (isInfeasible) faults.push('A plan was found although it was said that there is none.');
  return { ...common, plan, faults };
}
