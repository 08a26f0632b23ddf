import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { RateLimits } from '../config';
import { Problem } from './problem';

const MINUTE_MS = 60_000;

/** Keeps one address from asking more than the server can well answer. */
export function limitRequests(limits: RateLimits): RequestHandler {
  return rateLimit({
    windowMs: MINUTE_MS,
    limit: limits.requestsPerMinute,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    handler: (_request, _response, next) => {
      next(new Problem('too-many-attempts', 'That is more than a person can ask for. Wait a minute and go on.'));
    },
  });
}

/**
 * Keeps a password from being guessed: so many failures with one e-mail address from one network address, whether or not there is
 * such an account.
 */
export function limitSignIns(limits: RateLimits): RequestHandler {
  return rateLimit({
    windowMs: 15 * MINUTE_MS,
    limit: limits.failedSignIns,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    skipSuccessfulRequests: true,
    keyGenerator: (request: Request) => `${ipKeyGenerator(request.ip ?? '')} ${emailOf(request)}`,
    handler: (_request, _response, next) => {
      next(
        new Problem('too-many-attempts', 'Too many sign-ins went wrong. Wait a quarter of an hour, then try again.'),
      );
    },
  });
}

function emailOf(request: Request): string {
  const email = (request.body as { email?: unknown } | undefined)?.email;
  return typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : '';
}
