import { randomBytes, randomUUID } from 'node:crypto';
import {
  appendFileSync,
  chownSync,
  existsSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { type ClusterFolder } from './cluster-folder';
import { Obstacle } from './obstacle';
import { runAs, type ClusterOwner } from './owner';
import { findPrograms, type Programs } from './programs';

/** The role that administers a cluster; the application never uses it. */
export const SUPERUSER = 'postgres';

/** The file inside the data folder that holds what we set, written anew at every start. */
export const SETTINGS_FILE = 'fettle.conf';

const MAKING = 'making-';

/**
 * What a folder holds: nothing, a whole cluster, or something that looks like a cluster and cannot be one.
 * Half-made clusters never get the name `data`, so the last means that files were lost.
 */
export function clusterState(folder: ClusterFolder): 'absent' | 'whole' | 'damaged' {
  if (!existsSync(folder.data)) return 'absent';
  return ['PG_VERSION', 'global/pg_control', SETTINGS_FILE].every((file) => existsSync(join(folder.data, file)))
    ? 'whole'
    : 'damaged';
}

/**
 * The programs that fit the folder's cluster, which is made first when there is none. What an interrupted making
 * left is cleared away; a damaged cluster is set aside, never deleted.
 */
export async function ensureCluster(folder: ClusterFolder, owner: ClusterOwner): Promise<Programs> {
  clearInterrupted(folder);
  const state = clusterState(folder);
  if (state === 'whole') return programsFor(folder);
  if (state === 'damaged') renameSync(folder.data, `${folder.data}.damaged-${String(Date.now())}`);
  const programs = findPrograms();
  if (programs === undefined) throw new Obstacle('PostgreSQL is not installed: install the package postgresql.');
  await makeCluster(folder, owner, programs);
  return programs;
}

/**
 * Removes clusters whose making was interrupted. Each making has a name of its own: an initdb that outlived its
 * launcher must find its folder gone, and not the next one's.
 */
function clearInterrupted(folder: ClusterFolder): void {
  for (const name of readdirSync(folder.path).filter((entry) => entry.startsWith(MAKING))) {
    rmSync(join(folder.path, name), { recursive: true, force: true, maxRetries: 5 });
  }
}

async function makeCluster(folder: ClusterFolder, owner: ClusterOwner, programs: Programs): Promise<void> {
  const making = join(folder.path, `${MAKING}${randomUUID()}`);
  writeFileSync(folder.password, randomBytes(24).toString('base64url'), { mode: 0o600 });
  if (owner.kind === 'postgres') chownSync(folder.password, owner.uid, owner.gid);
  const { code, output } = await runAs(owner, programs.initdb, [
    ...['--pgdata', making],
    ...['--username', SUPERUSER],
    ...['--pwfile', folder.password],
    ...['--encoding', 'UTF8', '--locale', 'C.UTF-8'],
    ...['--auth-host', 'scram-sha-256', '--auth-local', 'reject'],
    '--data-checksums',
  ]);
  if (code !== 0) throw new Obstacle(`Making the database cluster in ${folder.path} failed: ${lastLine(output)}`);
  appendFileSync(join(making, 'postgresql.conf'), `\ninclude = '${SETTINGS_FILE}'\n`);
  writeFileSync(join(making, SETTINGS_FILE), '');
  // The one step that makes it a cluster; an interruption before it leaves only that.
  renameSync(making, folder.data);
}

function programsFor(folder: ClusterFolder): Programs {
  const major = Number(readFileSync(join(folder.data, 'PG_VERSION'), 'utf8').trim());
  const programs = findPrograms(major);
  if (programs === undefined) {
    throw new Obstacle(
      `The database in ${folder.path} was made by PostgreSQL ${String(major)}, which is not installed any more: ` +
        `install the package postgresql-${String(major)} and start again.`,
    );
  }
  return programs;
}

/** The last line of a program's output that says anything. */
export function lastLine(output: string): string {
  const lines = output.split('\n').filter((line) => line.trim() !== '');
  return lines.at(-1)?.trim() ?? 'it gave no reason.';
}
