import { AsyncLocalStorage } from 'node:async_hooks';
import { randomUUID } from 'node:crypto';
import type { NextFunction, Request, Response } from 'express';

interface RequestContext {
  readonly requestId: string;
}

const storage = new AsyncLocalStorage<RequestContext>();

/** The id of the request that is being answered; null outside of one. */
export function currentRequestId(): string | null {
  return storage.getStore()?.requestId ?? null;
}

/** Gives each request an id of our own making, which log lines and problems carry. */
export function requestContext(_request: Request, response: Response, next: NextFunction): void {
  const requestId = randomUUID();
  response.setHeader('X-Request-Id', requestId);
  storage.run({ requestId }, next);
}
