import { Obstacle } from '@database/cluster/obstacle';
import { runErrand } from './child';

// A cold build takes under a minute on two cores; the builder has been seen to hang instead of failing.
const LIMIT_MS = 6 * 60_000;

/** Builds the Angular application into dist/client. */
export async function buildClient(): Promise<void> {
  const { code, timedOut } = await runErrand({
    program: process.execPath,
    args: [require.resolve('@angular/cli/bin/ng.js'), 'build'],
    env: { NG_CLI_ANALYTICS: 'false' },
    stdio: ['ignore', process.stderr, process.stderr],
    limitMs: LIMIT_MS,
  });
  if (timedOut) throw new Obstacle('The build of the client took longer than six minutes and was stopped.');
  if (code !== 0) throw new Obstacle('The client could not be built: see what the compiler says above.');
}
