import { randomUUID } from 'node:crypto';
import { DateForecast } from '@database/entities';
import { ForecastView, PastHoursView, StudioView, WorkingPlanView } from '@common/contract';
import { eventually, withStudio, type Answer } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

describe('the forecast', () => {
  const studio = withStudio();
  let shop: Workshop;

  it('is of nothing, without a fault, where nothing is planned', async () => {
    const manager = await studio.as('manager');
    const { body, status } = await manager.get('/api/forecast');
    expect(status).toBe(200);
    expect(ForecastView.parse(body).keyDates.every(({ earlier }) => earlier === null)).toBe(true);
  });

  describe('of a studio with makers', () => {
    beforeAll(async () => {
      shop = await furnish(await studio.as('manager'));
    });

    it('tells the spread of each finish and the chance of missing each date, the same at each asking', async () => {
      const manager = await studio.as('manager');
      const { craftId, clientId } = shop;
      const { pieceId } = await addProduction(manager, clientId, 'Heron');
      for (const name of ['Carve', 'Fill', 'Paint']) {
        await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(craftId, name));
      }
      const plan = WorkingPlanView.parse((await manager.get('/api/plan')).body);
      const first = ForecastView.parse((await manager.get('/api/forecast')).body);
      expect(first.revision).toBe(plan.revision);
      expect(first.stages).toHaveLength(plan.plan.placements.length);
      for (const { p10, p50, p80, p90 } of [...first.stages, ...first.keyDates]) {
        expect([p10, p50, p80, p90]).toEqual([p10, p50, p80, p90].sort((a, b) => a - b));
      }
      const again = ForecastView.parse((await manager.get('/api/forecast')).body);
      expect(again).toEqual(first);
    });

    it('draws by the studio’s settings, and refuses those that make no sense at their field', async () => {
      const owner = await studio.as('owner');
      const before = StudioView.parse((await owner.get('/api/studio')).body);
      const reversed = await owner.patch('/api/studio', {
        version: before.version,
        forecast: { replyLowPermille: 1200, absencePermille: -1 },
      });
      expect(reversed.status).toBe(422);
      expect(reversed.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
        '/forecast/replyLowPermille',
        '/forecast/absencePermille',
      ]);
      const changed = await owner.patch('/api/studio', { version: before.version, forecast: { draws: 200 } });
      expect(StudioView.parse(changed.body).forecast).toEqual({ ...before.forecast, draws: 200 });
      expect(ForecastView.parse((await owner.get('/api/forecast')).body).draws).toBe(200);
    });

    it('compares each date with the last forecast of an earlier day', async () => {
      const manager = await studio.as('manager');
      const { craftId, clientId } = shop;
      const delivery = {
        kind: 'delivery',
        at: new Date(Date.now() + 30 * 86_400_000).toISOString(),
        strength: 'hard',
        weight: 10,
        pieceIds: [],
      };
      const { pieceId } = await addProduction(manager, clientId, 'Gull', [delivery]);
      await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(craftId, 'Carve'));
      await manager.get('/api/plan');
      const [{ keyDateId, missChance, earlier, fan, p50 }] = ForecastView.parse(
        (await manager.get('/api/forecast')).body,
      ).keyDates;
      expect({ missChance, earlier }).toEqual({ missChance: 0, earlier: null });
      expect(fan[20]).toBe(p50);
      const kept = studio.database.dataSource.getRepository(DateForecast);
      await kept.update({ keyDateId }, { day: '2026-01-05', missChance: 0.25 });
      await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(craftId, 'Fill'));
      await manager.get('/api/plan');
      const [later] = ForecastView.parse((await manager.get('/api/forecast')).body).keyDates;
      expect(later.earlier).toMatchObject({ day: '2026-01-05', missChance: 0.25 });
    });

    it('learns from finished work how the studio runs against its estimates', async () => {
      const manager = await studio.as('manager');
      const { craftId, clientId } = shop;
      const { pieceId } = await addProduction(manager, clientId, 'Tern');
      const { id } = (await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(craftId, 'Carve'))).body;
      const before = PastHoursView.parse((await manager.get('/api/past-hours')).body);
      expect(before).toMatchObject({ stages: 0, prior: { middlePermille: 1050 }, learnt: { middlePermille: 1050 } });
      await manager.post(`/api/stages/${id}/start`, { key: randomUUID(), at: new Date().toISOString() });
      const finish = { key: randomUUID(), at: new Date().toISOString(), spentMinutes: 480 };
      expect((await manager.post(`/api/stages/${id}/finish`, finish)).status).toBe(200);
      const after = PastHoursView.parse((await manager.get('/api/past-hours')).body);
      // PERT: (90 + 4 × 120 + 180) / 6.
      expect(after.crafts).toMatchObject([{ name: 'Painting', stages: 1, expectedMinutes: 125, actualMinutes: 480 }]);
      expect(after.learnt.middlePermille).toBeGreaterThan(before.learnt.middlePermille);
      const { overrun } = ForecastView.parse((await manager.get('/api/forecast')).body);
      expect(overrun).toMatchObject({ pastStages: 1, middlePermille: after.learnt.middlePermille });
    });
  });
});

describe('a forecast that somebody stops', () => {
  const studio = withStudio({ config: { engineWorkers: 1 } });

  it('says so to whoever waits for it, and is made when it is asked for again', async () => {
    const manager = await studio.as('manager');
    const shop = await furnish(manager);
    const { pieceId } = await addProduction(manager, shop.clientId, 'Plover');
    for (let i = 0; i < 30; i += 1)
      await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(shop.craftId, `Coat ${i}`));
    const { revision } = WorkingPlanView.parse((await manager.get('/api/plan')).body);
    // The only worker is at something else, so that the forecast has to wait.
    const run = await manager.post('/api/plan/level', { revision, mode: 'dates', seconds: 60, seed: 1 });
    expect(run.status).toBe(202);
    const settled: Answer[] = [];
    void manager.get('/api/forecast').then((answer) => settled.push(answer));
    await eventually(async () => {
      expect((await manager.post('/api/forecast/stop')).status).toBe(204);
      return settled.length > 0;
    });
    expect(settled[0].status).toBe(409);
    expect(settled[0].body).toMatchObject({ type: '/problems/forecast-stopped' });
    expect(settled[0].body.detail).toContain('before it had begun');
    await manager.post(`/api/plan/level/${run.body.id}/cancel`);
    const again = await manager.get('/api/forecast');
    expect(again.status).toBe(200);
    expect(ForecastView.parse(again.body)).toMatchObject({ draws: 1000, drawsAsked: 1000 });
  });
});
