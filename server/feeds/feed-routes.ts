import type { Express, Request, RequestHandler, Response } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import { Problem } from '../http/problem';
import type { Transactions } from '../storage/transactions';
import { httpDate, isUnchanged } from './conditional';
import { FeedReader } from './feed-reader';
import { digestOfToken } from './feed-token';
import { Feeds } from './feeds';

const MINUTE_MS = 60_000;
/** Readings of one address in a minute: a reader asks every few minutes at most. */
const READINGS_A_MINUTE = 30;
/** Addresses that were none, tried from one network address in a quarter of an hour. */
const FAILED_GUESSES = 30;

/** What the routes of calendars work with. */
export interface FeedParts {
  readonly api: Api;
  readonly app: Express;
  readonly transactions: Transactions;
  /** Origin under which readers reach the server; null for whatever host they name. */
  readonly publicUrl: string | null;
}

/** Calendar addresses, and the calendars behind them, which a phone reads without signing in. */
export function mountFeeds({ api, app, transactions, publicUrl }: FeedParts): void {
  const feeds = new Feeds(transactions);
  api.on(endpoints.listFeeds, ({ actor }) => feeds.list(actor));
  api.on(endpoints.createFeed, async ({ actor, body, request }) => {
    const { token, ...view } = await feeds.create(actor, body.scope);
    const origin = publicUrl ?? `${request.protocol}://${request.get('Host') ?? ''}`;
    const url = `${origin}/api/calendar/${token}.ics`;
    return { ...view, httpsUrl: url, webcalUrl: url.replace(/^https?:/, 'webcal:') };
  });
  api.on(endpoints.revokeFeed, ({ actor, params }) => feeds.revoke(actor, params.id));

  const reader = new FeedReader(transactions);
  app.get('/api/calendar/:token.ics', limitGuesses(), limitReadings(), async (request, response) => {
    await sendCalendar(reader, request, response);
  });
}

async function sendCalendar(
  reader: FeedReader,
  request: Request<{ token: string }>,
  response: Response,
): Promise<void> {
  const answer = await reader.read(request.params.token);
  if (answer.kind === 'closed') {
    throw new Problem(
      'gone',
      'This calendar address was closed. Ask for a new one, and take this one out of your calendar.',
    );
  }
  if (answer.kind === 'unknown') {
    throw new Problem('not-found', 'There is no calendar at this address.');
  }
  const { etag, lastModifiedSeconds } = answer.validators;
  response.set({ ETag: etag, 'Cache-Control': 'private, no-cache', 'X-Robots-Tag': 'noindex' });
  if (lastModifiedSeconds !== null) response.set('Last-Modified', httpDate(lastModifiedSeconds));
  const conditions = {
    ifNoneMatch: request.get('If-None-Match'),
    ifModifiedSince: request.get('If-Modified-Since'),
  };
  if (isUnchanged(conditions, answer.validators)) {
    response.status(304).end();
    return;
  }
  response.set({
    'Content-Type': 'text/calendar; charset=utf-8',
    'Content-Disposition': 'inline; filename="fettle.ics"',
  });
  // Not `send`, which would weigh the conditions once more in its own way.
  response.set('Content-Length', String(answer.bytes.length)).end(answer.bytes);
}

/** An address that many readers share, or one reader in haste, is slowed down; by digest, so that no secret is kept. */
function limitReadings(): RequestHandler<{ token: string }> {
  return rateLimit({
    windowMs: MINUTE_MS,
    limit: READINGS_A_MINUTE,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    keyGenerator: (request: Request) => digestOfToken(String(request.params['token'])),
    handler: (_request, _response, next) => {
      next(new Problem('too-many-attempts', 'This calendar is asked for too often. Once in some minutes is enough.'));
    },
  }) as RequestHandler as RequestHandler<{ token: string }>;
}

function limitGuesses(): RequestHandler<{ token: string }> {
  return rateLimit({
    windowMs: 15 * MINUTE_MS,
    limit: FAILED_GUESSES,
    standardHeaders: false,
    legacyHeaders: false,
    skipSuccessfulRequests: true,
    requestWasSuccessful: (_request, response) => response.statusCode !== 404,
    keyGenerator: (request: Request) => ipKeyGenerator(request.ip ?? ''),
    handler: (_request, _response, next) => {
      next(new Problem('too-many-attempts', 'Too many addresses that are none. Wait a quarter of an hour.'));
    },
  }) as RequestHandler as RequestHandler<{ token: string }>;
}
