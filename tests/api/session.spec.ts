import { randomUUID } from 'node:crypto';
import { Account, AuditEntry } from '@database/entities';
import { emailOf, PASSWORD, withStudio } from './studio';

describe('signing in', () => {
  const studio = withStudio();

  it('begins a session under a new id, with a new token, and writes it down', async () => {
    const visitor = await studio.nobody();
    const planted = visitor.cookie;
    const token = visitor.token;
    const { status, body } = await visitor.post('/api/session', { email: emailOf('manager'), password: PASSWORD });
    expect(status).toBe(200);
    expect(body.account).toMatchObject({ email: emailOf('manager'), role: 'manager', makerId: null, clientId: null });
    expect(visitor.cookie).not.toBe(planted);
    expect(visitor.token).not.toBe(token);
    // Session fixation (OWASP ASVS 3.2.1): the id from before is worth nothing.
    const thief = studio.visitor();
    thief.cookie = planted;
    expect((await thief.get('/api/session')).body.account).toBeNull();
    const [entry] = await studio.trail(body.account.id as string);
    expect(entry).toMatchObject({ action: 'signed-in', sentence: 'The manager signed in.' });
    const account = await studio.database.dataSource.manager.findOneByOrFail(Account, { email: emailOf('manager') });
    expect(account.lastSignInAt).not.toBeNull();
  });

  it('takes the address in whatever case', async () => {
    expect((await studio.visitor().signIn('MANAGER@Studio.Test')).status).toBe(200);
  });

  it('hides the cookie from scripts and other sites', async () => {
    const { headers } = await studio.visitor().get('/api/session');
    expect(headers.get('set-cookie')).toMatch(/^fettle=.*; Path=\/;.*HttpOnly; SameSite=Lax$/);
  });

  it('tells a wrong password and an unknown address alike', async () => {
    const wrong = await studio.visitor().signIn(emailOf('manager'), 'not this one');
    const unknown = await studio.visitor().signIn('nobody@studio.test', 'not this one');
    const { requestId: _a, ...first } = wrong.body;
    const { requestId: _b, ...second } = unknown.body;
    expect(first).toEqual(second);
    expect(wrong.status).toBe(401);
    expect(wrong.body.type).toBe('/problems/wrong-credentials');
  });

  it('ends with signing out, for that session alone', async () => {
    const here = await studio.as('maker');
    const there = await studio.as('maker');
    const before = here.cookie;
    expect((await here.delete('/api/session')).status).toBe(204);
    const kept = studio.visitor();
    kept.cookie = before;
    expect((await kept.get('/api/crafts')).status).toBe(401);
    expect((await there.get('/api/crafts')).status).toBe(200);
  });

  it('outlives the process: sessions are kept in the database', async () => {
    const manager = await studio.as('manager');
    const other = await studio.another();
    const answer = await fetch(`${other.url}/api/makers`, { headers: { Cookie: manager.cookie } });
    expect(answer.status).toBe(200);
  });

  it('does not take a cookie that was tampered with', async () => {
    const manager = await studio.as('manager');
    manager.cookie = manager.cookie.slice(0, -4) + 'AAAA';
    expect((await manager.get('/api/makers')).status).toBe(401);
  });
});

describe('failed sign-ins', () => {
  const studio = withStudio({ config: { limits: { requestsPerMinute: 100_000, failedSignIns: 3 } } });

  it('are limited by address and account, and say for how long', async () => {
    for (let i = 0; i < 3; i += 1) {
      expect((await studio.visitor().signIn(emailOf('owner'), 'guess')).status).toBe(401);
    }
    const fourth = await studio.visitor().signIn(emailOf('owner'), PASSWORD);
    expect([fourth.status, fourth.body.type]).toEqual([429, '/problems/too-many-attempts']);
    // Another account from the same address is not shut out with it.
    expect((await studio.visitor().signIn(emailOf('manager'))).status).toBe(200);
  });
});

describe('many requests', () => {
  const studio = withStudio({ config: { limits: { requestsPerMinute: 5, failedSignIns: 100 } } });

  it('are limited by address', async () => {
    const statuses: number[] = [];
    for (let i = 0; i < 7; i += 1) statuses.push((await studio.visitor().get('/api/session')).status);
    expect(statuses).toEqual([200, 200, 200, 200, 200, 429, 429]);
  });
});

describe('accounts', () => {
  const studio = withStudio();
  const fresh = () => `${randomUUID()}@studio.test`;

  it('are made by the owner, and can sign in; the hash goes nowhere', async () => {
    const owner = await studio.as('owner');
    const email = fresh();
    const fields = {
      name: 'Nell',
      email,
      role: 'maker',
      makerId: studio.makerId,
      clientId: null,
      password: 'a long enough one',
    };
    const { status, body } = await owner.post('/api/accounts', fields);
    expect(status).toBe(201);
    expect(Object.keys(body as object).join()).not.toMatch(/password|hash/i);
    const [entry] = await studio.trail(body.id as string);
    expect(entry).toMatchObject({
      action: 'created',
      sentence: 'Let Nell sign in as maker.',
      accountName: 'The owner',
    });
    expect(JSON.stringify(entry)).not.toContain('argon2');
    expect((await studio.visitor().signIn(email, 'a long enough one')).status).toBe(200);
    const again = await owner.post('/api/accounts', { ...fields, email: email.toUpperCase() });
    expect([again.status, again.body.errors[0].pointer]).toEqual([409, '/email']);
  });

  it('say what is missing at its field', async () => {
    const owner = await studio.as('owner');
    const fields = {
      name: 'Nell',
      email: fresh(),
      role: 'client',
      makerId: randomUUID(),
      clientId: null,
      password: null,
    };
    const { status, body } = await owner.post('/api/accounts', fields);
    expect(status).toBe(422);
    expect(body.errors).toEqual([
      { pointer: '/makerId', detail: 'There is no such maker.' },
      { pointer: '/clientId', detail: 'Choose which client this person is.' },
    ]);
  });

  it('lose their other sessions with a new password', async () => {
    const owner = await studio.as('owner');
    const email = fresh();
    const made = await owner.post('/api/accounts', {
      name: 'Ned',
      email,
      role: 'manager',
      makerId: null,
      clientId: null,
      password: PASSWORD,
    });
    const ned = studio.visitor();
    await ned.signIn(email);
    const elsewhere = studio.visitor();
    await elsewhere.signIn(email);
    const change = { password: 'another long password', version: 1 };
    expect((await owner.patch(`/api/accounts/${made.body.id}`, change)).status).toBe(200);
    expect((await ned.get('/api/makers')).status).toBe(401);
    expect((await elsewhere.get('/api/makers')).status).toBe(401);
    expect((await studio.visitor().signIn(email)).status).toBe(401);
    expect((await studio.visitor().signIn(email, 'another long password')).status).toBe(200);
  });

  it('that change their own password keep the session in which they do', async () => {
    const owner = await studio.as('owner');
    const elsewhere = await studio.as('owner');
    const { id, version } = (await owner.get('/api/accounts')).body.find((it: { role: string }) => it.role === 'owner');
    expect((await owner.patch(`/api/accounts/${id}`, { password: PASSWORD, version })).status).toBe(200);
    expect((await owner.get('/api/accounts')).status).toBe(200);
    expect((await elsewhere.get('/api/accounts')).status).toBe(401);
  });

  it('that are closed are out at once', async () => {
    const owner = await studio.as('owner');
    const email = fresh();
    const made = await owner.post('/api/accounts', {
      name: 'Nan',
      email,
      role: 'manager',
      makerId: null,
      clientId: null,
      password: PASSWORD,
    });
    const nan = studio.visitor();
    await nan.signIn(email);
    await owner.patch(`/api/accounts/${made.body.id}`, { active: false, version: 1 });
    expect((await nan.get('/api/makers')).status).toBe(401);
    expect((await studio.visitor().signIn(email)).status).toBe(401);
  });

  it('take a new role with the next request', async () => {
    const owner = await studio.as('owner');
    const email = fresh();
    const made = await owner.post('/api/accounts', {
      name: 'Noor',
      email,
      role: 'manager',
      makerId: null,
      clientId: null,
      password: PASSWORD,
    });
    const noor = studio.visitor();
    await noor.signIn(email);
    await owner.patch(`/api/accounts/${made.body.id}`, { role: 'maker', makerId: studio.makerId, version: 1 });
    expect((await noor.get('/api/audit')).status).toBe(403);
  });

  it('always include an owner who can sign in', async () => {
    const owner = await studio.as('owner');
    const { id, version } = (await owner.get('/api/accounts')).body.find((it: { role: string }) => it.role === 'owner');
    const demoted = await owner.patch(`/api/accounts/${id}`, { role: 'manager', version });
    expect([demoted.status, demoted.body.errors[0].pointer]).toEqual([422, '/role']);
    const closed = await owner.patch(`/api/accounts/${id}`, { active: false, version });
    expect([closed.status, closed.body.errors[0].pointer]).toEqual([422, '/active']);
  });

  it('always include an owner even when two owners close each other at once', async () => {
    const owner = await studio.as('owner');
    const email = fresh();
    const second = await owner.post('/api/accounts', {
      name: 'Second',
      email,
      role: 'owner',
      makerId: null,
      clientId: null,
      password: PASSWORD,
    });
    const other = studio.visitor();
    await other.signIn(email);
    const first = (await owner.get('/api/accounts')).body.find(
      (it: { email: string }) => it.email === emailOf('owner'),
    );
    await Promise.all([
      owner.patch(`/api/accounts/${second.body.id}`, { active: false, version: 1 }),
      other.patch(`/api/accounts/${first.id}`, { active: false, version: first.version }),
    ]);
    const left = await studio.database.dataSource.manager.countBy(Account, { role: 'owner', active: true });
    expect(left).toBe(1);
  });

  it('leave nothing in the audit trail that could be used to sign in', async () => {
    const entries = await studio.database.dataSource.manager.find(AuditEntry);
    expect(entries.length).toBeGreaterThan(0);
    expect(JSON.stringify(entries)).not.toMatch(/argon2|long enough|another long|plain test/);
  });
});
