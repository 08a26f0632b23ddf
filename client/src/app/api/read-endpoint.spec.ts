import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { endpoints } from '@common/contract';
import { readEndpoint } from './read-endpoint';

const ID = '6f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';
const OTHER = '7f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';
const craft = { id: ID, key: 'carving', name: 'Carving', version: 1 };
const leave = (makerId: string) => ({
  id: ID,
  makerId,
  days: { from: '2026-12-01', until: '2026-12-02' },
  note: '',
  version: 1,
});
const problem = { type: '/problems/unexpected', title: 'Oh', status: 500, detail: 'Try later.', requestId: 'r' };

function setUp(): HttpTestingController {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
  return TestBed.inject(HttpTestingController);
}

/** Lets effects and promises run. */
async function settle(): Promise<void> {
  TestBed.tick();
  await new Promise((resolve) => setTimeout(resolve));
  TestBed.tick();
}

describe('readEndpoint', () => {
  it('goes from loading to ready', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    expect(read.state()).toBe('loading');
    http.expectOne('/api/crafts').flush([craft]);
    await settle();
    expect(read.state()).toBe('ready');
    expect(read.value()).toEqual([craft]);
  });

  it('tells an empty list from a missing one', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    http.expectOne('/api/crafts').flush([]);
    await settle();
    expect(read.state()).toBe('empty');
  });

  it('fails with a sentence, and recovers at the next try', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    http.expectOne('/api/crafts').flush(problem, { status: 500, statusText: 'Oh' });
    await settle();
    expect(read.state()).toBe('failed');
    expect(read.failure()?.detail).toBe('Try later.');
    read.reload();
    await settle();
    http.expectOne('/api/crafts').flush([craft]);
    await settle();
    expect(read.state()).toBe('ready');
    expect(read.failure()).toBeNull();
  });

  it('keeps what was read before in view, as stale, while and after a newer read fails', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    http.expectOne('/api/crafts').flush([craft]);
    await settle();
    read.reload();
    await settle();
    expect(read.state()).toBe('stale');
    http.expectOne('/api/crafts').flush(problem, { status: 500, statusText: 'Oh' });
    await settle();
    expect(read.state()).toBe('stale');
    expect(read.value()).toEqual([craft]);
    expect(read.failure()?.detail).toBe('Try later.');
  });

  it('shows only the answer to the latest request, and nothing of another request meanwhile', async () => {
    const http = setUp();
    const makerId = signal(ID);
    const read = TestBed.runInInjectionContext(() =>
      readEndpoint(endpoints.listLeave, () => ({ query: { makerId: makerId() } })),
    );
    await settle();
    const first = http.expectOne(`/api/leave?makerId=${ID}`);
    makerId.set(OTHER);
    await settle();
    expect(first.cancelled).toBe(true);
    http.expectOne(`/api/leave?makerId=${OTHER}`).flush([leave(OTHER)]);
    await settle();
    expect(read.value()).toEqual([leave(OTHER)]);
    makerId.set(ID);
    await settle();
    expect(read.state()).toBe('loading');
    expect(read.value()).toBeUndefined();
  });

  it('asks nothing while there is nothing to ask', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.readMaker, () => undefined));
    await settle();
    http.expectNone(() => true);
    expect(read.state()).toBe('idle');
  });

  it('takes what a write answered in place of what was read', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    http.expectOne('/api/crafts').flush([]);
    await settle();
    read.set([craft]);
    await settle();
    expect(read.value()).toEqual([craft]);
    expect(read.state()).toBe('ready');
  });

  it('fails where the answer does not keep the contract', async () => {
    const http = setUp();
    const read = TestBed.runInInjectionContext(() => readEndpoint(endpoints.listCrafts));
    await settle();
    http.expectOne('/api/crafts').flush({ not: 'a list' });
    await settle();
    expect(read.state()).toBe('failed');
    expect(read.failure()?.kind).toBe('unreadable');
  });
});
