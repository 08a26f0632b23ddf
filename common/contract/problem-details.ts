import { z } from 'zod';

/** The closed list of what can go wrong, as a client may tell them apart; `type` on the wire is `/problems/<kind>`. */
export const PROBLEM_KINDS = {
  'malformed-request': { status: 400, title: 'The request could not be read' },
  'invalid-input': { status: 422, title: 'Something in the request is not right' },
  'not-signed-in': { status: 401, title: 'Sign in first' },
  'wrong-credentials': { status: 401, title: 'The e-mail address or the password is not right' },
  'not-allowed': { status: 403, title: 'Your role does not allow this' },
  'stale-form': { status: 403, title: 'The page is out of date; reload it and try again' },
  'not-found': { status: 404, title: 'There is nothing here' },
  gone: { status: 410, title: 'This was closed for good' },
  'wrong-method': { status: 405, title: 'This address does not answer that method' },
  'version-conflict': { status: 409, title: 'Someone else changed this meanwhile' },
  'already-exists': { status: 409, title: 'There is one already' },
  'still-in-use': { status: 409, title: 'It is still in use' },
  'link-cycle': { status: 422, title: 'The stages wait for each other in a circle' },
  'plan-stale': { status: 409, title: 'The plan no longer answers the studio as it is' },
  'plan-unsound': { status: 422, title: 'The plan breaks a rule and can not be issued' },
  'level-running': { status: 409, title: 'A levelling is already running' },
  'forecast-stopped': { status: 409, title: 'The forecast was stopped' },
  'too-large': { status: 413, title: 'That is too much at once' },
  'unsupported-media': { status: 415, title: 'Send JSON' },
  'too-many-attempts': { status: 429, title: 'Too many attempts; wait a little' },
  'not-configured': { status: 503, title: 'This is not set up here' },
  'not-ready': { status: 503, title: 'The studio is starting or stopping' },
  unexpected: { status: 500, title: 'Something went wrong on our side' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemKind = keyof typeof PROBLEM_KINDS;

/** One fault at one place: `pointer` is an RFC 6901 JSON pointer into the body, or `?name` for a query, `line` for a CSV row. */
export const FieldFault = z.object({ pointer: z.string(), detail: z.string(), line: z.int().optional() });
export type FieldFault = z.infer<typeof FieldFault>;

/** RFC 9457 problem details, with `errors` for single fields and both values at a version conflict. */
export const ProblemDetails = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  /** A sentence that a person can act on. */
  detail: z.string(),
  instance: z.string().optional(),
  requestId: z.string(),
  errors: z.array(FieldFault).optional(),
  /** At `version-conflict`: the record as it is stored now, and as it was sent. */
  current: z.unknown().optional(),
  sent: z.unknown().optional(),
});
export type ProblemDetails = z.infer<typeof ProblemDetails>;
