import type { NextFunction, Request, RequestHandler, Response } from 'express';
import { pino, type DestinationStream, type Logger } from 'pino';
import { currentRequestId } from './request-context';

export type Log = Logger;

/** JSON lines on stdout; each carries the id of the request that it belongs to. */
export function createLog(level: string, destination?: DestinationStream): Log {
  const mixin = () => {
    const requestId = currentRequestId();
    return requestId === null ? {} : { requestId };
  };
  return pino({ level, base: null, timestamp: pino.stdTimeFunctions.isoTime, mixin }, destination as DestinationStream);
}

/**
 * One line for each answered request. It names the route's pattern, not the address: an address may hold a secret (a calendar's,
 * a sign-in code), and bodies are never logged.
 */
export function logRequests(log: Log): RequestHandler {
  return (request: Request, response: Response, next: NextFunction) => {
    const begun = process.hrtime.bigint();
    response.once('close', () => {
      const milliseconds = Number((process.hrtime.bigint() - begun) / 1_000_000n);
      const route = (request.route as { path?: string } | undefined)?.path ?? '(none)';
      const line = { method: request.method, route, status: response.statusCode, milliseconds };
      if (response.statusCode >= 500) log.error(line, 'answered');
      else log.info(line, response.writableFinished ? 'answered' : 'gone before the answer');
    });
    next();
  };
}
