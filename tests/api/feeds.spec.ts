import ICAL from 'ical.js';
import { FeedView, LevelRun, NewFeed, ProblemDetails, Revised, WorkingPlanView } from '@common/contract';
import { DEMO_PASSWORD } from '@database/demo/seed-accounts';
import { seedDemo } from '@database/demo/seed';
import { Account, FeedToken, IssuedEntry, Maker, Production } from '@database/entities';
import {
  calendarFaults,
  readComponents,
  valueOf,
  type CalendarComponent,
} from '../../server/feeds/testing/check-calendar';
import { withDatabase } from '../support/test-database';
import { bodyOf } from './body-of';
import { eventually, withStudio, type Visitor } from './studio';

/** A Tuesday morning; tests set it on. */
let now = new Date('2026-12-01T07:30:00Z');

interface Feed {
  readonly id: string;
  readonly url: string;
}

interface Calendar {
  readonly status: number;
  readonly text: string;
  readonly bytes: Buffer;
  readonly headers: Headers;
}

async function read(url: string, headers: Record<string, string> = {}, method = 'GET'): Promise<Calendar> {
  const response = await fetch(url, { headers, method, redirect: 'manual' });
  const bytes = Buffer.from(await response.arrayBuffer());
  return { status: response.status, bytes, text: bytes.toString(), headers: response.headers };
}

async function createFeed(visitor: Visitor, scope: object): Promise<Feed> {
  const answer = await visitor.post('/api/feeds', { scope });
  if (answer.status !== 201) throw new Error(`Making an address answers ${String(answer.status)}.`);
  const { id, httpsUrl } = bodyOf(NewFeed, answer);
  return { id, url: httpsUrl };
}

function eventsOf(text: string): readonly CalendarComponent[] {
  return readComponents(text).inside.filter((component) => component.name === 'VEVENT');
}

/** Levels and issues, as a manager does. */
async function issue(manager: Visitor, note: string): Promise<void> {
  const { revision } = bodyOf(WorkingPlanView, await manager.get('/api/plan'));
  const { id } = bodyOf(LevelRun, await manager.post('/api/plan/level', { revision, seconds: 0.5, seed: 1 }));
  await eventually(async () => bodyOf(LevelRun, await manager.get(`/api/plan/level/${id}`)).state === 'found');
  const taken = bodyOf(Revised, await manager.post(`/api/plan/level/${id}/take`, { revision }));
  const issued = await manager.post('/api/plan/issue', { revision: taken.revision, note });
  if (issued.status !== 201) throw new Error(`Issuing answers ${JSON.stringify(issued.body)}`);
}

describe('calendars of the demo studio', () => {
  const database = withDatabase();
  beforeAll(async () => {
    await seedDemo(database.dataSource, now);
  }, 60_000);
  const studio = withStudio({ database, clock: () => now });

  const account = async (role: Account['role']): Promise<Account> =>
    database.dataSource.manager
      .createQueryBuilder(Account, 'account')
      .where(`account.role = :role and account.email not like '%@studio.test'`, { role })
      .orderBy('account.email')
      .getOneOrFail();
  const signIn = async ({ email }: Account): Promise<Visitor> => {
    const visitor = studio.visitor();
    const { status } = await visitor.signIn(email, DEMO_PASSWORD);
    if (status !== 200) throw new Error(`${email} can not sign in.`);
    return visitor;
  };

  let manager: Visitor;
  let maker: Visitor;
  let client: Visitor;
  let makerAccount: Account;
  let clientAccount: Account;
  let ownProduction: Production;
  let otherProduction: Production;

  beforeAll(async () => {
    manager = await studio.as('manager');
    makerAccount = await account('maker');
    clientAccount = await account('client');
    maker = await signIn(makerAccount);
    client = await signIn(clientAccount);
    const productions = await database.dataSource.manager.find(Production);
    const own = productions.find((one) => one.clientId === clientAccount.clientId && one.state === 'committed');
    const other = productions.find((one) => one.clientId !== clientAccount.clientId && one.state === 'committed');
    if (!own || !other) throw new Error('The demo has no two productions of different clients.');
    [ownProduction, otherProduction] = [own, other];
    await issue(manager, 'the first');
  }, 60_000);

  describe('who may have one', () => {
    it('gives a maker one of their own work, and none of another’s, a production’s or the studio’s', async () => {
      const makers = await database.dataSource.manager.find(Maker);
      const another = makers.find((one) => one.id !== makerAccount.makerId);
      const own = await maker.post('/api/feeds', { scope: { kind: 'maker', makerId: makerAccount.makerId } });
      expect(own.status).toBe(201);
      const { httpsUrl, webcalUrl } = bodyOf(NewFeed, own);
      expect(httpsUrl).toMatch(/\/api\/calendar\/[A-Za-z0-9_-]{43}\.ics$/);
      expect(webcalUrl).toBe(httpsUrl.replace(/^http:/, 'webcal:'));
      for (const scope of [
        { kind: 'maker', makerId: another?.id },
        { kind: 'production', productionId: ownProduction.id },
        { kind: 'studio' },
      ]) {
        expect((await maker.post('/api/feeds', { scope })).status).toBe(403);
      }
    });

    it('gives a client one of their own production, and does not tell whether there is another', async () => {
      const own = await client.post('/api/feeds', { scope: { kind: 'production', productionId: ownProduction.id } });
      expect(own.status).toBe(201);
      const other = await client.post('/api/feeds', {
        scope: { kind: 'production', productionId: otherProduction.id },
      });
      const none = await client.post('/api/feeds', { scope: { kind: 'production', productionId: studio.makerId } });
      expect(bodyOf(ProblemDetails, other).detail).toBe(bodyOf(ProblemDetails, none).detail);
      expect(none.status).toBe(404);
      expect(other.status).toBe(404);
      expect((await client.post('/api/feeds', { scope: { kind: 'studio' } })).status).toBe(403);
      const { makerId } = makerAccount;
      expect((await client.post('/api/feeds', { scope: { kind: 'maker', makerId } })).status).toBe(403);
    });

    it('gives the office any, and nobody who is not signed in', async () => {
      for (const scope of [
        { kind: 'maker', makerId: makerAccount.makerId },
        { kind: 'production', productionId: otherProduction.id },
        { kind: 'studio' },
      ]) {
        expect((await manager.post('/api/feeds', { scope })).status).toBe(201);
      }
      expect((await (await studio.nobody()).post('/api/feeds', { scope: { kind: 'studio' } })).status).toBe(401);
    });

    it('lists one’s own alone, without secrets, and closes one’s own alone', async () => {
      const { id, url } = await createFeed(maker, { kind: 'maker', makerId: makerAccount.makerId });
      const own = bodyOf(FeedView.array(), await maker.get('/api/feeds'));
      const secret = /([A-Za-z0-9_-]{43})\.ics$/.exec(url)?.[1] ?? 'none';
      expect(own.map((feed) => feed.id)).toContain(id);
      expect(JSON.stringify((await maker.get('/api/feeds')).body)).not.toContain(secret);
      const others = bodyOf(FeedView.array(), await client.get('/api/feeds'));
      expect(others.map((feed) => feed.id)).not.toContain(id);
      expect((await client.delete(`/api/feeds/${id}`)).status).toBe(404);
      expect((await manager.delete(`/api/feeds/${id}`)).status).toBe(404);
      expect((await read(url)).status).toBe(200);
      const stored = await database.dataSource.manager.findOneByOrFail(FeedToken, { id });
      expect(stored.tokenHash).toHaveLength(32);
      expect(JSON.stringify({ ...stored, tokenHash: stored.tokenHash.toString('latin1') })).not.toContain(secret);
      expect(JSON.stringify(await studio.trail(id))).not.toContain(secret);
    });
  });

  describe('what it says', () => {
    it('keeps the rules of RFC 5545, and opens in an independent parser with every entry', async () => {
      const entries = await database.dataSource.manager.find(IssuedEntry, { where: { planNumber: 1 } });
      expect(entries.length).toBeGreaterThan(50);
      for (const scope of [
        { kind: 'studio' },
        { kind: 'production', productionId: ownProduction.id },
        { kind: 'maker', makerId: makerAccount.makerId },
      ]) {
        const { bytes, text, headers } = await read((await createFeed(manager, scope)).url);
        expect(headers.get('content-type')).toBe('text/calendar; charset=utf-8');
        expect(calendarFaults(bytes)).toEqual([]);
        const calendar = new ICAL.Component(ICAL.parse(text) as unknown[]);
        const parsed = calendar.getAllSubcomponents('vevent').map((component) => new ICAL.Event(component));
        expect(parsed).toHaveLength(eventsOf(text).length);
        expect(parsed.length).toBeGreaterThan(5);
        if (scope.kind !== 'studio') continue;
        const spans = new Set(
          parsed.map((event) => `${event.startDate.toUnixTime() / 60} ${event.endDate.toUnixTime() / 60}`),
        );
        const ahead = entries
          .flatMap((entry) => entry.work)
          .filter((span) => span.end > span.start && span.start * 60_000 > now.getTime());
        expect(ahead.filter((span) => !spans.has(`${span.start} ${span.end}`))).toEqual([]);
      }
    });

    it('shows a client no maker, no other production, no money', async () => {
      const { url } = await createFeed(client, { kind: 'production', productionId: ownProduction.id });
      const { text } = await read(url);
      const unfolded = text.replaceAll('\r\n ', '');
      for (const { name } of await database.dataSource.manager.find(Maker)) expect(unfolded).not.toContain(name);
      for (const { id, name } of await database.dataSource.manager.find(Production)) {
        if (id !== ownProduction.id) expect(unfolded).not.toContain(name);
      }
      expect(unfolded).not.toMatch(/[£€$]|\brates?\b/i);
      expect(unfolded).toContain(ownProduction.name);
    });

    it('shows a maker the stretches of their own issued work and no others', async () => {
      const { text } = await read((await createFeed(maker, { kind: 'maker', makerId: makerAccount.makerId })).url);
      const entries = await database.dataSource.manager.find(IssuedEntry, { where: { planNumber: 1 } });
      const own = entries.filter((entry) => entry.crew.some((member) => member.makerId === makerAccount.makerId));
      const work = eventsOf(text).filter((event) => valueOf(event, 'CATEGORIES') === 'work');
      const stretches = own.flatMap((entry) => entry.work.filter((span) => span.end > span.start));
      expect(stretches.length).toBeGreaterThan(3);
      expect(work).toHaveLength(stretches.length);
    });
  });

  describe('asking again', () => {
    it.each([
      ['nothing', {}, 200],
      ['its tag', { 'If-None-Match': 'TAG' }, 304],
      ['its tag, told weak', { 'If-None-Match': 'W/TAG' }, 304],
      ['any tag', { 'If-None-Match': '*' }, 304],
      ['another tag', { 'If-None-Match': '"x"' }, 200],
      ['its date', { 'If-Modified-Since': 'DATE' }, 304],
      ['an earlier date', { 'If-Modified-Since': 'Sun, 06 Nov 1994 08:49:37 GMT' }, 200],
      ['what is no date', { 'If-Modified-Since': 'yesterday' }, 200],
      ['another tag and its date', { 'If-None-Match': '"x"', 'If-Modified-Since': 'DATE' }, 200],
      [
        'its tag and an earlier date',
        { 'If-None-Match': 'TAG', 'If-Modified-Since': 'Sun, 06 Nov 1994 08:49:37 GMT' },
        304,
      ],
    ])('with %s', async (_, asked: Record<string, string>, status) => {
      const { url } = await createFeed(manager, { kind: 'studio' });
      const first = await read(url);
      const [tag, date] = [first.headers.get('etag') ?? '', first.headers.get('last-modified') ?? ''];
      expect(tag).toMatch(/^"[A-Za-z0-9_-]{43}"$/);
      const headers = Object.fromEntries(
        Object.entries(asked).map(([name, value]) => [name, value.replace('TAG', tag).replace('DATE', date)]),
      );
      const again = await read(url, headers);
      expect(again.status).toBe(status);
      expect([again.headers.get('etag'), again.headers.get('last-modified')]).toEqual([tag, date]);
      expect(again.headers.get('cache-control')).toBe('private, no-cache');
      expect(again.headers.get('set-cookie')).toBeNull();
      expect(again.text).toBe(status === 304 ? '' : first.text);
    });

    it('answers HEAD like GET, without the calendar', async () => {
      const { url } = await createFeed(manager, { kind: 'studio' });
      const [got, head] = [await read(url), await read(url, {}, 'HEAD')];
      expect([head.status, head.text]).toEqual([200, '']);
      expect(head.headers.get('etag')).toBe(got.headers.get('etag'));
      expect(head.headers.get('content-length')).toBe(String(got.bytes.length));
    });
  });

  it('goes on where the plan changed, and nowhere else; its date never falls', async () => {
    const { url } = await createFeed(manager, { kind: 'studio' });
    const before = await read(url);
    now = new Date(now.getTime() + 60_000);
    await issue(manager, 'the same again');
    const revision = await postponeLast(manager);
    now = new Date(now.getTime() + 60_000);
    const issued = await manager.post('/api/plan/issue', { revision });
    expect(issued.status).toBe(201);
    const after = await read(url);
    expect(calendarFaults(after.bytes)).toEqual([]);
    expect(after.headers.get('etag')).not.toBe(before.headers.get('etag'));
    expect(Date.parse(after.headers.get('last-modified') ?? '')).toBeGreaterThan(
      Date.parse(before.headers.get('last-modified') ?? ''),
    );
    const told = (text: string): Map<string, CalendarComponent> =>
      new Map(eventsOf(text).map((event) => [valueOf(event, 'UID'), event]));
    const [was, is] = [told(before.text), told(after.text)];
    let risen = 0;
    for (const [uid, event] of was) {
      const next = is.get(uid);
      expect(next).toBeDefined();
      const same = ['DTSTART', 'DTEND', 'STATUS', 'SUMMARY', 'DESCRIPTION', 'LOCATION'].every(
        (name) => next && valueOf(next, name) === valueOf(event, name),
      );
      const rise = Number(next && valueOf(next, 'SEQUENCE')) - Number(valueOf(event, 'SEQUENCE'));
      expect([uid, rise > 0]).toEqual([uid, !same]);
      risen += same ? 0 : 1;
    }
    expect(risen).toBeGreaterThan(0);
  });

  describe('an address that is no more', () => {
    it('answers 410 once it is closed, also to who asks whether it changed', async () => {
      const { id, url } = await createFeed(maker, { kind: 'maker', makerId: makerAccount.makerId });
      const { headers } = await read(url);
      expect((await maker.delete(`/api/feeds/${id}`)).status).toBe(204);
      const closed = await read(url, { 'If-None-Match': headers.get('etag') ?? '' });
      expect([closed.status, closed.headers.get('content-type')]).toEqual([
        410,
        'application/problem+json; charset=utf-8',
      ]);
      expect((await maker.delete(`/api/feeds/${id}`)).status).toBe(204);
    });

    it('answers 404 where there never was one', async () => {
      for (const token of ['x', 'x'.repeat(43), '..%2f..%2fetc', `${'x'.repeat(42)}%00`]) {
        expect((await read(`${studio.url}/api/calendar/${token}.ics`)).status).toBe(404);
      }
    });

    it('stops with its account, and goes on with it', async () => {
      const { url } = await createFeed(client, { kind: 'production', productionId: ownProduction.id });
      await database.dataSource.manager.update(Account, { id: clientAccount.id }, { active: false });
      expect((await read(url)).status).toBe(404);
      await database.dataSource.manager.update(Account, { id: clientAccount.id }, { active: true });
      expect((await read(url)).status).toBe(200);
    });

    it('stops when the production is another client’s', async () => {
      const { url } = await createFeed(client, { kind: 'production', productionId: ownProduction.id });
      const { id, clientId } = ownProduction;
      await database.dataSource.manager.update(Production, { id }, { clientId: otherProduction.clientId });
      expect((await read(url)).status).toBe(404);
      await database.dataSource.manager.update(Production, { id }, { clientId });
      expect((await read(url)).status).toBe(200);
    });

    it('is slowed down when it is asked for too often', async () => {
      const { url } = await createFeed(manager, { kind: 'studio' });
      const statuses: number[] = [];
      for (let count = 0; count < 35; count += 1) statuses.push((await read(url)).status);
      expect(statuses.filter((status) => status === 200)).toHaveLength(30);
      expect(statuses.filter((status) => status === 429)).toHaveLength(5);
    });
  });
});

/** Puts the last stage of the plan off to the first later day on which that breaks no rule but a date; the new revision. */
async function postponeLast(manager: Visitor): Promise<number> {
  for (let days = 1; days <= 28; days += 1) {
    const { revision, plan } = bodyOf(WorkingPlanView, await manager.get('/api/plan'));
    const [last] = [...plan.placements].sort((a, b) => b.work[0].start - a.work[0].start);
    const start = last.work[0].start + days * 24 * 60;
    const move = { revision, stageId: last.stageId, start, makerIds: null, bayIds: null };
    const moved = bodyOf(Revised, await manager.post('/api/plan/moves', move)).revision;
    const { unmet } = bodyOf(WorkingPlanView, await manager.get('/api/plan'));
    if (unmet.every(({ rule }) => rule === 'key-date')) return moved;
    await manager.post('/api/plan/undo', { revision: moved });
  }
  throw new Error('The last stage can be put off to none of four weeks of days.');
}
