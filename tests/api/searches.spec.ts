import { RescueSearchView, TakenMeasure, WorkingPlanView } from '@common/contract';
import { withStudio, type Visitor } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

jest.setTimeout(60_000);

/** A search may take long on a busy machine. */
const MOST_LOOKS = 200;

const inDays = (days: number): string => new Date(Date.now() + days * 86_400_000).toISOString();
const dateIn = (days: number) => ({ kind: 'delivery', at: inDays(days), strength: 'hard', weight: 10, pieceIds: [] });

describe('searches about the working plan', () => {
  const studio = withStudio();
  let manager: Visitor;
  let shop: Workshop;
  let late: { readonly productionId: string; readonly pieceId: string };
  let keyDateId = '';

  const plan = async () => WorkingPlanView.parse((await manager.get('/api/plan')).body);
  async function ended<T extends { readonly state: string }>(path: string, parse: (body: unknown) => T): Promise<T> {
    for (let looks = 0; looks < MOST_LOOKS; looks += 1) {
      const view = parse((await manager.get(path)).body);
      if (view.state !== 'waiting' && view.state !== 'running') return view;
      await new Promise((resolve) => setTimeout(resolve, 250));
    }
    throw new Error('It did not end.');
  }

  beforeAll(async () => {
    manager = await studio.as('manager');
    shop = await furnish(manager);
    // Two makers who work day and night, twenty times eight hours in a row, and a date after three days: it is missed.
    late = await addProduction(manager, shop.clientId, 'Heron', [dateIn(3)]);
    const hours = { lowMinutes: 400, likelyMinutes: 480, highMinutes: 700 };
    for (let k = 0; k < 20; k += 1) {
      const stage = stageOf(shop.craftId, `Coat ${String(k)}`, { handsOn: hours, continuity: 'shifts' });
      expect((await manager.post(`/api/pieces/${late.pieceId}/stages`, stage)).status).toBe(201);
    }
    keyDateId = (await plan()).problem.keyDates[0].id;
  });

  describe('for a rescue', () => {
    let found: RescueSearchView;

    it('find what would save a date, with its price, and leave the plan as it is', async () => {
      const before = await plan();
      const started = await manager.post('/api/rescues', { keyDateId });
      expect(started.status).toBe(202);
      const { id } = RescueSearchView.parse(started.body);
      found = await ended(`/api/rescues/${id}`, (body) => RescueSearchView.parse(body));
      expect(found).toMatchObject({ state: 'found', stale: false, keyDateId });
      expect(found.before?.missChance).toBeGreaterThan(0.9);
      expect(found.rescues.length).toBeGreaterThan(1);
      const [best] = found.rescues;
      expect(best.saves).toBe(true);
      expect(best.measures.every(({ sentence }) => sentence.length > 10)).toBe(true);
      expect(await plan()).toMatchObject({ revision: before.revision, plan: before.plan, problem: before.problem });
    });

    it('are taken into the working plan, told there, and undone', async () => {
      const before = await plan();
      const taken = await manager.post(`/api/rescues/${found.id}/take`, { revision: before.revision, rescue: 0 });
      expect(taken.status).toBe(200);
      const counted = TakenMeasure.array().parse((await manager.get('/api/plan/measures')).body);
      expect(counted.map(({ sentence }) => sentence)).toEqual(
        found.rescues[0].measures.map(({ sentence }) => sentence),
      );
      const after = await plan();
      expect(after.stale).toBe(false);
      const again = await manager.post(`/api/rescues/${found.id}/take`, { revision: after.revision, rescue: 0 });
      expect([again.status, again.body.type]).toEqual([409, '/problems/plan-stale']);
      await manager.post('/api/plan/undo', { revision: after.revision });
      expect((await manager.get('/api/plan/measures')).body).toEqual([]);
      expect((await plan()).fingerprint).toBe(before.fingerprint);
    });

    it('are dropped again one by one', async () => {
      const { revision } = await plan();
      await manager.post(`/api/rescues/${found.id}/take`, { revision, rescue: 0 });
      const counted = (await manager.get('/api/plan/measures')).body.length as number;
      const dropped = await manager.post('/api/plan/measures/drop', { revision: (await plan()).revision, measure: 0 });
      expect(dropped.status).toBe(200);
      expect((await manager.get('/api/plan/measures')).body).toHaveLength(counted - 1);
      const none = await manager.post('/api/plan/measures/drop', { revision: (await plan()).revision, measure: 99 });
      expect(none.status).toBe(404);
    });

    it('can be stopped', async () => {
      const { id } = RescueSearchView.parse((await manager.post('/api/rescues', { keyDateId })).body);
      const stopped = RescueSearchView.parse((await manager.post(`/api/rescues/${id}/cancel`)).body);
      expect(['cancelled', 'found', 'failed']).toContain(stopped.state);
    });

    it('need a key date that is ahead', async () => {
      const unknown = await manager.post('/api/rescues', { keyDateId: shop.craftId });
      expect([unknown.status, unknown.body.detail]).toEqual([404, 'There is no such key date ahead.']);
    });
  });
});
