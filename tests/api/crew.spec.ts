import { randomUUID } from 'node:crypto';
import { Leave, Maker } from '@database/entities';
import { eventually, withStudio, type Visitor } from './studio';

const WEEKDAYS = {
  firstDay: '2026-01-05',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  startMinuteOfDay: 480,
  lengthMinutes: 480,
  exceptDays: ['2026-05-25'],
  kind: 'ordinary',
};

describe('the crew', () => {
  const studio = withStudio();
  let manager: Visitor;
  let craftId: string;
  beforeAll(async () => {
    manager = await studio.as('manager');
    craftId = (await manager.post('/api/crafts', { key: 'carving', name: 'Carving' })).body.id as string;
  });

  const addMaker = async (name: string) =>
    (
      await manager.post('/api/makers', {
        name,
        initials: 'AB',
        crafts: [{ craftId, pacePermille: 1100 }],
        patterns: [WEEKDAYS],
        hourCostMinor: 2650,
      })
    ).body;

  it('takes a maker in, tells open pages, and writes it down', async () => {
    const stream = await manager.listen();
    const maker = await addMaker('Ada');
    expect(maker).toMatchObject({
      name: 'Ada',
      crafts: [{ craftId, pacePermille: 1100 }],
      patterns: [WEEKDAYS],
      version: 1,
      active: true,
    });
    expect((await manager.get(`/api/makers/${maker.id}`)).body).toEqual(maker);
    const [entry] = await studio.trail(maker.id as string);
    expect(entry).toMatchObject({
      action: 'created',
      subjectKind: 'maker',
      sentence: 'Added Ada to the crew.',
      before: null,
      after: maker,
    });
    await eventually(() => stream.events.some((event) => event['subject'] === 'maker' && event['id'] === maker.id));
    stream.stop();
  });

  it('changes what is sent and leaves the rest', async () => {
    const maker = await addMaker('Bea');
    const { status, body } = await manager.patch(`/api/makers/${maker.id}`, {
      name: 'Beatrix',
      dayLimitMinutes: 540,
      version: 1,
    });
    expect(status).toBe(200);
    expect(body).toEqual({ ...maker, name: 'Beatrix', dayLimitMinutes: 540, version: 2 });
    const cleared = await manager.patch(`/api/makers/${maker.id}`, { dayLimitMinutes: null, crafts: [], version: 2 });
    expect(cleared.body).toMatchObject({ dayLimitMinutes: null, crafts: [], patterns: [WEEKDAYS], version: 3 });
    const [entry] = await studio.trail(maker.id as string);
    expect(entry.sentence).toBe('Changed Beatrix: crafts, day limit minutes.');
  });

  it('refuses a change to what somebody else changed, and shows both', async () => {
    const maker = await addMaker('Cai');
    await manager.patch(`/api/makers/${maker.id}`, { name: 'Cai the first', version: 1 });
    const late = await manager.patch(`/api/makers/${maker.id}`, { name: 'Cai the second', version: 1 });
    expect([late.status, late.body.type]).toEqual([409, '/problems/version-conflict']);
    expect(late.body.current).toMatchObject({ name: 'Cai the first', version: 2 });
    expect(late.body.sent).toMatchObject({ name: 'Cai the second', version: 1 });
  });

  it('lets one of two changes at once through, never both', async () => {
    const maker = await addMaker('Dot');
    const answers = await Promise.all(
      Array.from({ length: 6 }, (_, i) => manager.patch(`/api/makers/${maker.id}`, { name: `Dot ${i}`, version: 1 })),
    );
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(5);
    const stored = await studio.database.dataSource.manager.findOneByOrFail(Maker, { id: maker.id as string });
    expect(stored.version).toBe(2);
  });

  it('keeps rates and notes from makers', async () => {
    const hand = await studio.as('maker');
    for (const maker of (await hand.get('/api/makers')).body) {
      expect(maker).not.toHaveProperty('hourCostMinor');
      expect(maker.note).toBe('');
    }
    expect((await manager.get('/api/makers')).body[0]).toHaveProperty('hourCostMinor');
  });

  it('says what is wrong with a pattern or a craft where it stands', async () => {
    const fields = { name: 'Eli', initials: 'E', hourCostMinor: 1, patterns: [{ ...WEEKDAYS, rule: 'FREQ=HOURLY' }] };
    const crafts = [
      { craftId, pacePermille: 1000 },
      { craftId, pacePermille: 900 },
      { craftId: randomUUID(), pacePermille: 1000 },
    ];
    const { status, body } = await manager.post('/api/makers', { ...fields, crafts });
    expect(status).toBe(422);
    expect(body.errors).toEqual([
      { pointer: '/crafts/1/craftId', detail: 'This craft is named twice.' },
      { pointer: '/crafts/2/craftId', detail: 'There is no such craft.' },
      { pointer: '/patterns/0/rule', detail: '“HOURLY” is not a value that FREQ can have.' },
    ]);
  });

  it('refuses leave that overlaps the same maker’s, and takes leave that only touches it', async () => {
    const { id: makerId } = await addMaker('Fen');
    const other = await addMaker('Gus');
    const week = { from: '2026-08-03', until: '2026-08-10' };
    const made = await manager.post('/api/leave', { makerId, days: week });
    expect([made.status, made.body.days]).toEqual([201, week]);
    const overlapping = await manager.post('/api/leave', {
      makerId,
      days: { from: '2026-08-09', until: '2026-08-12' },
    });
    expect(overlapping.status).toBe(422);
    expect(overlapping.body.errors).toEqual([
      { pointer: '/days', detail: 'Fen is on leave from 2026-08-03 until 2026-08-10 already; the two overlap.' },
    ]);
    expect(
      (await manager.post('/api/leave', { makerId, days: { from: '2026-08-10', until: '2026-08-12' } })).status,
    ).toBe(201);
    expect((await manager.post('/api/leave', { makerId: other.id, days: week })).status).toBe(201);
    expect((await manager.get(`/api/leave?makerId=${makerId}`)).body).toHaveLength(2);
    expect((await manager.delete(`/api/leave/${made.body.id}`)).status).toBe(204);
    expect(await studio.database.dataSource.manager.countBy(Leave, { makerId: makerId as string })).toBe(1);
  });

  it('refuses days that end before they begin', async () => {
    const { id: makerId } = await addMaker('Hob');
    const { status, body } = await manager.post('/api/leave', {
      makerId,
      days: { from: '2026-08-10', until: '2026-08-03' },
    });
    expect([status, body.errors[0].pointer]).toEqual([422, '/days/until']);
  });

  it('removes a craft that nobody uses, and no other', async () => {
    const { id } = (await manager.post('/api/crafts', { key: 'gilding', name: 'Gilding' })).body;
    expect((await manager.post('/api/crafts', { key: 'gilding', name: 'Gold' })).body.type).toBe(
      '/problems/already-exists',
    );
    expect((await manager.delete(`/api/crafts/${id}`)).status).toBe(204);
    await addMaker('Ivo');
    const used = await manager.delete(`/api/crafts/${craftId}`);
    expect([used.status, used.body.type]).toEqual([409, '/problems/still-in-use']);
  });
});
