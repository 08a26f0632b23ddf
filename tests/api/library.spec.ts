import { randomUUID } from 'node:crypto';
import { withStudio, type Visitor } from './studio';
import { furnish, stageOf, type Workshop } from './workshop';

describe('bays, materials, recipes and the studio', () => {
  const studio = withStudio();
  let manager: Visitor;
  let shop: Workshop;
  beforeAll(async () => {
    manager = await studio.as('manager');
    shop = await furnish(manager);
  });

  it('keep bays of one name apart, and moulds with their piece', async () => {
    const opening = { firstDay: '2026-01-05', rule: 'FREQ=WEEKLY;BYDAY=MO', startMinuteOfDay: 480, lengthMinutes: 480 };
    const made = await manager.post('/api/bays', {
      name: 'Oven',
      kind: 'oven',
      capacity: 3,
      temperatureCelsius: 60,
      openings: [opening],
    });
    expect(made.body).toMatchObject({
      capacity: 3,
      temperatureCelsius: 60,
      openings: [{ ...opening, exceptDays: [], kind: 'ordinary' }],
    });
    const again = await manager.post('/api/bays', { name: 'Oven', kind: 'oven', capacity: 1 });
    expect([again.status, again.body.errors[0].pointer]).toEqual([409, '/name']);
    const mould = await manager.post('/api/bays', { name: 'M', kind: 'booth', capacity: 1, pieceId: randomUUID() });
    expect(mould.body.errors).toEqual([{ pointer: '/pieceId', detail: 'Only a mould belongs to a piece.' }]);
    const changed = await manager.patch(`/api/bays/${made.body.id}`, { temperatureCelsius: null, version: 1 });
    expect(changed.body).toMatchObject({ temperatureCelsius: null, capacity: 3, version: 2 });
    const stale = await manager.patch(`/api/bays/${made.body.id}`, { capacity: 1, version: 1 });
    expect(stale.body).toMatchObject({ status: 409, current: { version: 2 }, sent: { capacity: 1 } });
    const [entry] = await studio.trail(made.body.id as string);
    expect(entry.sentence).toBe('Changed Oven: temperature celsius.');
  });

  const dwell = {
    milestone: 'touch',
    minutes: { low: 30, likely: 60, high: 90 },
    law: { kind: 'none' },
    minimumCelsius: 5,
    maximumCelsius: 30,
    source: 'Usual practice, no source',
  };
  const material = {
    name: 'Primer',
    family: 'coating',
    referenceCelsius: 20,
    referenceHumidityPercent: 50,
    attendedMinutes: 0,
    cautions: ['Air the room.'],
    note: '',
  };

  it('keep a material with its dwells in their order', async () => {
    const made = await manager.post('/api/materials', {
      ...material,
      dwells: [dwell, { ...dwell, milestone: 'full-cure' }],
    });
    expect(made.body.dwells.map((one: { milestone: string }) => one.milestone)).toEqual(['touch', 'full-cure']);
    const changed = await manager.patch(`/api/materials/${made.body.id}`, { dwells: [dwell], version: 1 });
    expect(changed.body).toMatchObject({ dwells: [dwell], cautions: ['Air the room.'], version: 2 });
  });

  it('say what is wrong with a material where it stands', async () => {
    const wrong = { ...dwell, minimumCelsius: 30, maximumCelsius: 5, milestone: 'sandable' };
    const { status, body } = await manager.post('/api/materials', {
      ...material,
      name: 'Twice',
      dwells: [dwell, dwell, wrong],
    });
    expect(status).toBe(422);
    expect(body.errors.map((fault: { pointer: string }) => fault.pointer)).toEqual([
      '/dwells/1/milestone',
      '/dwells/2/maximumCelsius',
    ]);
    const order = await manager.post('/api/materials', {
      ...material,
      dwells: [{ ...dwell, minutes: { low: 9, likely: 5, high: 7 } }],
    });
    expect(order.body.errors[0].pointer).toBe('/dwells/0/minutes/likely');
  });

  it('keep a recipe as it was written, and refuse one that can not be made', async () => {
    const { afterStageIds: _none, ...stage } = stageOf(shop.craftId, 'Paint') as { afterStageIds: unknown };
    const places = [{ bayIds: [shop.bayId], units: 1, hold: 'work', untilStageId: null }];
    const step = { stage: { ...stage, places }, after: [], each: 'once', mould: 'none', untilStep: null };
    const recipe = {
      name: 'Painted',
      makes: 'A thing',
      sizeUnit: 'm²',
      usualSize: 1.5,
      usualCasts: 1,
      usualMoulds: 0,
      usualCoats: 2,
      steps: [step, { ...step, after: [0] }],
    };
    const made = await manager.post('/api/recipes', recipe);
    expect(made.status).toBe(201);
    expect(made.body).toEqual({ ...recipe, id: made.body.id, version: 1 });
    expect((await manager.get('/api/recipes')).body).toContainEqual(made.body);
    const forward = await manager.patch(`/api/recipes/${made.body.id}`, {
      steps: [{ ...step, after: [1] }, step],
      version: 1,
    });
    expect(forward.body.errors[0]).toEqual({ pointer: '/steps', detail: '“Paint” may wait only for steps before it.' });
    const nobody = { ...step, stage: { ...stage, crew: [{ craftId: randomUUID(), least: 1, most: 1 }] } };
    const unknown = await manager.patch(`/api/recipes/${made.body.id}`, { steps: [nobody], version: 1 });
    expect(unknown.body.errors[0]).toEqual({
      pointer: '/steps/0/stage/crew/0/craftId',
      detail: 'There is no such craft.',
    });
  });

  it('keep closures, and open again', async () => {
    const made = await manager.post('/api/closures', {
      name: 'Summer',
      days: { from: '2026-08-03', until: '2026-08-17' },
    });
    const changed = await manager.patch(`/api/closures/${made.body.id}`, {
      days: { from: '2026-08-03', until: '2026-08-10' },
      version: 1,
    });
    expect(changed.body).toMatchObject({ name: 'Summer', days: { until: '2026-08-10' }, version: 2 });
    expect((await manager.delete(`/api/closures/${made.body.id}?version=1`)).status).toBe(409);
    expect((await manager.delete(`/api/closures/${made.body.id}?version=2`)).status).toBe(204);
    expect((await studio.trail(made.body.id as string)).map((entry) => entry.action)).toEqual([
      'removed',
      'changed',
      'created',
    ]);
  });

  it('keep settings, changed by the owner one by one', async () => {
    const owner = await studio.as('owner');
    const before = (await owner.get('/api/studio')).body;
    const { body } = await owner.patch('/api/studio', {
      zone: 'Europe/Rome',
      settings: { freezeMinutes: 60 },
      version: before.version,
    });
    expect(body).toMatchObject({ zone: 'Europe/Rome', settings: { ...before.settings, freezeMinutes: 60 } });
    const [entry] = await studio.trail(before.id as string);
    expect(entry.sentence).toBe('Changed the studio: zone, freeze minutes.');
    const wrong = await owner.patch('/api/studio', { zone: 'Mars/Olympus', version: body.version });
    expect(wrong.body.errors).toEqual([{ pointer: '/zone', detail: 'Name a time zone such as Europe/London.' }]);
  });

  it('tell of one record’s past, newest first, page by page', async () => {
    const all = (await manager.get('/api/audit?limit=200')).body as { at: string }[];
    expect(all.map((entry) => entry.at)).toEqual([...all.map((entry) => entry.at)].sort().reverse());
    const older = (await manager.get(`/api/audit?limit=200&before=${all[2].at}`)).body as { at: string }[];
    expect(older.every((entry) => entry.at < all[2].at)).toBe(true);
  });
});
