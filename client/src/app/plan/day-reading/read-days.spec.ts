import { dateMargins } from '../date-margins';
import { planFixture } from '../testing/plan-fixture';
import { readDays } from './read-days';

const view = planFixture();
const margins = dateMargins(view.problem, view.plan);
const days = readDays(view, margins, 60);

describe('a plan read day by day', () => {
  it('tells all hands-on minutes ahead once, on the day they fall', () => {
    const told = days.flatMap((day) => day.work.map((work) => work.stageId));
    expect(new Set(told).size).toBe(view.plan.placements.length);
    for (const day of days) {
      for (const { span } of day.work) {
        expect(span.start).toBeGreaterThanOrEqual(day.start);
        expect(span.end).toBeLessThanOrEqual(day.start + 1440);
      }
    }
  });

  it('says where work begins, goes on and ends over days', () => {
    const overnight = view.plan.placements.find((one) => one.work[one.work.length - 1].end - one.work[0].start > 900);
    const told = days.flatMap((day) => day.work).filter((work) => work.stageId === overnight?.stageId);
    expect(told.map((work) => work.goesOn)).toEqual(['begins', 'ends']);
  });

  it('tells when each dwell is firm and when dates fall', () => {
    const dwelling = view.plan.placements.filter((one) => one.dwellEnd > one.work[one.work.length - 1].end);
    expect(days.flatMap((day) => day.firm)).toHaveLength(dwelling.length);
    expect(days.flatMap((day) => day.dates)).toHaveLength(margins.length);
  });

  it('leaves quiet days out', () => {
    expect(days.every((day) => day.work.length + day.firm.length + day.dates.length > 0)).toBe(true);
  });
});
