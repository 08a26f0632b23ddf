import { level } from '@common/planning/improve/level';
import { replaceAfterMove } from '@common/planning/improve/replace-after-move';
import type { Move } from '@common/planning/improve/move';
import type { Plan } from '@common/planning/problem/plan';
import { seededRandom } from '../../engine/support/seeded-random';
import { startStopwatch } from '../budget';
import { benchStudio, studioNames } from '../studios/studios';
import { percentile, rounded, type Suite, type SuiteFigures } from './suite';

const USUAL_MOVES = 200;
const WARMING_MOVES = 20;

/** How long the answer to a drag takes: random stages of a levelled studio moved by hours or days, each from the same plan. */
export const dragSuite: Suite = {
  about: `a stage dragged in a levelled studio (sets ${studioNames.join(', ')}: the demo, or invented ones of so many stages)`,
  run: (options): SuiteFigures => {
    const set = options.set ?? '1500';
    const studio = benchStudio(set, options.seed);
    if (studio === null) {
      options.say(`There is no studio ${set}; there are ${studioNames.join(', ')}. Nothing was run.`);
      return { set, instances: 0 };
    }
    const { problem } = studio;
    const { plan } = level(problem, { seed: options.seed, maxSchedules: 20, shouldStop: () => false });
    const count = Math.min(options.limit, USUAL_MOVES);
    const moves = randomMoves(plan, count + WARMING_MOVES, options.seed);
    const milliseconds: number[] = [];
    let moved = 0;
    moves.forEach((move, k) => {
      const watch = startStopwatch();
      const result = replaceAfterMove(problem, plan, move);
      if (k < WARMING_MOVES) return;
      milliseconds.push(watch.seconds() * 1000);
      moved += result.moved.length;
    });
    return {
      set,
      seed: options.seed,
      instances: milliseconds.length,
      stages: problem.stages.length,
      p50Milliseconds: rounded(percentile(milliseconds, 0.5), 2),
      p95Milliseconds: rounded(percentile(milliseconds, 0.95), 2),
      largestMilliseconds: rounded(percentile(milliseconds, 1), 2),
      meanStagesMoved: rounded(moved / Math.max(1, milliseconds.length), 1),
    };
  },
};

function randomMoves(plan: Plan, count: number, seed: number): Move[] {
  const random = seededRandom(seed);
  const placements = plan.placements.filter((placement) => placement.work.length > 0);
  return Array.from({ length: count }, () => {
    const placement = random.pick(placements);
    const byMinutes = random.pick([15, 60, 240, 1440, 2880, 7200]) * (random.chance(0.7) ? 1 : -1);
    return { stageId: placement.stageId, start: placement.work[0].start + byMinutes, makerIds: null, bayIds: null };
  });
}
