/** The public file of planning: the working plan, levelling, issuing, dates and load. */
import type { Transactions } from '../storage/transactions';
import type { JobPool } from '../jobs/job-pool';
import type { LiveHub } from '../live';
import { Dates } from './dates';
import { Forecasts } from './forecast/forecasts';
import { Issues } from './issues';
import type { LevelRuns } from './level-runs';
import { Loads } from './load-view';
import type { PlanningParts } from './planning-routes';
import { Proposals } from './proposals';
import { Revisions } from './revisions';
import { Promises } from './searches/promises';
import { Rescues } from './searches/rescues';
import type { SearchRuns } from './searches/search-runs';
import { WorkingPlan } from './working-plan';

export { LevelRuns } from './level-runs';
export { SearchRuns } from './searches/search-runs';
export { mountPlanning } from './planning-routes';
export { readIssued } from './snapshot-repository';

/** What planning is made of. */
export interface PlanningNeeds {
  readonly transactions: Transactions;
  readonly levelRuns: LevelRuns;
  readonly searchRuns: SearchRuns;
  readonly jobPool: JobPool;
  readonly live: LiveHub;
}

/** Everything that the routes of planning work with. */
export function createPlanningParts({
  transactions,
  levelRuns,
  searchRuns,
  jobPool,
  live,
}: PlanningNeeds): PlanningParts {
  return {
    workingPlan: new WorkingPlan(transactions),
    revisions: new Revisions(transactions),
    levelRuns,
    proposals: new Proposals(transactions),
    issues: new Issues(transactions),
    dates: new Dates(transactions),
    loads: new Loads(transactions),
    promises: new Promises(transactions, searchRuns),
    rescues: new Rescues(transactions, searchRuns),
    forecasts: new Forecasts(transactions, jobPool, live),
  };
}
