import type { Plan } from '@common/planning';
import { at, idOf, MONDAY, planFixture } from '../../testing/plan-fixture';
import { layOutBoard } from './board-layout';
import { boardRows } from './board-rows';
import { ghostsOf } from './ghosts';
import { makeTimeScale, minuteAt } from './time-scale';

const view = planFixture();
const scale = makeTimeScale({ start: MONDAY, end: at(40, 0) }, [], { litPx: 17, unlitPx: 17 });
const board = layOutBoard(boardRows(view, 'maker'), scale, new Map());

function movedLater(stageId: string, minutes: number, makerId?: string): Plan {
  return {
    placements: view.plan.placements.map((placement) =>
      placement.stageId !== stageId
        ? placement
        : {
            ...placement,
            work: placement.work.map((span) => ({ start: span.start + minutes, end: span.end + minutes })),
            crew: makerId ? placement.crew.map((member) => ({ ...member, makerId })) : placement.crew,
            dwellEnd: placement.dwellEnd + minutes,
          },
    ),
  };
}

describe('ghosts', () => {
  it('stand in the lane that the stage itself has, at the new time', () => {
    const stageId = idOf('stage', 0);
    const plan = movedLater(stageId, 90);
    const [ghost, ...others] = ghostsOf(board, scale, boardRows({ ...view, plan }, 'maker'), new Set([stageId]));
    expect(others).toEqual([]);
    expect(minuteAt(scale, ghost.x)).toBe(view.plan.placements[0].work[0].start + 90);
    const own = board.rows.flatMap((row) => row.tapes).find((laid) => laid.tape.stageId === stageId);
    expect([ghost.y, ghost.lane, ghost.elsewhere]).toEqual([own?.y, own?.lane, false]);
  });

  it('find a free lane in the row of another maker', () => {
    const stageId = idOf('stage', 0);
    const plan = movedLater(stageId, 0, idOf('maker', 3));
    const [ghost] = ghostsOf(board, scale, boardRows({ ...view, plan }, 'maker'), new Set([stageId]));
    expect(ghost.rowKey).toBe(`maker:${idOf('maker', 3)}`);
    expect(ghost.elsewhere).toBe(true);
  });

  it('are none for stages that stand as before', () => {
    expect(ghostsOf(board, scale, boardRows(view, 'maker'), new Set())).toEqual([]);
  });
});
