import { levelExactly } from '../exact/level-exactly';
import type { LevelOptions } from '../improve/level-options';
import type { Problem } from '../problem/problem';
import type { LevelResult } from '../problem/result';

/** Stages beyond which exact search would take too long to begin with. */
const MOST_STAGES = 400;

/**
 * Levels what placing one stage after another seldom can: timed problems (see `TimedModel`) with maximum gaps, or with crews of
 * makers who hold several crafts. There a stage once placed may leave a later one no room, and only a search that learns why
 * gets out of it again (Schutt, Feydy, Stuckey & Wallace 2013; Young, Feydy & Schutt 2017). Null for any other problem.
 *
 * The result has an empty plan where none was found; a bound of 1 on the unplaced then says that there is none.
 */
export function levelWithGaps(problem: Problem, options: LevelOptions): LevelResult | null {
  const hasMaximum = problem.links.some((link) => link.maxGapMinutes !== null) || runInCircles(problem);
  const hasCrews = problem.stages.some((stage) => stage.crew.length > 0);
  if ((!hasMaximum && !hasCrews) || problem.stages.length > MOST_STAGES) return null;
  return levelExactly(problem, options);
}

/** Whether links lead from a stage back to itself: minimum gaps of nothing both ways are a maximum gap as well. */
function runInCircles(problem: Problem): boolean {
  const followers = new Map<string, string[]>(problem.stages.map((stage) => [stage.id, []]));
  const waitsFor = new Map<string, number>(problem.stages.map((stage) => [stage.id, 0]));
  for (const { fromStageId, toStageId } of problem.links) {
    followers.get(fromStageId)?.push(toStageId);
    waitsFor.set(toStageId, (waitsFor.get(toStageId) ?? 0) + 1);
  }
  const free = [...waitsFor].flatMap(([id, count]) => (count === 0 ? [id] : []));
  let ordered = 0;
  for (let id = free.pop(); id !== undefined; id = free.pop()) {
    ordered++;
    for (const next of followers.get(id) ?? []) {
      const left = (waitsFor.get(next) ?? 0) - 1;
      waitsFor.set(next, left);
      if (left === 0) free.push(next);
    }
  }
  return ordered < problem.stages.length;
}
