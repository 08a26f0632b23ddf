import { at, idOf, MONDAY, planFixture } from '../../testing/plan-fixture';
import { layOutBoard } from './board-layout';
import { boardRows } from './board-rows';
import { walk } from './focus-walk';
import { makeTimeScale } from './time-scale';

const view = planFixture();
const scale = makeTimeScale({ start: MONDAY, end: at(40, 0) }, view.problem.workingTime, { litPx: 17, unlitPx: 4 });
const board = layOutBoard(boardRows(view, 'piece'), scale, new Map());
const key = (stage: number) => ({
  rowKey: `piece:${idOf('piece', Math.floor(stage / 6))}`,
  stageId: idOf('stage', stage),
});
const stageAfter = (stage: number, step: Parameters<typeof walk>[2]) => walk(board, key(stage), step)?.tape.stageId;

describe('walking over the wall by arrow keys', () => {
  it('begins at the first stage of the first row that has one', () => {
    expect(walk(board, null, 'later')?.tape.stageId).toBe(idOf('stage', 0));
  });

  it('goes along a row in time and on into the next', () => {
    expect(stageAfter(0, 'later')).toBe(idOf('stage', 1));
    expect(stageAfter(1, 'earlier')).toBe(idOf('stage', 0));
    expect(stageAfter(5, 'later')).toBe(idOf('stage', 6));
    expect(stageAfter(6, 'earlier')).toBe(idOf('stage', 5));
  });

  it('goes to what stands nearest above and below, over the heads of productions', () => {
    expect(stageAfter(3, 'below')).toBe(idOf('stage', 9));
    expect(stageAfter(23, 'above')).toBe(idOf('stage', 17));
  });

  it('stays where there is nothing further', () => {
    expect(walk(board, key(0), 'earlier')).toBeNull();
    expect(walk(board, key(0), 'above')).toBeNull();
    expect(walk(board, key(53), 'later')).toBeNull();
  });

  it('jumps to the ends of the row and of the wall', () => {
    expect(stageAfter(2, 'row-end')).toBe(idOf('stage', 5));
    expect(stageAfter(2, 'row-start')).toBe(idOf('stage', 0));
    expect(stageAfter(2, 'last')).toBe(idOf('stage', 53));
    expect(stageAfter(20, 'first')).toBe(idOf('stage', 0));
  });
});
