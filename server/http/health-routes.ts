import type { Router } from 'express';
import type { DataSource } from 'typeorm';
import { Problem } from './problem';

/** Whether the process takes requests; `main.ts` turns it off before it stops. */
export interface Readiness {
  isReady(): boolean;
}

/** For whoever watches the process: `health` while it lives, `ready` while it and its database can answer. */
export function mountHealth(router: Router, dataSource: DataSource, readiness: Readiness): void {
  router.get('/api/health', (_request, response) => {
    response.json({ status: 'alive' });
  });
  router.get('/api/ready', async (_request, response) => {
    if (!readiness.isReady()) throw new Problem('not-ready', 'The studio is starting or stopping; try again shortly.');
    try {
      await dataSource.query('select 1');
    } catch {
      throw new Problem('not-ready', 'The database does not answer.');
    }
    response.json({ status: 'ready' });
  });
}
