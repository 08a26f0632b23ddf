import { randomUUID } from 'node:crypto';
import { Account, Bay, Stage, StageReport } from '@database/entities';
import { hashPassword } from '../../server/session';
import { PASSWORD, withStudio, type Visitor } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

const ahead = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString();

describe('productions', () => {
  const studio = withStudio();
  let manager: Visitor;
  let shop: Workshop;
  beforeAll(async () => {
    manager = await studio.as('manager');
    shop = await furnish(manager);
  });
  const addStage = async (pieceId: string, name: string, more: object = {}) =>
    manager.post(`/api/pieces/${pieceId}/stages`, stageOf(shop.craftId, name, more));
  const production = async (id: string) => (await manager.get(`/api/productions/${id}`)).body;

  it('are entered with their key dates, and written down', async () => {
    const date = { kind: 'delivery', at: ahead(30), strength: 'hard', weight: 10 };
    const { productionId } = await addProduction(manager, shop.clientId, 'The Moon', [date]);
    const stored = await production(productionId);
    expect(stored).toMatchObject({ name: 'The Moon', clientName: 'Pellwick', pieces: 1, stages: 0, version: 1 });
    expect(stored.keyDates).toMatchObject([{ ...date, pieceIds: [], version: 1 }]);
    const [entry] = await studio.trail(productionId);
    expect(entry.sentence).toBe('Entered the production The Moon for Pellwick.');
  });

  it('refuse a key date that has gone by, at its field', async () => {
    const date = { kind: 'delivery', at: '2020-01-01T00:00:00Z', strength: 'hard', weight: 10 };
    const fields = { name: 'Late', clientId: shop.clientId, mark: 'La', hue: 1, state: 'committed', keyDates: [date] };
    const { status, body } = await manager.post('/api/productions', fields);
    expect(status).toBe(422);
    expect(body.errors).toEqual([
      { pointer: '/keyDates/0/at', detail: 'This date has gone by. Choose one that is still ahead.' },
    ]);
  });

  it('refuse a stage whose craft nobody holds, and a session longer than any shift', async () => {
    const { pieceId } = await addProduction(manager, shop.clientId, 'Unfit');
    const craft = (await manager.post('/api/crafts', { key: 'welding', name: 'Welding' })).body;
    const unheld = await addStage(pieceId, 'Weld', { crew: [{ craftId: craft.id, least: 1, most: 1 }] });
    expect(unheld.body.errors).toEqual([
      {
        pointer: '/crew/0/craftId',
        detail: 'Nobody in the crew holds Welding. Add the craft to a maker first, or choose another.',
      },
    ]);
    const handsOn = { lowMinutes: 300, likelyMinutes: 600, highMinutes: 700 };
    const pattern = { firstDay: '2026-01-05', rule: 'FREQ=DAILY', startMinuteOfDay: 480, lengthMinutes: 480 };
    const crafts = [{ craftId: craft.id, pacePermille: 1000 }];
    await manager.post('/api/makers', { name: 'Ron', initials: 'R', crafts, patterns: [pattern], hourCostMinor: 1 });
    const tooLong = await addStage(pieceId, 'Weld', { handsOn, crew: [{ craftId: craft.id, least: 1, most: 1 }] });
    expect(tooLong.body.errors[0].pointer).toBe('/continuity');
    expect(tooLong.body.errors[0].detail).toContain('this takes 10 h with the most hands');
    expect(tooLong.body.errors[0].detail).toContain('is 8 h');
  });

  it('refuse a circle of links, named stage by stage', async () => {
    const { pieceId, productionId } = await addProduction(manager, shop.clientId, 'Circle');
    const ids: string[] = [];
    for (const name of ['Carve', 'Seal', 'Paint']) ids.push((await addStage(pieceId, name)).body.id as string);
    const link = { kind: 'finish-start', after: 'dwell', minGapMinutes: 0, maxGapMinutes: null, time: 'clock' };
    const { status, body } = await manager.post('/api/links', { ...link, fromStageId: ids[2], toStageId: ids[0] });
    expect([status, body.type]).toEqual([422, '/problems/link-cycle']);
    expect(body.detail).toBe(
      '“Moon: Carve” → “Moon: Seal” → “Moon: Paint” → “Moon: Carve”: each would wait for the one before, and the first for the last.',
    );
    expect((await production(productionId)).links).toEqual([]);
  });

  it('write down the order that was understood when the first link is set', async () => {
    const { pieceId, productionId } = await addProduction(manager, shop.clientId, 'Order');
    const ids: string[] = [];
    for (const name of ['Carve', 'Seal', 'Paint']) ids.push((await addStage(pieceId, name)).body.id as string);
    const link = { kind: 'finish-start', after: 'dwell', minGapMinutes: 60, maxGapMinutes: null, time: 'clock' };
    expect(
      (await manager.post('/api/links', { ...link, kind: 'start-start', fromStageId: ids[0], toStageId: ids[2] }))
        .status,
    ).toBe(201);
    const links = (await production(productionId)).links as { fromStageId: string; toStageId: string }[];
    const pairs = links.map(({ fromStageId, toStageId }) =>
      [ids.indexOf(fromStageId), ids.indexOf(toStageId)].join('→'),
    );
    expect(pairs.sort()).toEqual(['0→1', '0→2', '1→2']);
  });

  it('never let two links at once close a circle', async () => {
    const a = await addProduction(manager, shop.clientId, 'One');
    const b = await addProduction(manager, shop.clientId, 'Other');
    const one = (await addStage(a.pieceId, 'One')).body.id as string;
    const other = (await addStage(b.pieceId, 'Other')).body.id as string;
    const link = { kind: 'finish-start', after: 'dwell', minGapMinutes: 0, maxGapMinutes: null, time: 'clock' };
    const answers = await Promise.all([
      manager.post('/api/links', { ...link, fromStageId: one, toStageId: other }),
      manager.post('/api/links', { ...link, fromStageId: other, toStageId: one }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 422]);
  });

  it('bridge the gap that a removed stage leaves', async () => {
    const { pieceId, productionId } = await addProduction(manager, shop.clientId, 'Bridge');
    const first = (await addStage(pieceId, 'Carve')).body.id as string;
    const middle = (await addStage(pieceId, 'Seal', { afterStageIds: [first] })).body;
    const last = (await addStage(pieceId, 'Paint', { afterStageIds: [middle.id] })).body.id as string;
    expect((await manager.delete(`/api/stages/${middle.id}?version=1`)).status).toBe(204);
    const { links, stagesInOrder } = await production(productionId);
    expect(links).toMatchObject([{ fromStageId: first, toStageId: last }]);
    expect(stagesInOrder.map((stage: { name: string }) => stage.name)).toEqual(['Carve', 'Paint']);
    expect((await manager.patch(`/api/stages/${middle.id}`, { name: 'Gone', version: 1 })).status).toBe(404);
  });

  it('are made by a recipe, with a mould for each that it makes', async () => {
    const { productionId } = await addProduction(manager, shop.clientId, 'Casts');
    const { afterStageIds: _none, ...stage } = stageOf(shop.craftId, 'Step') as { afterStageIds: unknown };
    const step = (name: string, more: object) => ({
      stage: { ...stage, name },
      after: [],
      each: 'once',
      mould: 'none',
      untilStep: null,
      ...more,
    });
    const dwell = { materialId: null, milestone: null, minutes: 240, attendedMinutes: 0, window: null };
    const recipe = await manager.post('/api/recipes', {
      name: 'Casts from a mould',
      makes: '',
      sizeUnit: 'm²',
      usualSize: 1,
      usualCasts: 1,
      usualMoulds: 1,
      usualCoats: 1,
      steps: [
        step('Make mould', { each: 'mould', mould: 'makes' }),
        {
          ...step('Fill', { each: 'cast', mould: 'fills', after: [0], untilStep: 2 }),
          stage: { ...stage, name: 'Fill', dwell },
        },
        step('Demould', { each: 'cast', after: [1] }),
      ],
    });
    expect(recipe.status).toBe(201);
    const choice = { recipeId: recipe.body.id, size: 2, casts: 3, moulds: 2, coats: 1 };
    const { status, body } = await manager.post(`/api/productions/${productionId}/pieces`, {
      name: 'Tiles',
      recipe: choice,
    });
    expect(status).toBe(201);
    const own = body.stagesInOrder.filter((it: { pieceId: string }) => it.pieceId === body.piecesInOrder[1].id);
    expect(own.map((it: { name: string; nth: number; of: number }) => `${it.name} ${it.nth}/${it.of}`)).toEqual([
      'Make mould 1/2',
      'Make mould 2/2',
      'Fill 1/3',
      'Demould 1/3',
      'Fill 2/3',
      'Demould 2/3',
      'Fill 3/3',
      'Demould 3/3',
    ]);
    expect(own[0].handsOn.likelyMinutes).toBe(240);
    const moulds = await studio.database.dataSource.manager.find(Bay, {
      where: { pieceId: body.piecesInOrder[1].id as string },
      order: { name: 'ASC' },
    });
    expect(moulds.map(({ name, kind, capacity }) => [name, kind, capacity])).toEqual([
      ['Tiles: mould 1', 'mould', 1],
      ['Tiles: mould 2', 'mould', 1],
    ]);
    const fills = own.filter((it: { name: string }) => it.name === 'Fill');
    expect(fills.map((it: { places: unknown[] }) => it.places)).toEqual(
      [0, 1, 0].map((mould, i) => [
        { bayIds: [moulds[mould].id], units: 1, hold: 'until-stage', untilStageId: own[3 + 2 * i].id },
      ]),
    );
    const none = await manager.post(`/api/productions/${productionId}/pieces`, {
      name: 'None',
      recipe: { ...choice, moulds: 0 },
    });
    expect(none.body.errors[0]).toMatchObject({ pointer: '/recipe' });
  });

  it('count a report sent twice once', async () => {
    const hand = await studio.as('maker');
    const { pieceId } = await addProduction(manager, shop.clientId, 'Reports');
    const { id } = (await addStage(pieceId, 'Paint')).body;
    const start = { key: randomUUID(), at: new Date(Date.now() - 3_600_000).toISOString() };
    const begun = await hand.post(`/api/stages/${id}/start`, start);
    expect(begun.body).toMatchObject({ state: 'started', startedAt: start.at, version: 2 });
    expect((await hand.post(`/api/stages/${id}/start`, start)).body).toEqual(begun.body);
    const finish = { key: randomUUID(), at: new Date().toISOString(), note: 'Dry by noon' };
    const done = await hand.post(`/api/stages/${id}/finish`, finish);
    expect(done.body).toMatchObject({
      state: 'finished',
      finishedAt: finish.at,
      spentMinutes: 60,
      remainingMinutes: 0,
    });
    await hand.post(`/api/stages/${id}/finish`, finish);
    expect(await studio.database.dataSource.manager.countBy(StageReport, { stageId: id as string })).toBe(2);
    expect((await studio.trail(id as string)).map((entry) => entry.action)).toEqual([
      'reported-finish',
      'reported-start',
      'created',
    ]);
    const again = await hand.post(`/api/stages/${id}/start`, { ...start, key: randomUUID() });
    expect([again.status, again.body.detail]).toEqual([422, '“Moon: Paint” is finished already.']);
    expect((await manager.delete(`/api/stages/${id}?version=${done.body.version}`)).body.type).toBe(
      '/problems/still-in-use',
    );
  });

  it('count a report sent many times at once once', async () => {
    const hand = await studio.as('maker');
    const { pieceId } = await addProduction(manager, shop.clientId, 'Storm');
    const { id } = (await addStage(pieceId, 'Paint')).body;
    const start = { key: randomUUID(), at: new Date().toISOString(), spentMinutes: 30 };
    const answers = await Promise.all(Array.from({ length: 5 }, () => hand.post(`/api/stages/${id}/start`, start)));
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200, 200]);
    const stored = await studio.database.dataSource.manager.findOneByOrFail(Stage, { id: id as string });
    expect(stored).toMatchObject({ state: 'started', spentMinutes: 30, version: 2 });
  });

  it('refuse a report from the future, or of nothing under way', async () => {
    const { pieceId } = await addProduction(manager, shop.clientId, 'Future');
    const { id } = (await addStage(pieceId, 'Paint')).body;
    const future = await manager.post(`/api/stages/${id}/start`, { key: randomUUID(), at: ahead(1) });
    expect(future.body.errors[0].pointer).toBe('/at');
    const pause = await manager.post(`/api/stages/${id}/pause`, { key: randomUUID(), at: new Date().toISOString() });
    expect(pause.status).toBe(422);
  });

  it('keep what purchases cost from makers', async () => {
    const { pieceId, productionId } = await addProduction(manager, shop.clientId, 'Castors');
    const { id: stageId } = (await addStage(pieceId, 'Fit castors')).body;
    const draft = {
      stageId,
      name: 'Castors',
      supplier: '',
      leadDays: 5,
      orderedOn: null,
      dueOn: null,
      receivedOn: null,
      costMinor: 4200,
    };
    const made = await manager.post(`/api/productions/${productionId}/purchases`, draft);
    expect([made.status, made.body.costMinor]).toEqual([201, 4200]);
    const seen = (await (await studio.as('maker')).get(`/api/productions/${productionId}`)).body;
    expect(seen.purchases[0]).not.toHaveProperty('costMinor');
    expect(JSON.stringify(seen)).not.toContain('4200');
    const wrong = { orderedOn: '2026-05-05', receivedOn: '2026-05-04', version: 1 };
    expect((await manager.patch(`/api/purchases/${made.body.id}`, wrong)).body.errors[0].pointer).toBe('/receivedOn');
    const removed = await manager.delete(`/api/stages/${stageId}?version=1`);
    expect(removed.body.detail).toContain('The purchase “Castors” is for “Moon: Fit castors”');
  });

  describe('as their client sees them', () => {
    let own: Visitor;
    let other: Visitor;
    beforeAll(async () => {
      const passwordHash = await hashPassword(PASSWORD);
      const email = `${randomUUID()}@studio.test`;
      const row = {
        id: randomUUID(),
        name: 'Own',
        email,
        role: 'client',
        clientId: shop.clientId,
        passwordHash,
      } as const;
      await studio.database.dataSource.manager.insert(Account, row);
      own = studio.visitor();
      await own.signIn(email);
      other = await studio.as('client');
    });
    const signOff = { kind: 'sign-off', crew: [], continuity: 'clock', replyMinutes: 2880, note: 'Ask twice' };

    it('show dates and decisions, and nothing of others or of rates', async () => {
      const { pieceId, productionId } = await addProduction(manager, shop.clientId, 'For looking');
      await addStage(pieceId, 'Carve');
      await addStage(pieceId, 'Foam sign-off', signOff);
      const page = (await own.get('/api/client-page')).body as { id: string; decisions: unknown[]; stages: number }[];
      const seen = page.find(({ id }) => id === productionId);
      expect(seen).toMatchObject({ stages: 2, finishedStages: 0, readyAt: null });
      expect(seen?.decisions).toMatchObject([{ name: 'Foam sign-off', pieceName: 'Moon', state: 'ahead', version: 1 }]);
      expect(JSON.stringify(page)).not.toMatch(/cost|rate|note|handsOn|crew/i);
      expect((await other.get('/api/client-page')).body).toEqual([]);
    });

    it('are decided by their own client; another’s is told like none at all', async () => {
      const { pieceId } = await addProduction(manager, shop.clientId, 'For deciding');
      const { id } = (await addStage(pieceId, 'Foam sign-off', signOff)).body;
      const decision = { decision: 'changes-asked', at: new Date().toISOString(), note: 'Rounder', version: 1 };
      const foreign = await other.post(`/api/stages/${id}/decision`, decision);
      const missing = await other.post(`/api/stages/${randomUUID()}/decision`, decision);
      expect([foreign.status, foreign.body.detail]).toEqual([404, missing.body.detail]);
      const asked = await own.post(`/api/stages/${id}/decision`, decision);
      expect(asked.body).toMatchObject({ state: 'to-do', note: '', crew: [], version: 2 });
      const stale = await own.post(`/api/stages/${id}/decision`, { ...decision, decision: 'approved' });
      expect(stale.body.type).toBe('/problems/version-conflict');
      expect(JSON.stringify(stale.body)).not.toContain('Ask twice');
      const approved = await own.post(`/api/stages/${id}/decision`, { ...decision, decision: 'approved', version: 2 });
      expect(approved.body.state).toBe('finished');
      const [entry] = await studio.trail(id as string);
      expect(entry).toMatchObject({
        action: 'approved',
        accountName: 'Own',
        sentence: 'Approved “Moon: Foam sign-off”: Rounder',
      });
      expect((await own.post(`/api/stages/${id}/decision`, { ...decision, version: 3 })).body.type).toBe(
        '/problems/already-exists',
      );
    });
  });
});
