import { join } from 'node:path';
import concurrently from 'concurrently';
import { openProjectCluster } from '@database/cluster/cluster';
import { LOOPBACK, portTrouble } from '@database/cluster/free-port';
import { Obstacle } from '@database/cluster/obstacle';
import { readAddress, refuseTakenPort } from './address';
import { buildServer } from './build-server';
import { takeLaunchLock } from './launch-lock';
import { DATA_FOLDER } from './places';
import { prepareDatabase } from './prepare-database';
import { serverSettings } from './server-settings';
import { ensureSystemPackages, POSTGRESQL } from './system-packages';
import { launch, say } from './terminal';

/** Where the client's development server listens; it passes what belongs to the server on to PORT. */
const CLIENT_PORT = 4200;

/** `npm run dev`: the same studio as `npm start`, client and server rebuilt at every change. */
launch(async () => {
  const url = `http://${LOOPBACK}:${String(CLIENT_PORT)}`;
  const address = { ...readAddress(process.env), url };
  const giveBack = takeLaunchLock(join(DATA_FOLDER, 'launcher.json'), url);
  try {
    await refuseTakenPort(address);
    if ((await portTrouble(CLIENT_PORT)) !== undefined) {
      throw new Obstacle(`Port ${String(CLIENT_PORT)}, which the client is developed on, is used by another program.`);
    }
    await ensureSystemPackages([POSTGRESQL]);
    await buildServer();
    const cluster = await openProjectCluster(DATA_FOLDER);
    try {
      const welcome = await prepareDatabase(cluster.url);
      say(['', `Fettle will be at ${url}`, ...welcome, ''].join('\n'));
      await watchBoth({ ...serverSettings(address, cluster.url), NODE_ENV: 'development' });
    } finally {
      await cluster.stop();
    }
  } finally {
    giveBack();
  }
});

/** Runs both until one ends or Ctrl-C comes, which concurrently passes on to them. */
async function watchBoth(env: Readonly<Record<string, string>>): Promise<void> {
  const { result } = concurrently(
    [
      { name: 'server', command: 'npx tsx watch --clear-screen=false server/main.ts', env },
      { name: 'client', command: 'npx ng serve', env: { NG_CLI_ANALYTICS: 'false', PORT: env['PORT'] } },
    ],
    { killOthersOn: ['failure', 'success'], prefixColors: ['blue', 'magenta'] },
  );
  // How they end says nothing: Ctrl-C counts as a failure there.
  await result.catch(() => undefined);
}
