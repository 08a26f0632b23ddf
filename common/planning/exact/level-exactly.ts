import { check } from '../check/check';
import type { LevelOptions } from '../improve/level-options';
import { measure } from '../objective/objective';
import type { Placement, Plan } from '../problem/plan';
import type { LevelResult, StopReason } from '../problem/result';
import { TimedSolver, type TimedEnd, type TimedSolution } from './solve-timed';
import { timedModel, type TimedModel } from './timed-model';

/**
 * Levels a problem by exact search where it is a timed one (see `TimedModel`), starting from a known plan if there is one;
 * null for any other problem. A conflict counts as a schedule: it ends one attempt to lay out all stages.
 *
 * Where it is proved that no plan keeps every requirement, the known plan (or an empty one) comes back with a bound of 1 on
 * the unplaced.
 */
export function levelExactly(
  problem: TimedModel['problem'],
  options: LevelOptions,
  known: Plan | null = null,
): LevelResult | null {
  const model = timedModel(problem);
  if (model === null) return null;
  let improved: TimedSolution | null = null;
  const solver: TimedSolver = new TimedSolver(model, (solution) => {
    improved = solution;
    report(model, options, solver, solution);
  });
  const length = known === null ? null : makespanOf(model, known);
  if (length !== null) solver.askBelow(length);
  let isStopped = false;
  const shouldStop = (): boolean => (isStopped ||= options.shouldStop());
  const end = solver.run({ maxConflicts: options.maxSchedules, shouldStop });
  const best = improved as TimedSolution | null;
  const plan = best === null ? (known ?? { placements: [] }) : timedPlan(model, best);
  const makespan = best?.makespan ?? length;
  return resultOf(model, plan, {
    end: end === 'infeasible' && makespan !== null ? 'proved' : end,
    makespan,
    lowerBound: solver.lowerBound,
    schedules: Math.max(1, solver.conflicts),
    isStopped,
  });
}

interface Outcome {
  readonly end: TimedEnd;
  readonly makespan: number | null;
  readonly lowerBound: number;
  readonly schedules: number;
  readonly isStopped: boolean;
}

function resultOf(model: TimedModel, plan: Plan, outcome: Outcome): LevelResult {
  const { problem } = model;
  const unmet = check(problem, plan);
  const isProved = outcome.end !== 'budget';
  const stop: StopReason = isProved ? 'proven-best' : outcome.isStopped ? 'cancelled' : 'budget';
  const finish = outcome.end === 'proved' ? outcome.makespan : outcome.end === 'budget' ? outcome.lowerBound : null;
  return {
    plan,
    objective: measure(problem, plan, unmet),
    bound: { ...noBound, unplaced: outcome.end === 'infeasible' ? 1 : 0, finishSum: finish },
    unmet,
    schedules: outcome.schedules,
    stop,
  };
}

/** What is true of every plan of a timed problem: nothing to be late for and nothing to pay. */
const noBound: LevelResult['bound'] = {
  unplaced: 0,
  hardLateness: 0,
  wishedLateness: 0,
  costMinor: 0,
  unevenness: 0,
  changes: 0,
  finishSum: null,
};

function report(model: TimedModel, options: LevelOptions, solver: TimedSolver, solution: TimedSolution): void {
  if (options.onProgress === undefined) return;
  const plan = timedPlan(model, solution);
  options.onProgress({
    schedules: solver.conflicts + 1,
    objective: measure(model.problem, plan, []),
    bound: { ...noBound, finishSum: solver.lowerBound },
  });
}

/** When a plan of the problem ends, in minutes from the horizon's start; null where a stage is missing or a rule broken. */
function makespanOf(model: TimedModel, plan: Plan): number | null {
  if (plan.placements.length !== model.durations.length || check(model.problem, plan).length > 0) return null;
  const end = plan.placements.reduce((latest, placement) => Math.max(latest, placement.dwellEnd), 0);
  return end - model.problem.horizon.start;
}

/** A solution of the model as a plan of its problem. */
export function timedPlan(model: TimedModel, solution: TimedSolution): Plan {
  const { problem, durations, crews } = model;
  const placements = problem.stages.map((stage, k): Placement => {
    const start = problem.horizon.start + solution.starts[k];
    const end = start + durations[k];
    return {
      stageId: stage.id,
      work: [{ start, end }],
      crew: solution.crews[k].map(([maker, craft]) => ({
        makerId: crews?.makerIds[maker] ?? '',
        craftId: crews?.craftIds[craft] ?? '',
      })),
      bayIds: stage.places.map((place) => place.bayIds[0]),
      dwellEnd: end,
    };
  });
  return { placements };
}
