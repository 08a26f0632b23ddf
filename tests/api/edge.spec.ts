import { randomUUID } from 'node:crypto';
import { withStudio, type Answer, type Visitor } from './studio';

// RFC 9457 (problem details) for the shape of errors, RFC 6901 for their pointers; the limits are our own.
describe('the edge of the API', () => {
  const studio = withStudio();
  let manager: Visitor;
  beforeAll(async () => {
    manager = await studio.as('manager');
  });

  function expectProblem({ status, body, headers }: Answer, expected: number, kind: string): void {
    expect(headers.get('content-type')).toMatch(/^application\/problem\+json/);
    expect(status).toBe(expected);
    expect(body).toMatchObject({ type: `/problems/${kind}`, status: expected });
    expect(body.title).not.toBe('');
    expect(body.detail).toMatch(/[.!?]$/);
    expect(body.requestId).toBe(headers.get('x-request-id'));
  }

  it('tells that a body is not JSON', async () => {
    expectProblem(
      await manager.sendText('POST', '/api/clients', '{"name": "Pell', 'application/json'),
      400,
      'malformed-request',
    );
  });

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'application/xml'])('refuses %s', async (contentType) => {
    expectProblem(await manager.sendText('POST', '/api/clients', 'name=Pell', contentType), 415, 'unsupported-media');
  });

  it('refuses two megabytes', async () => {
    const body = JSON.stringify({ name: 'x'.repeat(2_000_000) });
    expectProblem(await manager.sendText('POST', '/api/clients', body, 'application/json'), 413, 'too-large');
  });

  it('tells every field that is not right, by its pointer', async () => {
    const maker = {
      name: ' ',
      initials: '12',
      crafts: [{ craftId: 'x', pacePermille: 5 }],
      patterns: 'none',
      hourCostMinor: 1.5,
    };
    const answer = await manager.post('/api/makers', maker);
    expectProblem(answer, 422, 'invalid-input');
    expect(answer.body.errors).toEqual([
      { pointer: '/name', detail: 'Give it a name.' },
      { pointer: '/initials', detail: 'Initials are one to three letters.' },
      { pointer: '/crafts/0/craftId', detail: 'This is not an id.' },
      { pointer: '/crafts/0/pacePermille', detail: 'A pace is at least 0.1.' },
      { pointer: '/patterns', detail: 'This should be a list.' },
      { pointer: '/hourCostMinor', detail: 'This should be a whole number.' },
    ]);
  });

  it('tells that a body is missing', async () => {
    const answer = await manager.post('/api/clients');
    expectProblem(answer, 422, 'invalid-input');
    expect(answer.body.errors).toEqual([{ pointer: '', detail: 'This is missing.' }]);
  });

  it('takes null for a wrong value, not for an absent one', async () => {
    const answer = await manager.post('/api/clients', { name: null });
    expect(answer.body.errors).toEqual([{ pointer: '/name', detail: 'This should be a text.' }]);
  });

  it('tells what of a query is not right', async () => {
    const answer = await manager.get('/api/audit?limit=1000&before=yesterday');
    expectProblem(answer, 422, 'invalid-input');
    expect(answer.body.errors.map((fault: { pointer: string }) => fault.pointer)).toEqual(['?before', '?limit']);
  });

  it('does not know records that are not there, nor ids that can not be', async () => {
    expectProblem(await manager.get(`/api/makers/${randomUUID()}`), 404, 'not-found');
    expectProblem(await manager.get('/api/makers/7'), 404, 'not-found');
    expectProblem(await manager.get("/api/makers/'; drop table maker; --"), 404, 'not-found');
    expectProblem(await manager.get('/api/makers/%E0%A4%A'), 400, 'malformed-request');
  });

  it('does not know other addresses below /api', async () => {
    expectProblem(await manager.get('/api/nothing'), 404, 'not-found');
    expectProblem(await manager.post('/api/nothing', {}), 404, 'not-found');
  });

  it('says which methods an address answers (RFC 9110, section 15.5.6)', async () => {
    const answer = await manager.send('PUT', '/api/makers', {});
    expectProblem(answer, 405, 'wrong-method');
    expect(answer.headers.get('allow')).toBe('GET, POST');
  });

  it('answers with headers that keep pages from being framed, sniffed or cached', async () => {
    const { headers } = await manager.get('/api/makers');
    expect(headers.get('cache-control')).toBe('no-store');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('content-security-policy')).toMatch(
      /default-src 'self';.*script-src 'self';.*frame-ancestors 'none'/,
    );
    expect(headers.get('content-security-policy')).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/);
    expect(headers.get('x-powered-by')).toBeNull();
  });

  it('answers to whoever watches', async () => {
    expect((await studio.visitor().get('/api/health')).body).toEqual({ status: 'alive' });
    expect((await studio.visitor().get('/api/ready')).body).toEqual({ status: 'ready' });
  });

  it('stores text as it is, whatever it looks like', async () => {
    const name = `Robert'); drop table client; -- <b>${randomUUID()}</b> 🎭`;
    const { status, body } = await manager.post('/api/clients', { name });
    expect(status).toBe(201);
    expect(body.name).toBe(name);
    expect((await manager.get('/api/clients')).body.map((client: { name: string }) => client.name)).toContain(name);
  });
});

describe('a fault of ours', () => {
  const studio = withStudio();

  it('is a bland 500 with the request’s id, and tells nothing of the inside', async () => {
    const manager = await studio.as('manager');
    await studio.database.dataSource.query('alter table craft rename to craft_gone');
    const answer = await manager.get('/api/crafts');
    await studio.database.dataSource.query('alter table craft_gone rename to craft');
    expect(answer.status).toBe(500);
    expect(answer.body.type).toBe('/problems/unexpected');
    expect(answer.body.requestId).toBe(answer.headers.get('x-request-id'));
    expect(JSON.stringify(answer.body)).not.toMatch(/craft|relation|select|typeorm|\.ts/i);
  });

  it('is not ready once it stops', async () => {
    studio.running.becomeUnready();
    const answer = await studio.visitor().get('/api/ready');
    expect(answer.status).toBe(503);
    expect(answer.body.type).toBe('/problems/not-ready');
  });
});
