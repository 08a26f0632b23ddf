import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { FormToken } from './form-token';
import { SessionStore } from './session-store';
import { sessionView } from './testing/session-views';

function setUp() {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
  return { store: TestBed.inject(SessionStore), http: TestBed.inject(HttpTestingController) };
}

describe('SessionStore', () => {
  it('asks the server once, however many ask at the same time', async () => {
    const { store, http } = setUp();
    const both = Promise.all([store.load(), store.load()]);
    http.expectOne('/api/session').flush(sessionView('manager'));
    await both;
    await store.load();
    http.verify();
    expect(store.role()).toBe('manager');
    expect(store.isOffice()).toBe(true);
    expect(store.zone()).toBe('Europe/London');
    expect(TestBed.inject(FormToken).value).toBe('token-1');
  });

  it('asks again after a try that failed', async () => {
    const { store, http } = setUp();
    const first = store.load();
    http.expectOne('/api/session').error(new ProgressEvent('error'));
    await expect(first).rejects.toMatchObject({ kind: 'unreachable' });
    const second = store.load();
    http.expectOne('/api/session').flush(sessionView(null));
    await second;
    expect(store.account()).toBeNull();
  });

  it('takes the new form token that comes with signing in', async () => {
    const { store, http } = setUp();
    const loading = store.load();
    http.expectOne('/api/session').flush(sessionView(null, 'before'));
    await loading;
    const signing = store.signIn('ada@example.test', 'secret');
    await Promise.resolve();
    const sent = http.expectOne({ method: 'POST', url: '/api/session' });
    expect(sent.request.body).toEqual({ email: 'ada@example.test', password: 'secret' });
    sent.flush(sessionView('maker', 'after'));
    await signing;
    expect(store.role()).toBe('maker');
    expect(store.isOffice()).toBe(false);
    expect(TestBed.inject(FormToken).value).toBe('after');
  });

  it('forgets at signing out', async () => {
    const { store, http } = setUp();
    const loading = store.load();
    http.expectOne('/api/session').flush(sessionView('maker'));
    await loading;
    const out = store.signOut();
    http.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null, { status: 204, statusText: 'No Content' });
    await out;
    expect(store.account()).toBeNull();
    expect(TestBed.inject(FormToken).value).toBe('');
  });
});
