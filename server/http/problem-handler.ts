import type { ErrorRequestHandler, Response } from 'express';
import { PROBLEM_KINDS, type ProblemDetails } from '@common/contract';
import { databaseProblem } from '../storage/database-problem';
import { Problem } from './problem';
import { currentRequestId } from './request-context';
import type { Log } from './log';

/** The one place where an error becomes an answer: problems as they are, anything else as a bland 500 with its id. */
export function problemHandler(log: Log): ErrorRequestHandler {
  return (error: unknown, _request, response, next) => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const problem = error instanceof Problem ? error : (parserProblem(error) ?? databaseProblem(error));
    if (problem) {
      sendProblem(response, problem);
      return;
    }
    log.error({ err: error }, 'unexpected error');
    const detail = 'This is our fault, not yours. Try again; if it stays, tell us the number of the request.';
    sendProblem(response, new Problem('unexpected', detail));
  };
}

/** Writes a problem as RFC 9457 problem details. */
export function sendProblem(response: Response, problem: Problem): void {
  const { errors, current, sent, headers } = problem.parts;
  const details: ProblemDetails = {
    type: `/problems/${problem.kind}`,
    title: PROBLEM_KINDS[problem.kind].title,
    status: problem.status,
    detail: problem.detail,
    requestId: currentRequestId() ?? '',
    ...(errors && { errors: [...errors] }),
    ...(current !== undefined && { current }),
    ...(sent !== undefined && { sent }),
  };
  response.set(headers ?? {});
  response.status(problem.status).type('application/problem+json').send(JSON.stringify(details));
}

/** What the body parser and the router throw, by the `type` or `status` that they put on their errors. */
function parserProblem(error: unknown): Problem | null {
  if (typeof error !== 'object' || error === null) return null;
  const { type, status } = error as { type?: unknown; status?: unknown };
  switch (type) {
    case 'entity.parse.failed':
      return new Problem('malformed-request', 'The body is not JSON: look for a missing quote, comma or bracket.');
    case 'entity.too.large':
      return new Problem('too-large', 'The body is larger than this route takes. Send less at once.');
    case 'encoding.unsupported':
    case 'charset.unsupported':
      return new Problem(
        'unsupported-media',
        'Send JSON as UTF-8, not compressed otherwise than by gzip, deflate or br.',
      );
    case 'request.aborted':
    case 'request.size.invalid':
      return new Problem('malformed-request', 'The body did not arrive whole.');
  }
  // A path that can not be decoded, such as /api/%E0%A4%A.
  return status === 400 ? new Problem('malformed-request', 'The address or the body can not be read.') : null;
}
