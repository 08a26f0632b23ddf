/** An address that is no part of the contract, because it does not speak JSON or is not for our own client. */
export interface OtherRoute {
  readonly method: 'get' | 'head';
  /** As OpenAPI writes it: parameters in braces. */
  readonly path: string;
  readonly name: string;
  readonly tag: string;
  readonly summary: string;
  /** Whether somebody has to be signed in. */
  readonly who: 'anyone' | 'signed-in';
  readonly parameters: readonly {
    readonly name: string;
    readonly in: 'path' | 'query' | 'header';
    readonly description: string;
  }[];
  /** What it answers besides problems; a null type has no content. */
  readonly answers: readonly { readonly status: number; readonly type: string | null; readonly description: string }[];
}

/** Every such address. A test holds this list to what is mounted. */
export const OTHER_ROUTES: readonly OtherRoute[] = [
  {
    method: 'get',
    path: '/api/calendar/{token}.ics',
    name: 'readCalendar',
    tag: 'feeds',
    summary: 'A calendar by its secret address, as RFC 5545 text; 410 once the address was closed',
    who: 'anyone',
    parameters: [
      { name: 'token', in: 'path', description: 'The secret of the address' },
      { name: 'If-None-Match', in: 'header', description: 'The ETag that the reader has; it decides alone' },
      { name: 'If-Modified-Since', in: 'header', description: 'The Last-Modified that the reader has' },
    ],
    answers: [
      { status: 200, type: 'text/calendar', description: 'The calendar, with ETag and mostly Last-Modified' },
      { status: 304, type: null, description: 'The reader has it already' },
    ],
  },
  {
    method: 'get',
    path: '/api/live',
    name: 'listenLive',
    tag: 'live',
    summary: 'What happens, as server-sent events',
    who: 'signed-in',
    parameters: [],
    answers: [{ status: 200, type: 'text/event-stream', description: 'Each event is one LiveEvent in JSON' }],
  },
  {
    method: 'get',
    path: '/api/session/google',
    name: 'leaveForGoogle',
    tag: 'session',
    summary: 'Sends the browser to Google to sign in',
    who: 'anyone',
    parameters: [{ name: 'return', in: 'query', description: 'An address on this server to come back to' }],
    answers: [{ status: 302, type: null, description: 'To Google' }],
  },
  {
    method: 'get',
    path: '/api/session/google/callback',
    name: 'comeBackFromGoogle',
    tag: 'session',
    summary: 'Where Google sends the browser back to',
    who: 'anyone',
    parameters: [
      { name: 'code', in: 'query', description: 'What Google gives for a token' },
      { name: 'state', in: 'query', description: 'Ties the answer to the session that asked' },
      { name: 'error', in: 'query', description: 'Why Google gives no code' },
    ],
    answers: [{ status: 303, type: null, description: 'Signed in, or to the sign-in page with the reason' }],
  },
  {
    method: 'get',
    path: '/api/health',
    name: 'readHealth',
    tag: 'service',
    summary: 'Whether the process lives',
    who: 'anyone',
    parameters: [],
    answers: [{ status: 200, type: 'application/json', description: 'It does' }],
  },
  {
    method: 'get',
    path: '/api/ready',
    name: 'readReadiness',
    tag: 'service',
    summary: 'Whether the process and its database take requests; 503 while they do not',
    who: 'anyone',
    parameters: [],
    answers: [{ status: 200, type: 'application/json', description: 'They do' }],
  },
  {
    method: 'get',
    path: '/api/openapi.json',
    name: 'readOpenApi',
    tag: 'service',
    summary: 'This description of the API',
    who: 'anyone',
    parameters: [],
    answers: [{ status: 200, type: 'application/json', description: 'An OpenAPI 3.1 document' }],
  },
  {
    method: 'get',
    path: '/api/docs',
    name: 'readDocs',
    tag: 'service',
    summary: 'This description as a page',
    who: 'anyone',
    parameters: [],
    answers: [{ status: 200, type: 'text/html', description: 'A page without scripts' }],
  },
  {
    method: 'get',
    path: '/api/docs/style.css',
    name: 'readDocsStyle',
    tag: 'service',
    summary: 'The look of that page',
    who: 'anyone',
    parameters: [],
    answers: [{ status: 200, type: 'text/css', description: 'A style sheet' }],
  },
];
