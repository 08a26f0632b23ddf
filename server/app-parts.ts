import type { Express } from 'express';
import type { DataSource } from 'typeorm';
import type { Config } from './config';
import type { Api } from './http/api';
import type { Readiness } from './http/health-routes';
import type { Log } from './http/log';
import type { LiveHub } from './live';
import type { JobPool } from './jobs/job-pool';
import type { LevelRuns, SearchRuns } from './planning';
import type { Authenticator, SessionKeeping } from './session';
import type { Transactions } from './storage/transactions';

/** Everything that the application works with; made by `composition.ts`, or by a test. */
export interface AppParts {
  readonly config: Config;
  readonly log: Log;
  readonly dataSource: DataSource;
  readonly transactions: Transactions;
  readonly sessions: SessionKeeping;
  readonly live: LiveHub;
  readonly jobPool: JobPool;
  readonly levelRuns: LevelRuns;
  readonly searchRuns: SearchRuns;
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
