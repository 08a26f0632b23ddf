import { dateChanges, dateMargins, marginState } from './date-margins';
import { idOf, planFixture } from './testing/plan-fixture';

const view = planFixture();

describe('margins of key dates', () => {
  it('run from the last stage that is firm to the date', () => {
    const [first] = dateMargins(view.problem, view.plan);
    const ends = view.plan.placements
      .filter((placement) => first.keyDate.stageIds.includes(placement.stageId))
      .map((placement) => placement.dwellEnd);
    expect(first.marginMinutes).toBe(first.keyDate.at - Math.max(...ends));
  });

  it('are not known while a stage has no place', () => {
    const [first] = dateMargins(view.problem, { placements: view.plan.placements.slice(1) });
    expect(first).toMatchObject({ readyAt: null, marginMinutes: null });
    expect(marginState(first.marginMinutes)).toBe('unplanned');
  });

  it('change only for the dates that wait for what was moved, the worst loss first', () => {
    const last = new Set([idOf('stage', 5), idOf('stage', 11), idOf('stage', 17), idOf('stage', 35)]);
    const plan = {
      placements: view.plan.placements.map((placement) =>
        last.has(placement.stageId)
          ? { ...placement, dwellEnd: placement.dwellEnd + (placement.stageId === idOf('stage', 35) ? 600 : 60) }
          : placement,
      ),
    };
    const changes = dateChanges(dateMargins(view.problem, view.plan), dateMargins(view.problem, plan));
    expect(changes.map((change) => (change.after ?? 0) - (change.before ?? 0))).toEqual([-600, -60]);
    expect(dateChanges(dateMargins(view.problem, view.plan), dateMargins(view.problem, view.plan))).toEqual([]);
  });

  it('are missed below nothing, close below a day, met above', () => {
    expect([-1, 0, 1439, 1440].map(marginState)).toEqual(['missed', 'close', 'close', 'met']);
  });
});
