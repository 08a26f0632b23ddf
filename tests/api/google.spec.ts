import { ProblemDetails, SessionView } from '@common/contract';
import { Account } from '@database/entities';
import { startGoogleStandIn, type StandIn, type StandInPerson } from '../../server/session/google-stand-in';
import { bodyOf } from './body-of';
import { emailOf, withStudio, type Answer, type Visitor } from './studio';

const REGISTRATION = { clientId: 'fettle-tests', clientSecret: 'a secret for tests' };
const STAND_IN_PORT = 43_977;

/** Whom the stand-in vouches for next; null for somebody who says no. */
let person: StandInPerson | null = null;

/** Goes where an answer sends the browser, on whichever of the two servers. */
async function follow(visitor: Visitor, { headers }: Answer, ownUrl: string): Promise<Answer> {
  const address = headers.get('location') ?? '';
  if (!address.startsWith('http')) return visitor.get(address);
  if (address.startsWith(ownUrl)) return visitor.get(address.slice(ownUrl.length));
  const response = await fetch(address, { redirect: 'manual' });
  return { status: response.status, body: await response.text(), headers: response.headers };
}

describe('signing in through Google', () => {
  let standIn: StandIn | undefined;
  beforeAll(async () => {
    standIn = await startGoogleStandIn({ ...REGISTRATION, port: STAND_IN_PORT, decide: () => person });
  });
  afterAll(async () => {
    await standIn?.close();
  });
  const studio = withStudio({
    config: { google: { ...REGISTRATION, standInUrl: `http://127.0.0.1:${STAND_IN_PORT}` } },
  });
  const accounts = () => studio.database.dataSource.manager;

  /** Out to Google and back; answers with where the browser ends up. */
  async function goThrough(visitor: Visitor, path = '/api/session/google'): Promise<string> {
    const out = await visitor.get(path);
    expect(out.status).toBe(302);
    const back = await follow(visitor, out, studio.url);
    expect(back.status).toBe(302);
    const end = await follow(visitor, back, studio.url);
    expect(end.status).toBe(303);
    return end.headers.get('location') ?? '';
  }

  const who = async (visitor: Visitor): Promise<string | null> =>
    bodyOf(SessionView, await visitor.get('/api/session')).account?.email ?? null;

  const known = (role: Account['role'], subject: string): StandInPerson => ({
    subject,
    name: `The ${role}`,
    email: emailOf(role),
    isEmailVerified: true,
  });

  it('is offered where it is set up', async () => {
    expect(bodyOf(SessionView, await studio.visitor().get('/api/session')).googleSignIn).toBe(true);
  });

  it('lets in whom the owner made an account, ties the two, and begins a new session', async () => {
    person = { ...known('manager', 'g-1'), email: 'MANAGER@Studio.test' };
    const visitor = await studio.nobody();
    const before = visitor.cookie;
    expect(await goThrough(visitor, '/api/session/google?return=%2Fplan%3Fday%3D3')).toBe('/plan?day=3');
    expect(await who(visitor)).toBe(emailOf('manager'));
    expect(visitor.cookie).not.toBe(before);
    const account = await accounts().findOneByOrFail(Account, { email: emailOf('manager') });
    expect(account.googleSubject).toBe('g-1');
    expect((await studio.trail(account.id)).map((entry) => entry.action)).toEqual(
      expect.arrayContaining(['tied', 'signed-in']),
    );
    const old = studio.visitor();
    old.cookie = before;
    expect(await who(old)).toBeNull();
  });

  it('goes by the Google account from then on, whatever its address', async () => {
    person = { ...known('manager', 'g-1'), email: 'new@elsewhere.test', isEmailVerified: false };
    const visitor = await studio.nobody();
    expect(await goThrough(visitor)).toBe('/');
    expect(await who(visitor)).toBe(emailOf('manager'));
  });

  it.each<[string, StandInPerson | null, string]>([
    ['who is not let go by Google', null, 'google-denied'],
    ['whose address is not verified', { ...known('owner', 'g-2'), isEmailVerified: false }, 'google-unverified'],
    ['who has no account here', { ...known('owner', 'g-3'), email: 'stranger@studio.test' }, 'google-unknown'],
    ['whose account is tied to another Google account', known('manager', 'g-4'), 'google-other-account'],
  ])('does not let in somebody %s', async (_, somebody, problem) => {
    person = somebody;
    const visitor = await studio.nobody();
    const count = await accounts().count(Account);
    const end = new URL(await goThrough(visitor, '/api/session/google?return=/plan'), studio.url);
    expect([end.pathname, end.searchParams.get('problem'), end.searchParams.get('return')]).toEqual([
      '/sign-in',
      problem,
      '/plan',
    ]);
    expect(await who(visitor)).toBeNull();
    expect(await accounts().count(Account)).toBe(count);
  });

  it('does not let in somebody whose account is closed', async () => {
    person = known('maker', 'g-5');
    await accounts().update(Account, { email: emailOf('maker') }, { active: false });
    const visitor = await studio.nobody();
    expect(await goThrough(visitor)).toContain('problem=google-unknown');
    expect(await who(visitor)).toBeNull();
    await accounts().update(Account, { email: emailOf('maker') }, { active: true });
  });

  it('refuses an answer that this session did not ask for, and an answer twice', async () => {
    person = known('manager', 'g-1');
    const asked = await studio.nobody();
    const back = await follow(asked, await asked.get('/api/session/google'), studio.url);
    const location = back.headers.get('location') ?? '';

    const victim = await studio.nobody();
    const forced = await follow(victim, back, studio.url);
    expect(forced.headers.get('location')).toContain('problem=google-failed');
    expect(await who(victim)).toBeNull();

    const forged = new URL(location);
    forged.searchParams.set('state', 'x'.repeat(24));
    const wrong = await studio.nobody();
    await wrong.get('/api/session/google');
    const answer = await wrong.get(`${forged.pathname}${forged.search}`);
    expect(answer.headers.get('location')).toContain('problem=google-failed');
    expect(await who(wrong)).toBeNull();

    expect((await follow(asked, back, studio.url)).headers.get('location')).toBe('/');
    expect(await who(asked)).toBe(emailOf('manager'));
    expect((await follow(asked, back, studio.url)).headers.get('location')).toContain('problem=google-failed');
  });

  it('refuses a code that Google did not give', async () => {
    const visitor = await studio.nobody();
    const out = await visitor.get('/api/session/google');
    const state = new URL(out.headers.get('location') ?? '').searchParams.get('state') ?? '';
    const answer = await visitor.get(`/api/session/google/callback?code=made-up&state=${encodeURIComponent(state)}`);
    expect(answer.headers.get('location')).toContain('problem=google-failed');
    expect(await who(visitor)).toBeNull();
  });

  it.each(['//elsewhere.test', 'https://elsewhere.test', '/\\elsewhere.test', 'plan', '/a b'])(
    'does not go on to %s',
    async (address) => {
      person = known('manager', 'g-1');
      const visitor = await studio.nobody();
      expect(await goThrough(visitor, `/api/session/google?return=${encodeURIComponent(address)}`)).toBe('/');
    },
  );

  it('sends a state, PKCE and nothing secret to Google', async () => {
    const out = await (await studio.nobody()).get('/api/session/google');
    const query = new URL(out.headers.get('location') ?? '').searchParams;
    expect(query.get('code_challenge_method')).toBe('S256');
    expect(query.get('code_challenge')).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect((query.get('state') ?? '').length).toBeGreaterThan(16);
    expect(query.get('scope')).toBe('openid email profile');
    expect(out.headers.get('location')).not.toContain('secret');
  });
});

describe('a studio without Google', () => {
  const studio = withStudio();

  it('does not offer it, and says so to who asks', async () => {
    const visitor = studio.visitor();
    expect(bodyOf(SessionView, await visitor.get('/api/session')).googleSignIn).toBe(false);
    for (const path of ['/api/session/google', '/api/session/google/callback?code=x&state=y']) {
      const answer = await visitor.get(path);
      expect([answer.status, bodyOf(ProblemDetails, answer).type]).toEqual([503, '/problems/not-configured']);
    }
  });
});
