import { NO_FACTOR } from '@common/forecast';
import type { Plan, Problem } from '@common/planning';
import { JobPool } from '../../server/jobs/job-pool';
import { eventually, withStudio } from './studio';
import { addProduction, furnish, stageOf } from './workshop';

interface Standing {
  readonly problem: Problem;
  readonly plan: Plan;
}

describe('a worker', () => {
  const studio = withStudio();

  it('that levels answers a cancel long before its time is up', async () => {
    const manager = await studio.as('manager');
    const shop = await furnish(manager);
    const { pieceId } = await addProduction(manager, shop.clientId, 'Large');
    for (let i = 0; i < 30; i += 1)
      await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(shop.craftId, `Coat ${i}`));
    const { problem } = (await manager.get('/api/plan')).body as { problem: Problem };
    const pool = new JobPool(1);
    let begun = false;
    const task = { problem, mode: 'dates' as const, current: { placements: [] }, seed: 1, milliseconds: 30_000 };
    const running = pool.run('level', task, { onProgress: () => (begun = true) });
    await eventually(() => begun);
    running.cancel();
    const outcome = await running.outcome;
    await pool.stop();
    expect(outcome).toMatchObject({ kind: 'found', found: { endedBy: 'cancel' } });
  });

  it('that forecasts answers a cancel with the draws made so far', async () => {
    const { problem, plan } = (await (await studio.as('manager')).get('/api/plan')).body as Standing;
    const pool = new JobPool(1);
    const told: number[] = [];
    const uncertainty = { stages: [], overrun: NO_FACTOR, curing: NO_FACTOR, absence: [] };
    const task = { problem, plan, uncertainty, draws: 100_000, seed: 1, fanSteps: 41 };
    const running = pool.run('forecast', task, { onProgress: ({ draws }) => told.push(draws) });
    await eventually(() => told.length > 1);
    running.cancel();
    const outcome = await running.outcome;
    await pool.stop();
    if (outcome.kind !== 'found') throw new Error(`It came out as ${outcome.kind}.`);
    expect(outcome.found.draws).toBeGreaterThanOrEqual(told[1]);
    expect(outcome.found.draws).toBeLessThan(task.draws);
    expect(outcome.found.stages).toHaveLength(plan.placements.length);
  });

  it('that crashes comes out as failed, and the next task gets another', async () => {
    const pool = new JobPool(1);
    const senseless = { horizon: null } as unknown as Problem;
    const task = {
      problem: senseless,
      mode: 'dates' as const,
      current: { placements: [] },
      seed: 1,
      milliseconds: 100,
    };
    const first = await pool.run('level', task).outcome;
    expect(first.kind).toBe('failed');
    const second = await pool.run('level', task).outcome;
    expect(second.kind).toBe('failed');
    await pool.stop();
  });

  it('that is stopped with its server says so', async () => {
    const pool = new JobPool(1);
    const task = {
      problem: {} as Problem,
      mode: 'dates' as const,
      current: { placements: [] },
      seed: 1,
      milliseconds: 100,
    };
    const waiting = [1, 2].map(() => pool.run('level', task).outcome);
    await pool.stop();
    for (const outcome of await Promise.all(waiting)) expect(outcome.kind).toBe('failed');
  });
});
