import { json, type NextFunction, type Request, type RequestHandler, type Response } from 'express';
import { Problem } from './problem';

const USUAL_LIMIT = '1mb';
// A million and a half characters, three bytes each.
const IMPORT_LIMIT = '5mb';
const IMPORT_PATH = /^\/api\/productions\/[^/]+\/import\/?$/;

/** Reads JSON bodies, 1 MB at most (5 MB where stages are imported); a body of any other type is refused. */
export function jsonBody(): RequestHandler {
  const usual = json({ limit: USUAL_LIMIT });
  const large = json({ limit: IMPORT_LIMIT });
  return (request: Request, response: Response, next: NextFunction) => {
    if (hasBody(request) && request.is('application/json') === false) {
      throw new Problem('unsupported-media', 'Send the body as application/json.');
    }
    const parse = IMPORT_PATH.test(request.originalUrl.split('?')[0]) ? large : usual;
    parse(request, response, next);
  };
}

function hasBody(request: Request): boolean {
  return request.headers['transfer-encoding'] !== undefined || Number(request.headers['content-length'] ?? 0) > 0;
}
