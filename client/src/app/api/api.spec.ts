import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { endpoints } from '@common/contract';
import { Api } from './api';

const ID = '6f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';

function setUp(): { api: Api; http: HttpTestingController } {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
  return { api: TestBed.inject(Api), http: TestBed.inject(HttpTestingController) };
}

describe('Api.callEndpoint', () => {
  it('sends method, path with parameters, and body as the contract says, and answers with what it parsed', async () => {
    const { api, http } = setUp();
    const craft = { key: 'carving', name: 'Carving' };
    const call = api.callEndpoint(endpoints.createCraft, { body: craft });
    const sent = http.expectOne('/api/crafts');
    expect(sent.request.method).toBe('POST');
    expect(sent.request.body).toEqual(craft);
    sent.flush({ id: ID, ...craft, version: 1, unasked: true }, { status: 201, statusText: 'Created' });
    await expect(call).resolves.toEqual({ id: ID, ...craft, version: 1 });
  });

  it('percent-encodes parameters and leaves absent query values out', async () => {
    const { api, http } = setUp();
    const call = api.callEndpoint(endpoints.removeClosure, { params: { id: 'a/b' }, query: { version: 3 } });
    http.expectOne('/api/closures/a%2Fb?version=3').flush(null, { status: 204, statusText: 'No Content' });
    await expect(call).resolves.toBeUndefined();
  });

  it('rejects an answer that does not keep the contract, rather than hand it on', async () => {
    const { api, http } = setUp();
    const call = api.callEndpoint(endpoints.listCrafts);
    http.expectOne('/api/crafts').flush([{ id: 'no uuid' }]);
    await expect(call).rejects.toMatchObject({ name: 'ApiFailure', kind: 'unreadable' });
  });

  it('rejects with an ApiFailure where the server refuses', async () => {
    const { api, http } = setUp();
    const call = api.callEndpoint(endpoints.readMaker, { params: { id: ID } });
    const problem = { type: '/problems/not-found', title: 'Nothing', status: 404, detail: 'Gone.', requestId: 'r' };
    http.expectOne(`/api/makers/${ID}`).flush(problem, { status: 404, statusText: 'Not Found' });
    await expect(call).rejects.toMatchObject({ kind: 'not-found', detail: 'Gone.' });
  });
});
