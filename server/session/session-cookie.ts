import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Pool } from 'pg';
import type { Config } from '../config';
import type { Log } from '../http/log';

const FORTNIGHT_MS = 14 * 24 * 3_600_000;
const PRUNE_SECONDS = 3600;

/** Sessions kept in PostgreSQL, so that any server process knows them. */
export interface SessionKeeping {
  readonly middleware: RequestHandler;
  readonly store: session.Store;
  close(): Promise<void>;
}

/**
 * The cookie is unreadable to scripts, lives a fortnight from the last visit, and over TLS is bound to this host alone
 * (`__Host-`, RFC 6265bis section 4.1.3.2). `pruning` removes outlived sessions now and then.
 */
export function keepSessions(config: Config, pool: Pool, log: Log, pruning: 'hourly' | 'never'): SessionKeeping {
  const overTls = config.publicUrl?.startsWith('https:') ?? false;
  const Store = connectPgSimple(session);
  const store = new Store({
    pool,
    tableName: 'session',
    createTableIfMissing: false,
    pruneSessionInterval: pruning === 'hourly' ? PRUNE_SECONDS : false,
    errorLog: (...given: unknown[]) => log.error({ given }, 'the session store failed'),
  });
  const middleware = session({
    store,
    secret: config.sessionSecret,
    name: overTls ? '__Host-fettle' : 'fettle',
    resave: false,
    saveUninitialized: false,
    rolling: true,
    proxy: config.trustProxyHops > 0,
    cookie: { path: '/', httpOnly: true, sameSite: 'lax', secure: overTls, maxAge: FORTNIGHT_MS },
  });
  return { middleware, store, close: () => Promise.resolve(store.close()) };
}
