import express, { type Express, type RequestHandler } from 'express';
import type { AppParts } from './app-parts';
import { mountFeatures } from './features';
import { Api } from './http/api';
import { serveClient } from './http/client-files';
import { mountHealth } from './http/health-routes';
import { jsonBody } from './http/json-body';
import { logRequests } from './http/log';
import { problemHandler } from './http/problem-handler';
import { limitRequests } from './http/rate-limits';
import { requestContext } from './http/request-context';
import { securityHeaders } from './http/security-headers';
import { mountLive } from './live';
import { createPassport } from './session';

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
