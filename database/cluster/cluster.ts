import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureApplicationDatabase } from './application-database';
import { claim, clusterFolder, projectClusterFolder, type ClusterFolder } from './cluster-folder';
import { startServer, stopServer, type Durability } from './control';
import { ensureCluster } from './make-cluster';
import { Obstacle } from './obstacle';
import { canEnter, clusterOwner, type ClusterOwner } from './owner';
import { identify, isAlive, type ProcessIdentity } from './process-identity';

/** A PostgreSQL cluster of our own, running on loopback. */
export interface Cluster {
  /** Connects the application's role to the application's database; holds the password, so it is never logged. */
  readonly url: string;
  readonly path: string;
  /** Ends open sessions and stops the server; throw-away clusters are removed as well. May be called twice. */
  stop(): Promise<void>;
}

const THROW_AWAY_PREFIX = 'fettle-throw-away-';
const MAKER_FILE = 'made-by.json';

/** Starts the project's own cluster, made at the first start and kept in (or for) its data folder. */
export async function openProjectCluster(dataFolder: string): Promise<Cluster> {
  const owner = clusterOwner();
  return open(projectClusterFolder(dataFolder, owner), owner, 'kept');
}

/** Starts a fresh cluster in the system's temporary folder, removed at `stop`; sweeps those that killed runs left. */
export async function openThrowAwayCluster(): Promise<Cluster> {
  const owner = clusterOwner();
  const parent = [tmpdir(), '/tmp', '/var/tmp'].find((path) => existsSync(path) && canEnter(owner, path));
  if (parent === undefined) throw new Obstacle('There is no temporary folder that the user postgres may enter.');
  await sweep(parent, owner);
  const folder = clusterFolder(mkdtempSync(join(parent, THROW_AWAY_PREFIX)));
  claim(folder.path, owner);
  writeFileSync(join(folder.path, MAKER_FILE), JSON.stringify(identify(process.pid)));
  try {
    const cluster = await open(folder, owner, 'thrown-away');
    return {
      ...cluster,
      async stop() {
        await cluster.stop();
        remove(folder);
      },
    };
  } catch (error) {
    remove(folder);
    throw error;
  }
}

async function open(folder: ClusterFolder, owner: ClusterOwner, durability: Durability): Promise<Cluster> {
  const programs = await ensureCluster(folder, owner);
  const port = await startServer(folder, owner, programs, durability);
  const stop = () => stopServer(folder, owner, programs);
  try {
    const access = { port, password: readPassword(folder) };
    const mayCreateDatabases = durability === 'thrown-away' ? 'CREATEDB' : 'NOCREATEDB';
    return { url: await ensureApplicationDatabase(access, mayCreateDatabases), path: folder.path, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

function readPassword(folder: ClusterFolder): string {
  if (!existsSync(folder.password)) {
    throw new Obstacle(`The file ${folder.password} is missing, without which the database cannot be entered.`);
  }
  return readFileSync(folder.password, 'utf8').trim();
}

async function sweep(parent: string, owner: ClusterOwner): Promise<void> {
  for (const name of readdirSync(parent).filter((entry) => entry.startsWith(THROW_AWAY_PREFIX))) {
    const folder = clusterFolder(join(parent, name));
    try {
      const maker = JSON.parse(readFileSync(join(folder.path, MAKER_FILE), 'utf8')) as ProcessIdentity;
      if (isAlive(maker)) continue;
      if (existsSync(folder.data)) await stopServer(folder, owner, await ensureCluster(folder, owner));
      remove(folder);
    } catch {
      // Another user's, or one whose maker has not written its name yet: not ours to touch.
    }
  }
}

function remove(folder: ClusterFolder): void {
  rmSync(folder.path, { recursive: true, force: true, maxRetries: 5 });
}
