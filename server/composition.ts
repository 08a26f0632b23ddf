import { Pool } from 'pg';
import type { Express } from 'express';
import { createDataSource } from '@database/data-source';
import { createApp } from './app';
import type { Config } from './config';
import { createLog, type Log } from './http/log';
import { LiveHub } from './live';
import { JobPool } from './jobs/job-pool';
import { LevelRuns, SearchRuns } from './planning';
import { keepSessions } from './session';
import { ProcessMark } from './storage/process-mark';
import { Transactions } from './storage/transactions';

const SESSION_POOL_SIZE = 4;

/** The application with what lives as long as it does. */
export interface Running {
  readonly app: Express;
  readonly log: Log;
  /** From now on `/api/ready` says no, so that no new visitors are sent here. */
  becomeUnready(): void;
  /** Ends the streams of live events, which would never end by themselves. */
  endLivePages(): void;
  /** Stops workers, then lets go of the database. To be called once no request is being answered. */
  stop(): Promise<void>;
}

/** Makes everything and connects it. The database has to be at the present schema. */
export async function compose(
  config: Config,
  log: Log = createLog(config.logLevel),
  clock: () => Date = () => new Date(),
): Promise<Running> {
  const dataSource = await createDataSource(config.databaseUrl).initialize();
  const sessionPool = new Pool({
    connectionString: config.databaseUrl,
    max: SESSION_POOL_SIZE,
    application_name: 'fettle sessions',
    options: '-c timezone=UTC',
  });
  sessionPool.on('error', (error) => log.warn({ err: error }, 'an idle session connection broke'));
  const sessions = keepSessions(config, sessionPool, log, 'hourly');
  const live = new LiveHub(config.databaseUrl, log, new ProcessMark());
  await live.start();
  const transactions = new Transactions(dataSource, log, clock);
  const jobPool = new JobPool(config.engineWorkers ?? undefined);
  const levelRuns = new LevelRuns(transactions, jobPool, live, log);
  const searchRuns = new SearchRuns(transactions, jobPool, live, log);
  await levelRuns.failLeftBehind();
  let isReady = true;
  const app = createApp({
    config,
    log,
    dataSource,
    transactions,
    sessions,
    live,
    jobPool,
    levelRuns,
    searchRuns,
    readiness: { isReady: () => isReady },
  });
  return {
    app,
    log,
    becomeUnready: () => {
      isReady = false;
    },
    endLivePages: () => live.endStreams(),
    stop: async () => {
      await levelRuns.stop();
      await searchRuns.settled();
      await live.stop();
      await sessions.close();
      await sessionPool.end();
      await dataSource.destroy();
    },
  };
}
