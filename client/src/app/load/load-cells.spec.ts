import fc from 'fast-check';
import { addDays } from '@common/time/calendar-day';
import { GRAINS, loadTable } from './load-cells';

const view = {
  days: ['2026-12-11', '2026-12-12', '2026-12-13', '2026-12-14', '2026-12-15'],
  rows: [
    {
      id: 'a',
      name: 'Painting',
      loadMinutes: [600, 0, 0, 120, 480],
      tentativeMinutes: [100, 0, 0, 120, 0],
      capacityMinutes: [480, 0, 0, 480, 480],
    },
  ],
};

describe('the load by day, week and month', () => {
  it('leaves out days without work', () => {
    expect(loadTable(view, 'day').stretches.map((stretch) => stretch.title)).toEqual([
      'Fri 11 Dec',
      'Mon 14 Dec',
      'Tue 15 Dec',
    ]);
  });

  it('sums weeks from Monday, and keeps a full Friday over though its week has room', () => {
    const table = loadTable(view, 'week');
    expect(table.stretches.map((stretch) => stretch.key)).toEqual(['2026-12-07', '2026-12-14']);
    expect(table.rows[0].cells[0]).toEqual({
      committedMinutes: 500,
      tentativeMinutes: 100,
      capacityMinutes: 480,
      overMinutes: 120,
      daysOver: 1,
    });
    expect(loadTable(view, 'month').rows[0].cells[0]).toMatchObject({
      capacityMinutes: 1440,
      overMinutes: 120,
      daysOver: 1,
    });
  });

  it('loses no minute whatever the grain', () => {
    const minutes = fc.array(fc.integer({ min: 0, max: 900 }), { minLength: 40, maxLength: 40 });
    fc.assert(
      fc.property(minutes, minutes, (loadMinutes, capacityMinutes) => {
        const days = loadMinutes.map((_, index) => addDays('2026-11-20', index));
        const row = {
          id: 'a',
          name: 'A',
          loadMinutes,
          capacityMinutes,
          tentativeMinutes: loadMinutes.map((load) => load >> 1),
        };
        const totals = GRAINS.map((grain) =>
          loadTable({ days, rows: [row] }, grain).rows[0].cells.reduce(
            (sum, cell) => sum + cell.committedMinutes + cell.tentativeMinutes,
            0,
          ),
        );
        expect(new Set(totals)).toEqual(new Set([loadMinutes.reduce((sum, load) => sum + load, 0)]));
      }),
    );
  });
});
