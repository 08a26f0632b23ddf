import { createHash } from 'node:crypto';
import { chmodSync, chownSync, existsSync, lstatSync, mkdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { canEnter, type ClusterOwner } from './owner';
import { Obstacle } from './obstacle';

/** Where a cluster lives, and the names of what is inside. */
export interface ClusterFolder {
  readonly path: string;
  /** The finished cluster. It appears under this name only once it is whole. */
  readonly data: string;
  /** The password of both roles, readable by the owner alone. */
  readonly password: string;
  readonly log: string;
}

/** The names inside a cluster's folder; touches nothing. */
export function clusterFolder(path: string): ClusterFolder {
  return {
    path,
    data: join(path, 'data'),
    password: join(path, 'password'),
    log: join(path, 'log'),
  };
}

/**
 * The folder of a project's own cluster, made if need be: inside the project's data folder, or, where the owner may
 * not pass through the project's parents (a clone in root's home, say), in `outside` under a name made from the
 * project's path. A cluster that is already in one of the two stays where it is.
 */
export function projectClusterFolder(dataFolder: string, owner: ClusterOwner, outside = '/var/tmp'): ClusterFolder {
  const inside = clusterFolder(join(dataFolder, 'cluster'));
  const key = createHash('sha256').update(dataFolder).digest('hex').slice(0, 12);
  const beside = clusterFolder(join(outside, `fettle-${key}`));
  mkdirSync(dataFolder, { recursive: true });
  // Passable, so that the owner reaches its folder; not listable, since secrets lie beside it.
  chmodSync(dataFolder, 0o711);
  const reachable = canEnter(owner, dataFolder);
  const chosen = reachable && (existsSync(inside.data) || !existsSync(beside.data)) ? inside : beside;
  if (!reachable && existsSync(inside.data)) {
    throw new Obstacle(
      `The database in ${inside.path} is out of reach of the user postgres: let others pass through its parent ` +
        'folders (chmod o+x on each) and start again.',
    );
  }
  refuseForeign(chosen.data, owner);
  claim(chosen.path, owner);
  return chosen;
}

/** PostgreSQL serves only its owner's files; handing them over in silence would lock the first user out. */
function refuseForeign(data: string, owner: ClusterOwner): void {
  if (!existsSync(data)) return;
  const { uid } = statSync(data);
  if (uid === (owner.kind === 'postgres' ? owner.uid : process.getuid?.())) return;
  throw new Obstacle(
    `The database in ${data} belongs to the user with number ${String(uid)}: start Fettle as that user.`,
  );
}

/** Makes a folder that belongs to the owner alone, and refuses one that somebody else has put there before. */
export function claim(path: string, owner: ClusterOwner): void {
  mkdirSync(path, { recursive: true, mode: 0o700 });
  const found = lstatSync(path);
  const mine = new Set([process.getuid?.(), owner.kind === 'postgres' ? owner.uid : undefined]);
  if (!found.isDirectory() || (process.getuid !== undefined && !mine.has(found.uid))) {
    throw new Obstacle(`The folder ${path} belongs to somebody else: move it away and start again.`);
  }
  if (owner.kind === 'postgres') chownSync(path, owner.uid, owner.gid);
  chmodSync(path, 0o700);
}
