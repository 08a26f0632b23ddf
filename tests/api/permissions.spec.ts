import { randomUUID } from 'node:crypto';
import { endpoints, ROLES, type Endpoint, type Role } from '@common/contract';
import { withStudio, type Answer, type Visitor } from './studio';

const all = Object.entries(endpoints as Readonly<Record<string, Endpoint>>);
const isUnsafe = (endpoint: Endpoint) => endpoint.method !== 'GET';

/** Calls a route with an id of nothing and an empty body: enough to meet its guard, too little to change anything. */
function knock(visitor: Visitor, { method, path }: Endpoint): Promise<Answer> {
  return visitor.send(
    method,
    path.replaceAll(/:\w+/g, randomUUID()),
    method === 'GET' || method === 'DELETE' ? undefined : {},
  );
}

// Every route of the contract by every role: what is expected is derived from the route's own audience.
describe('who may call what', () => {
  const studio = withStudio();
  const people = new Map<Role, Visitor>();
  beforeAll(async () => {
    for (const role of ROLES) people.set(role, await studio.as(role));
  });

  it('looks at every route of the contract', () => {
    expect(all.length).toBeGreaterThan(70);
  });

  describe.each(all)('%s', (name, endpoint) => {
    it('is closed to those who have not signed in, unless it is for anyone', async () => {
      const { status, body } = await knock(await studio.nobody(), endpoint);
      if (endpoint.who === 'anyone') expect(status).not.toBe(401);
      else expect([status, body.type]).toEqual([401, '/problems/not-signed-in']);
    });

    it.each(ROLES)('lets in a %s, or not, as its audience says', async (role) => {
      // Signing out would end the session that the next routes need.
      const visitor = name === 'signOut' ? await studio.as(role) : (people.get(role) as Visitor);
      const { status, body } = await knock(visitor, endpoint);
      const isInvited = endpoint.who === 'anyone' || endpoint.who.includes(role);
      if (isInvited) {
        expect(status).not.toBe(401);
        expect(body.type).not.toBe('/problems/not-allowed');
        expect(body.type).not.toBe('/problems/stale-form');
        expect(status).toBeLessThan(500);
      } else {
        expect([status, body.type]).toEqual([403, '/problems/not-allowed']);
      }
    });

    if (isUnsafe(endpoint)) {
      const invited = endpoint.who === 'anyone' ? 'owner' : endpoint.who[0];

      it('refuses a request without the session’s token', async () => {
        const visitor = await studio.as(invited);
        visitor.token = '';
        expect((await knock(visitor, endpoint)).body.type).toBe('/problems/stale-form');
        visitor.token = 'x'.repeat(32);
        expect((await knock(visitor, endpoint)).body.type).toBe('/problems/stale-form');
      });

      it('refuses a request from another site’s page, token or not', async () => {
        const visitor = await studio.as(invited);
        visitor.extraHeaders = { Origin: 'https://elsewhere.test' };
        expect((await knock(visitor, endpoint)).body.type).toBe('/problems/stale-form');
        visitor.extraHeaders = { Origin: 'null' };
        expect((await knock(visitor, endpoint)).body.type).toBe('/problems/stale-form');
      });
    }
  });

  it('takes a request from the page that it served', async () => {
    const manager = await studio.as('manager');
    manager.extraHeaders = { Origin: studio.url };
    expect((await manager.post('/api/clients', { name: 'From our page' })).status).toBe(201);
  });

  it('keeps live events from those who have not signed in', async () => {
    expect((await (await studio.nobody()).get('/api/live')).status).toBe(401);
  });
});
