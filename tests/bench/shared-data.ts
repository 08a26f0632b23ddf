import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';

/** The folder of published scheduling instances beside the project (or where FETTLE_SHARED says); null where there is none. */
export function sharedInstances(): string | null {
  const shared = process.env['FETTLE_SHARED'] ?? resolve(__dirname, '../../../shared');
  const path = join(shared, 'reference', 'scheduling');
  return existsSync(path) ? path : null;
}

/** The same for a test: says on standard error what is skipped where there are none. */
export function sharedInstancesFor(check: string): string | null {
  const path = sharedInstances();
  if (path === null) console.error(`The published instances are not on this machine; skipped: ${check}.`);
  return path;
}
