import { at, MONDAY, ZONE } from '../testing/plan-fixture';
import { daySpansIn } from '@common/time/calendar-day';
import { makeTimeScale, xOf } from '../timeline/engine/time-scale';
import { pourVessels, VESSEL_ROW_HEIGHT } from './vessels';

const days = daySpansIn({ start: MONDAY, end: at(3, 0) }, ZONE);
const lit = days.map((day) => ({ start: day.start + 480, end: day.start + 1020 }));
const scale = makeTimeScale({ start: MONDAY, end: at(3, 0) }, lit, { litPx: 20, unlitPx: 4 });
const cell = (day: number, loadMinutes: number, capacityMinutes: number) => ({
  day: days[day].day,
  loadMinutes,
  capacityMinutes,
});
const rows = [
  { id: 'carving', cells: [cell(0, 240, 480), cell(1, 0, 480), cell(2, 0, 0)] },
  { id: 'laminating', cells: [cell(0, 700, 480), cell(1, 480, 480), cell(2, 60, 0)] },
  { id: 'woodwork', cells: [cell(0, 0, 480)] },
];
const poured = pourVessels({ rows, days, lit, scale });

describe('vessels of load', () => {
  it('stand on the working hours of their day', () => {
    const carving = poured.find((row) => row.id === 'carving');
    expect(carving?.vessels[0].x).toBe(xOf(scale, at(0, 8)));
    expect(carving?.vessels.map((vessel) => vessel.day)).toEqual([days[0].day, days[1].day]);
  });

  it('say by how much they run over, on days without anyone too', () => {
    const laminating = poured[0];
    expect(laminating.id).toBe('laminating');
    expect(laminating.vessels.map((vessel) => vessel.overMinutes)).toEqual([220, 0, 60]);
    expect(laminating.overMinutes).toBe(280);
  });

  it('never rise out of their row, and keep the proportion of load to capacity', () => {
    for (const vessel of poured.flatMap((row) => row.vessels)) {
      expect(Math.max(vessel.level, vessel.brim)).toBeLessThan(VESSEL_ROW_HEIGHT);
      if (vessel.capacityMinutes > 0) {
        expect(vessel.level / vessel.brim).toBeCloseTo(vessel.loadMinutes / vessel.capacityMinutes);
      }
    }
  });

  it('leave out crafts that nobody is asked for', () => {
    expect(poured.map((row) => row.id)).toEqual(['laminating', 'carving']);
  });
});
