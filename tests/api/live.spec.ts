import { eventually, withStudio } from './studio';

// Server-sent events: WHATWG HTML, section 9.2.
describe('live events', () => {
  const studio = withStudio();

  it('reach pages of every server process', async () => {
    const manager = await studio.as('manager');
    const other = await studio.another();
    const response = await fetch(`${other.url}/api/live`, { headers: { Cookie: manager.cookie } });
    expect(response.headers.get('content-type')).toMatch(/^text\/event-stream/);
    const reader = (response.body as ReadableStream<Uint8Array>).getReader();
    await manager.post('/api/clients', { name: 'Heard elsewhere' });
    let text = '';
    while (!text.includes('record-changed')) text += Buffer.from((await reader.read()).value ?? []).toString();
    expect(text).toMatch(/data: \{"kind":"record-changed","subject":"client","id":"[0-9a-f-]{36}"\}\n\n/);
    await reader.cancel();
  });

  it('tell makers and clients no more than they may know', async () => {
    const manager = await studio.as('manager');
    const [office, hand, client] = [manager, await studio.as('maker'), await studio.as('client')];
    const streams = [await office.listen(), await hand.listen(), await client.listen()];
    const fields = { name: 'Secret', mark: 'Se', hue: 1, state: 'committed' };
    const clientId = (await manager.post('/api/clients', { name: 'Somebody' })).body.id as string;
    const made = await manager.post('/api/productions', { ...fields, clientId });
    await (await studio.as('owner')).get('/api/session');
    await manager.get('/api/plan');
    await eventually(() => streams[0].events.some((event) => event['kind'] === 'plan-revised'));
    await eventually(() => streams[2].events.length > 0);
    expect(streams[0].events).toContainEqual({ kind: 'record-changed', subject: 'production', id: made.body.id });
    expect(streams[0].events.some((event) => event['subject'] === 'account')).toBe(true);
    expect(streams[1].events).toContainEqual({ kind: 'record-changed', subject: 'production', id: made.body.id });
    expect(streams[1].events.some((event) => event['kind'] === 'plan-revised' || event['subject'] === 'account')).toBe(
      false,
    );
    expect(new Set(streams[2].events.map((event) => JSON.stringify(event)))).toEqual(
      new Set(['{"kind":"record-changed","subject":"client-page","id":null}']),
    );
    streams.forEach((stream) => stream.stop());
  });

  it('say nothing of what did not come to stand', async () => {
    const manager = await studio.as('manager');
    await manager.post('/api/clients', { name: 'Once' });
    const stream = await manager.listen();
    expect((await manager.post('/api/clients', { name: 'Once' })).status).toBe(409);
    await manager.post('/api/clients', { name: 'Afterwards' });
    await eventually(() => stream.events.length > 0);
    expect(stream.events).toHaveLength(1);
    stream.stop();
  });

  it('end when the server stops, so that pages go elsewhere', async () => {
    const manager = await studio.as('manager');
    const stream = await manager.listen();
    studio.running.endLivePages();
    await stream.ended;
  });
});
