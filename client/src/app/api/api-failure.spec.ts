import { HttpErrorResponse, HttpHeaders } from '@angular/common/http';
import { ApiFailure, toApiFailure } from './api-failure';

const problem = {
  type: '/problems/invalid-input',
  title: 'Something in the request is not right',
  status: 422,
  detail: 'Give it a name.',
  requestId: 'r-1',
  errors: [{ pointer: '/name', detail: 'Give it a name.' }],
};

describe('toApiFailure', () => {
  it('reads problem details (RFC 9457): kind, sentence, faults and request id', () => {
    const failure = toApiFailure(new HttpErrorResponse({ status: 422, error: problem }));
    expect(failure).toMatchObject({
      kind: 'invalid-input',
      status: 422,
      detail: 'Give it a name.',
      requestId: 'r-1',
      faults: problem.errors,
    });
  });

  it('reads problem details that arrive as text', () => {
    const failure = toApiFailure(new HttpErrorResponse({ status: 422, error: JSON.stringify(problem) }));
    expect(failure.kind).toBe('invalid-input');
  });

  it('says that the server can not be reached where no answer came', () => {
    const failure = toApiFailure(new HttpErrorResponse({ status: 0 }));
    expect(failure.kind).toBe('unreachable');
    expect(failure.requestId).toBeNull();
  });

  it('says so too where the page’s own service worker answers for a lost connection', () => {
    const failure = toApiFailure(new HttpErrorResponse({ status: 504, statusText: 'Gateway Timeout', error: '' }));
    expect(failure).toMatchObject({ kind: 'unreachable', status: 504 });
  });

  it('keeps the request id of an answer that is no problem details, such as a proxy’s page', () => {
    const headers = new HttpHeaders({ 'X-Request-Id': 'r-2' });
    const failure = toApiFailure(new HttpErrorResponse({ status: 502, error: '<html>', headers }));
    expect(failure).toMatchObject({ kind: 'unreadable', status: 502, requestId: 'r-2' });
  });

  it('takes a kind that it does not know for an unexpected one', () => {
    const error = { ...problem, type: '/problems/of-next-year' };
    expect(toApiFailure(new HttpErrorResponse({ status: 418, error })).kind).toBe('unexpected');
  });

  it('leaves an ApiFailure as it is', () => {
    const failure = new ApiFailure({ kind: 'not-found', status: 404, title: 'a', detail: 'b' });
    expect(toApiFailure(failure)).toBe(failure);
  });
});
