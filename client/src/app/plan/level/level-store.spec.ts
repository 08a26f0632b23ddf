import { TestBed } from '@angular/core/testing';
import type { LevelRun } from '@common/contract';
import { openBench, settle } from '../testing/plan-bench';
import { planFixture } from '../testing/plan-fixture';
import { LevelStore } from './level-store';

const view = planFixture();
const run: LevelRun = {
  id: '77777777-0000-4000-8000-000000000001',
  state: 'running',
  mode: 'dates',
  revision: 7,
  startedAt: '2026-12-07T09:00:00Z',
  seconds: 6,
  schedules: 0,
  objective: null,
  bound: null,
  stop: null,
  failure: null,
};
const found: LevelRun = { ...run, state: 'found', schedules: 1200, objective: view.objective, stop: 'budget' };
const proposal = {
  run: found,
  before: view.objective,
  after: view.objective,
  plan: view.plan,
  unmet: [],
  changes: [],
  keyDates: [],
};

async function open() {
  const bench = await openBench(view, [LevelStore]);
  return { ...bench, level: TestBed.inject(LevelStore) };
}

async function start() {
  const bench = await open();
  void bench.level.start('dates');
  const request = bench.http.expectOne({ method: 'POST', url: '/api/plan/level' });
  expect(request.request.body).toMatchObject({ revision: 7, mode: 'dates' });
  request.flush(run, { status: 202, statusText: 'Accepted' });
  await settle();
  return bench;
}

describe('a levelling', () => {
  it('runs, is stopped, and shows what was found until then beside the plan', async () => {
    const { level, http } = await start();
    expect(level.underWay()).toBe(true);
    void level.stop();
    http.expectOne(`/api/plan/level/${run.id}/cancel`).flush({ ...found, state: 'cancelled', stop: 'cancelled' });
    await settle();
    http.expectOne(`/api/plan/level/${run.id}/proposal`).flush(proposal);
    await settle();
    expect(level.underWay()).toBe(false);
    expect(level.proposal()?.run.schedules).toBe(1200);
  });

  it('is taken with the revision that was seen, and the plan is read again', async () => {
    const { level, http } = await start();
    void level.stop();
    http.expectOne(`/api/plan/level/${run.id}/cancel`).flush(found);
    await settle();
    http.expectOne(`/api/plan/level/${run.id}/proposal`).flush(proposal);
    await settle();
    const taken = level.take();
    const request = http.expectOne(`/api/plan/level/${run.id}/take`);
    expect(request.request.body).toEqual({ revision: 7 });
    request.flush({ revision: 8 });
    expect(await taken).toBe(true);
    await settle();
    http.expectOne('/api/plan').flush({ ...view, revision: 8 });
    expect(level.run()).toBeNull();
  });

  it('that was left is left on the server too', async () => {
    const { level, http } = await start();
    void level.stop();
    http.expectOne(`/api/plan/level/${run.id}/cancel`).flush(found);
    await settle();
    http.expectOne(`/api/plan/level/${run.id}/proposal`).flush(proposal);
    await settle();
    void level.leave();
    http.expectOne(`/api/plan/level/${run.id}/leave`).flush({ ...found, state: 'left' });
    expect(level.proposal()).toBeNull();
  });

  it('is taken up again after a reload', async () => {
    const { level, http } = await open();
    void level.resume(run.id);
    http.expectOne(`/api/plan/level/${run.id}`).flush(found);
    await settle();
    http.expectOne(`/api/plan/level/${run.id}/proposal`).flush(proposal);
    await settle();
    expect(level.proposal()).not.toBeNull();
  });

  it('says what the server says where one is running already', async () => {
    const { level, http } = await open();
    void level.start('within-dates');
    http.expectOne('/api/plan/level').flush(
      {
        type: '/problems/level-running',
        title: 'A levelling is already running',
        status: 409,
        detail: 'Wait for it.',
        requestId: 'r',
      },
      { status: 409, statusText: 'Conflict' },
    );
    await settle();
    expect(level.trouble()).toEqual({ title: 'A levelling is already running', detail: 'Wait for it.' });
  });
});
