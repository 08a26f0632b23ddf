import { compile } from '../construct/compile';
import { Layout } from '../construct/layout';
import { loadPlan } from '../construct/load-plan';
import { toPlan } from '../construct/to-plan';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { LevelResult } from '../problem/result';
import { Budget } from '../stop/budget';
import { evenOut } from './even-out';
import { finish } from './level';
import type { LevelOptions } from './level-options';

/**
 * Evens the load of a given plan and changes nothing else: each stage keeps its crew and bays and moves only within the room that
 * it has. One pass over all stages counts as one schedule.
 */
export function levelWithinDates(problem: Problem, plan: Plan, options: LevelOptions): LevelResult {
  const layout = new Layout(compile(problem));
  loadPlan(layout, plan);
  const budget = new Budget(options.maxSchedules, options.shouldStop);
  evenOut(layout, budget, options.seed);
  if (!budget.isSpent()) budget.finish('nothing-to-improve');
  return finish(problem, toPlan(layout), budget.schedules, budget.stop);
}
