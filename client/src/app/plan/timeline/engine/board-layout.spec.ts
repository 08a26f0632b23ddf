import fc from 'fast-check';
import { at, idOf, MONDAY, planFixture, ZONE } from '../../testing/plan-fixture';
import { daySpansIn } from '@common/time/calendar-day';
import { layOutBoard, TAPE_HEIGHT } from './board-layout';
import { boardRows, ROWS_BY } from './board-rows';
import { rowAt, rowsIn, tapeAt, tapesIn, tapesOf } from './board-window';
import { litDays } from './lit-time';
import { makeTimeScale, minuteAt, xOf } from './time-scale';
import { hourWidths } from './zoom';

const view = planFixture({ productions: 4, piecesEach: 9 });
const days = daySpansIn({ start: MONDAY - 3 * 1440, end: at(60, 0) }, ZONE);
const lit = litDays(days, view.problem.workingTime, view.problem.horizon.start);

function layout(by: (typeof ROWS_BY)[number], zoom: number) {
  const scale = makeTimeScale({ start: days[0].start, end: at(60, 0) }, lit, hourWidths(zoom, 'folded'));
  return { scale, board: layOutBoard(boardRows(view, by), scale, new Map([[idOf('production', 0), 3]])) };
}

const cases = fc.tuple(fc.constantFrom(...ROWS_BY), fc.double({ min: 1, max: 96, noNaN: true }));

describe('the wall', () => {
  it('lays no tape over another and none outside its row', () => {
    fc.assert(
      fc.property(cases, ([by, zoom]) => {
        for (const row of layout(by, zoom).board.rows) {
          for (const tape of row.tapes) {
            expect(tape.y).toBeGreaterThanOrEqual(row.top);
            expect(tape.y + TAPE_HEIGHT).toBeLessThanOrEqual(row.top + row.height);
            const others = row.tapes.filter((other) => other !== tape && other.lane === tape.lane);
            expect(others.some((other) => tape.x < other.x + other.width && other.x < tape.x + tape.width)).toBe(false);
          }
        }
      }),
      { numRuns: 25 },
    );
  });

  it('puts rows under each other without a gap', () => {
    const { board } = layout('piece', 10);
    board.rows.slice(1).forEach((row, index) => expect(row.top).toBe(board.rows[index].top + board.rows[index].height));
    expect(board.height).toBe(board.rows.reduce((sum, row) => sum + row.height, 0));
  });

  it('finds under a point what it drew there', () => {
    const { board } = layout('maker', 17);
    for (const row of board.rows) {
      for (const tape of row.tapes) {
        const hit = tapeAt(board, { x: tape.x + tape.width / 2, y: tape.y + 3 }, TAPE_HEIGHT);
        expect(hit).toBe(tape);
      }
    }
    expect(rowAt(board, -1)).toBeNull();
    expect(rowAt(board, board.height)).toBeNull();
  });

  it('draws exactly what a window touches', () => {
    const { board } = layout('piece', 17);
    const window = { left: 300, right: 900, top: 150, bottom: 420 };
    const seen = rowsIn(board, window);
    expect(seen).toEqual(board.rows.filter((row) => row.top < window.bottom && row.top + row.height > window.top));
    const row = seen.find((one) => one.tapes.length > 0);
    expect(row && tapesIn(row, window).every((tape) => tape.x < 900 && tape.x + tape.width > 300)).toBe(true);
  });

  it('shows every stage with a crew once for each of its makers, and every bay for as long as it is kept', () => {
    const { board, scale } = layout('bay', 17);
    const [kept] = tapesOf(board, idOf('stage', 2));
    const placement = view.plan.placements.find((one) => one.stageId === idOf('stage', 2));
    expect(kept.rowKey).toBe(`bay:${idOf('bay', 1)}`);
    expect(minuteAt(scale, kept.x + kept.width)).toBe(placement?.dwellEnd);
    const crews = view.plan.placements.flatMap((one) => one.crew).length;
    expect(layout('maker', 17).board.rows.flatMap((row) => row.tapes)).toHaveLength(crews);
  });

  it('gives finished days before the known time the light of a like weekday, and no night', () => {
    const friday = days[0];
    expect(lit.filter((span) => span.start < friday.end)).toEqual([
      { start: friday.start + 480, end: friday.start + 1020 },
    ]);
    const { scale } = layout('piece', 10);
    expect(xOf(scale, friday.start + 1020) - xOf(scale, friday.start + 480)).toBeCloseTo(90);
  });

  it('lays out 1,500 stages, none lost and none over another', () => {
    const large = planFixture({ productions: 10, piecesEach: 25 });
    expect(large.plan.placements).toHaveLength(1500);
    const scale = makeTimeScale({ start: MONDAY, end: at(84, 0) }, lit, hourWidths(6.5, 'folded'));
    const { rows } = layOutBoard(boardRows(large, 'piece'), scale, new Map());
    const laid = rows.flatMap((row) => row.tapes);
    expect(new Set(laid.map(({ tape }) => tape.stageId)).size).toBe(1500);
    for (const { tapes } of rows) {
      for (const one of tapes) {
        const over = tapes.filter(
          (other) => other !== one && other.y === one.y && other.x < one.x + one.width && one.x < other.x + other.width,
        );
        expect(over).toEqual([]);
      }
    }
  });
});
