import { openBench, settle } from './testing/plan-bench';
import { idOf, planFixture } from './testing/plan-fixture';

const view = planFixture();
const place = { start: view.problem.horizon.start, makerIds: null, bayIds: null };
const conflict = {
  type: '/problems/version-conflict',
  title: 'Someone else changed this meanwhile',
  status: 409,
  detail: 'The plan was changed.',
  requestId: 'r1',
};

describe('the working plan', () => {
  it('is read anew after a change, and the change counts as done only then', async () => {
    const { plan, http } = await openBench(view);
    const moved = plan.moveStage(idOf('stage', 0), place);
    expect(plan.busy()).toBe('Moving…');
    http.expectOne('/api/plan/moves').flush({ revision: 8 });
    await settle();
    expect(plan.busy()).toBe('Moving…');
    http.expectOne('/api/plan').flush({ ...view, revision: 8 });
    expect(await moved).toBe(true);
    expect(plan.view()?.revision).toBe(8);
    expect(plan.busy()).toBeNull();
  });

  it('shows the other’s plan at a conflict and says whose it is', async () => {
    const { plan, http } = await openBench(view);
    const moved = plan.moveStage(idOf('stage', 0), place);
    http.expectOne('/api/plan/moves').flush(conflict, { status: 409, statusText: 'Conflict' });
    await settle();
    http.expectOne('/api/plan').flush({ ...view, revision: 9, changedBy: 'Hal Ostrey' });
    expect(await moved).toBe(false);
    expect(plan.view()?.revision).toBe(9);
    expect(plan.trouble()?.title).toBe('Hal Ostrey changed the plan meanwhile');
  });

  it('makes one change at a time', async () => {
    const { plan, http } = await openBench(view);
    void plan.undo();
    expect(await plan.redo()).toBe(false);
    expect(http.match(() => true).map((one) => one.request.url)).toEqual(['/api/plan/undo']);
  });

  it('keeps the plan in view when a change fails', async () => {
    const { plan, http } = await openBench(view);
    const undone = plan.undo();
    http.expectOne('/api/plan/undo').flush('broken', { status: 500, statusText: 'Server Error' });
    expect(await undone).toBe(false);
    expect(plan.view()?.revision).toBe(7);
    expect(plan.trouble()).not.toBeNull();
  });
});
