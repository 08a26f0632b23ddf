import express, { type Express, type RequestHandler } from 'express';
import type { DataSource } from 'typeorm';
import type { Config } from './config';
import { mountFeatures } from './features';
import { Api } from './http/api';
import { serveClient } from './http/client-files';
import { mountHealth, type Readiness } from './http/health-routes';
import { jsonBody } from './http/json-body';
import { logRequests, type Log } from './http/log';
import { problemHandler } from './http/problem-handler';
import { limitRequests } from './http/rate-limits';
import { requestContext } from './http/request-context';
import { securityHeaders } from './http/security-headers';
import { mountLive, type LiveHub } from './live';
import type { LevelRuns } from './planning';
import { createPassport, type Authenticator, type SessionKeeping } from './session';
import type { Transactions } from './storage/transactions';

/** Everything that the application works with; made by `composition.ts`, or by a test. */
export interface AppParts {
  readonly config: Config;
  readonly log: Log;
  readonly dataSource: DataSource;
  readonly transactions: Transactions;
  readonly sessions: SessionKeeping;
  readonly live: LiveHub;
  readonly levelRuns: LevelRuns;
  readonly readiness: Readiness;
}

/** What a feature is given to mount its routes with. */
export interface FeatureParts extends AppParts {
  /** The contract's routes. */
  readonly api: Api;
  /** For the few addresses that are no part of the contract: a calendar's, a sign-in elsewhere. */
  readonly app: Express;
  readonly passport: Authenticator;
}

/** The application as a request handler. It does not listen; `main.ts` and the tests do. */
export function createApp(parts: AppParts): Express {
  const { config, log, dataSource, sessions, live, readiness } = parts;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxyHops);
  app.set('query parser', 'simple');
  app.use(requestContext, logRequests(log), securityHeaders(config.publicUrl));
  mountHealth(app, dataSource, readiness);

  const passport = createPassport(dataSource.manager);
  app.use(
    '/api',
    noStore,
    limitRequests(config.limits),
    sessions.middleware,
    passport.session() as RequestHandler,
    jsonBody(),
  );
  mountLive(app, live, sessions.store);
  const api = new Api(config.publicUrl);
  mountFeatures({ ...parts, api, app, passport });
  api.close();
  app.use(api.router);

  serveClient(app, config.clientFolder);
  app.use(problemHandler(log));
  return app;
}

function noStore(_request: express.Request, response: express.Response, next: express.NextFunction): void {
  response.setHeader('Cache-Control', 'no-store');
  next();
}
