import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatSnackBar } from '@angular/material/snack-bar';
import { SessionStore } from '../session';
import { freshKey } from './fresh-key';
import { ReportOutbox } from './report-outbox';

const STAGE = '6f0e8f4e-2f5b-4b7e-9f0a-0a1b2c3d4e5f';
const report = (key: string) => ({ key, at: '2026-12-01T09:00:00.000Z' });
const said: string[] = [];

function setUp(accountId = 'me') {
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      { provide: SessionStore, useValue: { account: () => ({ id: accountId }) } },
      { provide: MatSnackBar, useValue: { open: (text: string) => said.push(text) } },
    ],
  });
  return { outbox: TestBed.inject(ReportOutbox), http: TestBed.inject(HttpTestingController) };
}
const macrotask = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));
const stored = (): unknown => JSON.parse(localStorage.getItem('fettle-reports') ?? '[]');
const refusal = { type: '/problems/not-allowed', title: 'No', status: 403, detail: 'Not yours.', requestId: 'r' };

describe('ReportOutbox', () => {
  beforeEach(() => {
    localStorage.clear();
    said.length = 0;
  });

  it('keeps a report on the device while there is no connection, and sends it with the same key when there is', async () => {
    const { outbox, http } = setUp();
    const key = freshKey();
    const adding = outbox.add(STAGE, 'start', report(key));
    http.expectOne(`/api/stages/${STAGE}/start`).error(new ProgressEvent('error'));
    await adding;
    expect(outbox.waiting()).toHaveLength(1);
    expect(stored()).toHaveLength(1);

    window.dispatchEvent(new Event('online'));
    await macrotask();
    const again = http.expectOne(`/api/stages/${STAGE}/start`);
    expect((again.request.body as { key: string }).key).toBe(key);
    again.error(new ProgressEvent('error'));
    await macrotask();
    expect(outbox.waiting()).toHaveLength(1);
    expect(outbox.settled()).toBe(0);
  });

  it('sends in the order in which things happened, one after the other', async () => {
    const { outbox, http } = setUp();
    const first = outbox.add(STAGE, 'start', report('a'));
    const second = outbox.add(STAGE, 'finish', report('b'));
    http.expectNone(`/api/stages/${STAGE}/finish`);
    http.expectOne(`/api/stages/${STAGE}/start`).flush(refusal, { status: 403, statusText: 'No' });
    await macrotask();
    http.expectOne(`/api/stages/${STAGE}/finish`).flush(refusal, { status: 403, statusText: 'No' });
    await Promise.all([first, second]);
    expect(outbox.waiting()).toEqual([]);
  });

  it('gives up a report that the server refuses, and says why', async () => {
    const { outbox, http } = setUp();
    const adding = outbox.add(STAGE, 'start', report('a'));
    http.expectOne(`/api/stages/${STAGE}/start`).flush(refusal, { status: 403, statusText: 'No' });
    await adding;
    expect(outbox.waiting()).toEqual([]);
    expect(stored()).toEqual([]);
    expect(outbox.settled()).toBe(1);
    expect(said[0]).toContain('Not yours.');
  });

  it('leaves another person’s reports for that person', async () => {
    localStorage.setItem(
      'fettle-reports',
      JSON.stringify([{ accountId: 'somebody', stageId: STAGE, action: 'start', report: report('a') }]),
    );
    const { outbox, http } = setUp('me');
    await outbox.send();
    http.expectNone(() => true);
    expect(outbox.waiting()).toHaveLength(1);
  });

  it('is not stopped by what it can not read on the device', () => {
    localStorage.setItem('fettle-reports', 'not JSON');
    expect(setUp().outbox.waiting()).toEqual([]);
  });
});

describe('freshKey', () => {
  // The shape of a version 4 UUID: RFC 9562 section 5.4.
  const shape = /^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/;

  it('is a version 4 UUID, each a new one', () => {
    const keys = Array.from({ length: 100 }, freshKey);
    expect(keys.every((key) => shape.test(key))).toBe(true);
    expect(new Set(keys).size).toBe(100);
  });

  it('is one too where the page is not served securely', () => {
    const own = Object.getOwnPropertyDescriptor(crypto, 'randomUUID');
    Object.defineProperty(crypto, 'randomUUID', { value: undefined, configurable: true });
    const key = freshKey();
    if (own) {
      Object.defineProperty(crypto, 'randomUUID', own);
    } else {
      Reflect.deleteProperty(crypto, 'randomUUID');
    }
    expect(key).toMatch(shape);
  });
});
