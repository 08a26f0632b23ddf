import type { Problem } from '@common/planning';
import { JobPool } from '../../server/jobs/job-pool';
import { eventually, withStudio } from './studio';
import { addProduction, furnish, stageOf } from './workshop';

describe('a worker that levels', () => {
  const studio = withStudio();

  it('answers a cancel long before its time is up', async () => {
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
