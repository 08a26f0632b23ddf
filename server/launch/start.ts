import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { openProjectCluster } from '@database/cluster/cluster';
import { Obstacle } from '@database/cluster/obstacle';
import { readAddress, refuseTakenPort, type Address } from './address';
import { buildApplication } from './build-application';
import { endErrands } from './child';
import { takeLaunchLock } from './launch-lock';
import { DATA_FOLDER } from './places';
import { prepareDatabase } from './prepare-database';
import { serverSettings } from './server-settings';
import { startBuiltServer, type ServerProcess } from './server-process';
import { ensureSystemPackages, POSTGRESQL } from './system-packages';
import { askedToEnd, launch, say } from './terminal';

/** `npm start`: from whatever is there to a running studio, and back to nothing running at Ctrl-C. */
launch(async () => {
  const address = readAddress(process.env);
  const end = askedToEnd().then(() => 'asked' as const);
  const giveBack = takeLaunchLock(join(DATA_FOLDER, 'launcher.json'), address.url);
  try {
    await refuseTakenPort(address);
    // A build or an installation that Ctrl-C interrupts leaves nothing that the next start takes for whole.
    const prepared = await Promise.race([prepare(), end]);
    if (prepared === 'asked') return endErrands();
    await serve(address, end);
  } finally {
    giveBack();
  }
});

async function prepare(): Promise<void> {
  await ensureSystemPackages([POSTGRESQL]);
  await buildApplication();
}

async function serve(address: Address, end: Promise<'asked'>): Promise<void> {
  mkdirSync(DATA_FOLDER, { recursive: true });
  const cluster = await openProjectCluster(DATA_FOLDER);
  let server: ServerProcess | undefined;
  try {
    const welcome = await prepareDatabase(cluster.url);
    server = await startBuiltServer(address.url, serverSettings(address, cluster.url));
    const stays = `Ctrl-C stops it; the data stays in ${cluster.path}.`;
    say(['', `Fettle is at ${address.url}`, ...welcome, stays, ''].join('\n'));
    const outcome = await Promise.race([end, server.ended]);
    if (outcome !== 'asked') throw new Obstacle(`The server ended by itself (code ${String(outcome)}): see above.`);
    say('Stopping.');
  } finally {
    await server?.stop();
    await cluster.stop();
  }
}
