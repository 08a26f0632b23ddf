import { HttpErrorResponse } from '@angular/common/http';
import { type FieldFault, PROBLEM_KINDS, ProblemDetails, type ProblemKind } from '@common/contract';

/** What went wrong: a kind that the server names, no answer at all, or an answer that this page does not understand. */
export type FailureKind = ProblemKind | 'unreachable' | 'unreadable';

/** A call that did not succeed, with a sentence that a person can act on. The one error type that leaves the API seam. */
export class ApiFailure extends Error {
  readonly kind: FailureKind;
  /** HTTP status; 0 where no answer came. */
  readonly status: number;
  readonly title: string;
  readonly detail: string;
  /** Names the request in the server's log; null where the server was not reached. */
  readonly requestId: string | null;
  /** Faults at single fields; empty where the failure has none. */
  readonly faults: readonly FieldFault[];
  /** At `version-conflict`: the record as it is stored now; undefined otherwise. */
  readonly current: unknown;
  /** At `version-conflict`: what was sent; undefined otherwise. */
  readonly sent: unknown;

  constructor(
    given: Pick<ApiFailure, 'kind' | 'status' | 'title' | 'detail'> &
      Partial<Pick<ApiFailure, 'requestId' | 'faults' | 'current' | 'sent'>>,
  ) {
    super(given.detail);
    this.name = 'ApiFailure';
    this.kind = given.kind;
    this.status = given.status;
    this.title = given.title;
    this.detail = given.detail;
    this.requestId = given.requestId ?? null;
    this.faults = given.faults ?? [];
    this.current = given.current;
    this.sent = given.sent;
  }
}

/** What stands between the page and the server says these: a proxy, or the page's own service worker without a connection. */
const NOT_REACHED: ReadonlySet<number> = new Set([502, 503, 504]);

/** Turns whatever a request threw into an `ApiFailure`; one that is an `ApiFailure` already stays as it is. */
export function toApiFailure(error: unknown): ApiFailure {
  if (error instanceof ApiFailure) {
    return error;
  }
  if (!(error instanceof HttpErrorResponse)) {
    return unreadable(0, null);
  }
  const requestId = error.headers.get('X-Request-Id');
  if (error.status === 0) {
    return unreachable(0);
  }
  const problem = ProblemDetails.safeParse(fromText(error.error));
  if (!problem.success) {
    const isFromBetween = NOT_REACHED.has(error.status) && requestId === null;
    return isFromBetween ? unreachable(error.status) : unreadable(error.status, requestId);
  }
  const { type, title, status, detail, errors, current, sent } = problem.data;
  return new ApiFailure({
    kind: kindOf(type),
    status,
    title,
    detail,
    requestId: problem.data.requestId,
    faults: errors,
    current,
    sent,
  });
}

function unreachable(status: number): ApiFailure {
  return new ApiFailure({
    kind: 'unreachable',
    status,
    title: 'Fettle can’t be reached',
    detail: 'Check the connection, then try again. Nothing you typed is lost.',
  });
}

/** The failure of an answer that does not keep the contract. */
export function unreadable(status: number, requestId: string | null): ApiFailure {
  return new ApiFailure({
    kind: 'unreadable',
    status,
    title: 'The answer could not be read',
    detail: 'The page may be older than the studio’s server. Reload it and try again.',
    requestId,
  });
}

function kindOf(type: string): FailureKind {
  const name = type.slice(type.lastIndexOf('/') + 1);
  return name in PROBLEM_KINDS ? (name as ProblemKind) : 'unexpected';
}

/** `application/problem+json` arrives as text where the client asked for something else. */
function fromText(body: unknown): unknown {
  if (typeof body !== 'string') {
    return body;
  }
  try {
    return JSON.parse(body);
  } catch {
    return null;
  }
}
