import { check } from '../check/check';
import { compile } from '../construct/compile';
import type { Compiled, Crew } from '../construct/compiled';
import { Layout } from '../construct/layout';
import { loadPlan } from '../construct/load-plan';
import { toPlan } from '../construct/to-plan';
import type { Placement, Plan } from '../problem/plan';
import type { Problem, Stage } from '../problem/problem';
import type { Move, MoveResult } from './move';
import { Mender } from './mender';

/**
 * The plan after one stage is put where a hand wants it. The stage counts as pinned there; stages that it runs into, and those
 * that follow, give way as little as they can: the same crew and bays where that costs no time, never earlier than before. All
 * others stay. The same move gives the same plan. Throws on an unknown stage.
 */
export function replaceAfterMove(problem: Problem, plan: Plan, move: Move): MoveResult {
  const compiled = compileOnce(problem);
  const stage = compiled.stageIndex.get(move.stageId);
  if (stage === undefined) throw new Error(`There is no stage ${move.stageId}.`);
  const layout = new Layout(compiled);
  loadPlan(layout, plan);
  const mender = new Mender(layout);
  const start = move.start === null ? null : move.start - compiled.origin;
  mender.put(stage, start, crewsFor(compiled, stage, move.makerIds), housingsFor(compiled, stage, move.bayIds));
  mender.giveWay(stage);
  const after = toPlan(layout);
  return { plan: after, unmet: check(asPinned(problem, move, after), after), moved: movedStages(plan, after) };
}

const compiledProblems = new WeakMap<Problem, Compiled>();

/** A problem is immutable, so what it compiles to is kept for the next frame of the same drag. */
function compileOnce(problem: Problem): Compiled {
  const known = compiledProblems.get(problem);
  if (known) return known;
  const compiled = compile(problem);
  compiledProblems.set(problem, compiled);
  return compiled;
}

/** Crews of the named makers; all the stage's crews where none are named. */
function crewsFor(compiled: Compiled, stage: number, makerIds: readonly string[] | null): readonly Crew[] | null {
  if (makerIds === null) return null;
  const wanted = [...makerIds].sort().join('\n');
  const known = compiled.work.crews[stage].filter(
    (crew) =>
      [...crew.makers]
        .map((maker) => compiled.makerIds[maker])
        .sort()
        .join('\n') === wanted,
  );
  if (known.length > 0) return known;
  // Makers without the craft are put there all the same: the checker says what is wrong with it.
  const craft = compiled.work.needCraft[compiled.work.needOf[stage]] ?? -1;
  const makers = makerIds.map((id) => compiled.makerIds.indexOf(id)).filter((maker) => maker >= 0);
  const crafts = Int32Array.from(makers, () => craft);
  return [
    { index: -1, makers: Int32Array.from(makers), crafts, outputPermille: 1000 * makers.length, regretPermille: 0 },
  ];
}

function housingsFor(
  compiled: Compiled,
  stage: number,
  bayIds: readonly string[] | null,
): readonly Int32Array[] | null {
  const places = compiled.work.placeOf[stage + 1] - compiled.work.placeOf[stage];
  if (bayIds === null || bayIds.length !== places) return null;
  return [Int32Array.from(bayIds, (id) => compiled.bayIds.indexOf(id))];
}

/** The problem with the moved stage pinned where it now stands, so that the checker judges what the hand asked for. */
function asPinned(problem: Problem, move: Move, plan: Plan): Problem {
  const placement = plan.placements.find((one) => one.stageId === move.stageId);
  const pin = (stage: Stage): Stage => ({
    ...stage,
    pin: { start: move.start ?? placement?.work[0].start ?? null, makerIds: move.makerIds, bayIds: move.bayIds },
  });
  return { ...problem, stages: problem.stages.map((stage) => (stage.id === move.stageId ? pin(stage) : stage)) };
}

function movedStages(before: Plan, after: Plan): string[] {
  const was = new Map(before.placements.map((placement) => [placement.stageId, placement]));
  const differs = (placement: Placement): boolean => {
    const old = was.get(placement.stageId);
    return old === undefined || !isSame(old, placement);
  };
  return after.placements.filter(differs).map((placement) => placement.stageId);
}

function isSame(a: Placement, b: Placement): boolean {
  return (
    a.dwellEnd === b.dwellEnd &&
    a.work.length === b.work.length &&
    a.crew.length === b.crew.length &&
    a.bayIds.every((id, k) => id === b.bayIds[k]) &&
    a.work.every((span, k) => span.start === b.work[k].start && span.end === b.work[k].end) &&
    a.crew.every((one) => b.crew.some((other) => other.makerId === one.makerId && other.craftId === one.craftId))
  );
}
