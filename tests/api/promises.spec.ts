import { setTimeout as pause } from 'node:timers/promises';
import { randomUUID } from 'node:crypto';
import { PromiseSearchView, WorkingPlanView } from '@common/contract';
import { withStudio, type Visitor } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

const LOOK_EVERY_MS = 50;

/** The question once it has ended, however it ended. */
async function ended(visitor: Visitor, id: string): Promise<PromiseSearchView> {
  for (;;) {
    const view = PromiseSearchView.parse((await visitor.get(`/api/promises/${id}`)).body);
    if (view.state !== 'waiting' && view.state !== 'running') return view;
    await pause(LOOK_EVERY_MS);
  }
}

function inDays(days: number): string {
  return new Date(Date.now() + days * 86_400_000).toISOString();
}

function delivery(days: number): object {
  return { kind: 'delivery', at: inDays(days), strength: 'wished', weight: 10, pieceIds: [] };
}

describe('a promise', () => {
  const studio = withStudio();
  let shop: Workshop;
  let manager: Visitor;
  let enquiryId: string;

  beforeAll(async () => {
    manager = await studio.as('manager');
    shop = await furnish(manager);
    const committed = await addProduction(manager, shop.clientId, 'Heron', [delivery(20)]);
    await manager.post(`/api/pieces/${committed.pieceId}/stages`, stageOf(shop.craftId, 'Carve'));
    const enquiry = await addProduction(manager, shop.clientId, 'Tern', [delivery(10)]);
    enquiryId = enquiry.productionId;
    const { body } = await manager.get(`/api/productions/${enquiryId}`);
    await manager.patch(`/api/productions/${enquiryId}`, { version: body.version, state: 'tentative' });
    for (const name of ['Carve', 'Paint']) {
      await manager.post(`/api/pieces/${enquiry.pieceId}/stages`, stageOf(shop.craftId, name));
    }
    await manager.get('/api/plan');
  });

  it('is answered both ways, and asking leaves the working plan as it is', async () => {
    const before = WorkingPlanView.parse((await manager.get('/api/plan')).body);
    const asked = await manager.post('/api/promises', { productionId: enquiryId, draws: 100 });
    expect([asked.status, asked.body.productionId]).toEqual([202, enquiryId]);
    const view = await ended(manager, asked.body.id as string);
    expect([view.state, view.stale, view.answer?.draws]).toEqual(['found', false, 100]);
    for (const way of [view.answer?.behind, view.answer?.among]) {
      const dates = [way?.p50, way?.p80, way?.p90].map((at) => at ?? Infinity);
      expect(dates).toEqual([...dates].sort((a, b) => a - b));
      expect(way?.asked).toHaveLength(1);
      expect(way?.others.map(({ productionName }) => productionName)).toEqual(['Heron']);
    }
    view.answer?.behind.others.forEach((date) => expect(date.marginAfter).toBe(date.marginBefore));
    expect(view.answer?.shortages.crafts.map(({ name }) => name)).toEqual(['Painting']);
    const after = WorkingPlanView.parse((await manager.get('/api/plan')).body);
    expect({ ...after, now: 0 }).toEqual({ ...before, now: 0 });
  });

  it('is the same when asked again of the same studio', async () => {
    const answers = [];
    for (const draws of [100, 100]) {
      const { body } = await manager.post('/api/promises', { productionId: enquiryId, draws });
      answers.push((await ended(manager, body.id as string)).answer);
    }
    expect(answers[1]).toEqual(answers[0]);
  });

  it('shows as out of date once the studio has changed, newest first in the list', async () => {
    const { body } = await manager.post('/api/promises', { productionId: enquiryId, draws: 100 });
    await ended(manager, body.id as string);
    const more = await addProduction(manager, shop.clientId, 'Owl', [delivery(15)]);
    await manager.post(`/api/pieces/${more.pieceId}/stages`, stageOf(shop.craftId, 'Carve'));
    const list = PromiseSearchView.array().parse((await manager.get('/api/promises')).body);
    expect(list.map(({ id, stale }) => ({ id, stale }))).toEqual([{ id: body.id, stale: true }]);
  });

  it('can be stopped, and then nothing is kept of it', async () => {
    const { body } = await manager.post('/api/promises', { productionId: enquiryId, draws: 5000 });
    const stopped = await manager.post(`/api/promises/${body.id}/cancel`);
    expect(stopped.status).toBe(200);
    const view = await ended(manager, body.id as string);
    expect([view.state, view.answer]).toEqual(['cancelled', null]);
  });

  it('is refused for what is committed, empty or unknown, in words to act on', async () => {
    const empty = await addProduction(manager, shop.clientId, 'Wren');
    const ask = (productionId: string) => manager.post('/api/promises', { productionId });
    const committed = await ask(empty.productionId);
    expect([committed.status, committed.body.errors[0].detail]).toEqual([422, expect.stringContaining('tentative')]);
    const { body } = await manager.get(`/api/productions/${empty.productionId}`);
    await manager.patch(`/api/productions/${empty.productionId}`, { version: body.version, state: 'tentative' });
    const nothing = await ask(empty.productionId);
    expect([nothing.status, nothing.body.errors[0].detail]).toEqual([422, expect.stringContaining('Add its pieces')]);
    expect((await ask(randomUUID())).status).toBe(422);
    expect((await manager.get(`/api/promises/${randomUUID()}`)).status).toBe(404);
    const few = await manager.post('/api/promises', { productionId: enquiryId, draws: 5 });
    expect([few.status, few.body.errors[0].pointer]).toEqual([422, '/draws']);
  });

  it('is for the office only', async () => {
    for (const role of ['maker', 'client'] as const) {
      const visitor = await studio.as(role);
      expect((await visitor.post('/api/promises', { productionId: enquiryId })).status).toBe(403);
      expect((await visitor.get('/api/promises')).status).toBe(403);
    }
  });
});
