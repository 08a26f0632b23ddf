import { HttpClient, provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { ApiFailure } from '../api';
import { FormToken } from './form-token';
import { sessionInterceptor } from './session-interceptor';
import { SessionStore } from './session-store';
import { sessionView } from './testing/session-views';

@Component({ selector: 'fettle-blank', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Blank {}

function setUp() {
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(withInterceptors([sessionInterceptor])),
      provideHttpClientTesting(),
      provideRouter([{ path: '**', component: Blank }]),
    ],
  });
  return { client: TestBed.inject(HttpClient), http: TestBed.inject(HttpTestingController) };
}

const problem = (kind: string, status: number) => ({
  type: `/problems/${kind}`,
  title: 'Title',
  status,
  detail: 'Detail.',
  requestId: 'r',
});
const macrotask = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

describe('sessionInterceptor', () => {
  it('gives the form token to requests that change something, and to none else', () => {
    const { client, http } = setUp();
    TestBed.inject(FormToken).value = 'token-7';
    client.post('/api/crafts', {}).subscribe();
    client.get('/api/crafts').subscribe();
    client.post('/elsewhere', {}).subscribe();
    const [post, get] = http.match('/api/crafts');
    expect(post.request.headers.get('X-Fettle-Token')).toBe('token-7');
    expect(get.request.headers.has('X-Fettle-Token')).toBe(false);
    expect(http.expectOne('/elsewhere').request.headers.has('X-Fettle-Token')).toBe(false);
  });

  it('fetches a new token where the old went stale, and sends the request once more', async () => {
    const { client, http } = setUp();
    TestBed.inject(FormToken).value = 'old';
    const answer = firstValueFrom(client.post('/api/crafts', { a: 1 }));
    http.expectOne('/api/crafts').flush(problem('stale-form', 403), { status: 403, statusText: 'Forbidden' });
    http.expectOne('/api/session').flush(sessionView('owner', 'new'));
    await macrotask();
    const again = http.expectOne('/api/crafts');
    expect(again.request.headers.get('X-Fettle-Token')).toBe('new');
    expect(again.request.body).toEqual({ a: 1 });
    again.flush({ ok: true });
    await expect(answer).resolves.toEqual({ ok: true });
  });

  it('does not try a third time', async () => {
    const { client, http } = setUp();
    const answer = firstValueFrom(client.post('/api/crafts', {}));
    http.expectOne('/api/crafts').flush(problem('stale-form', 403), { status: 403, statusText: 'Forbidden' });
    http.expectOne('/api/session').flush(sessionView('owner'));
    await macrotask();
    http.expectOne('/api/crafts').flush(problem('stale-form', 403), { status: 403, statusText: 'Forbidden' });
    await expect(answer).rejects.toBeInstanceOf(ApiFailure);
    http.verify();
  });

  it('sends the person to sign in where the server knows nobody any more, and remembers where from', async () => {
    const { client, http } = setUp();
    const router = TestBed.inject(Router);
    await router.navigateByUrl('/crew?week=2');
    const answer = firstValueFrom(client.get('/api/makers'));
    http.expectOne('/api/makers').flush(problem('not-signed-in', 401), { status: 401, statusText: 'Unauthorized' });
    await expect(answer).rejects.toMatchObject({ kind: 'not-signed-in' });
    await macrotask();
    expect(router.url).toBe('/sign-in?return=%2Fcrew%3Fweek%3D2');
    expect(TestBed.inject(SessionStore).account()).toBeNull();
  });

  it('leaves wrong credentials to the sign-in page', async () => {
    const { client, http } = setUp();
    const answer = firstValueFrom(client.post('/api/session', {}));
    http.expectOne('/api/session').flush(problem('wrong-credentials', 401), { status: 401, statusText: 'No' });
    await expect(answer).rejects.toMatchObject({ kind: 'wrong-credentials' });
    expect(TestBed.inject(Router).url).toBe('/');
  });
});
