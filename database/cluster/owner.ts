import { execFileSync, spawn, spawnSync, type SpawnOptions } from 'node:child_process';
import { Obstacle } from './obstacle';

/** Whom PostgreSQL's programs run as. They refuse root, so root hands them to the user `postgres`. */
export type ClusterOwner =
  { readonly kind: 'self' } | { readonly kind: 'postgres'; readonly uid: number; readonly gid: number };

/** Ourselves, or the system's user `postgres` when we are root. */
export function clusterOwner(): ClusterOwner {
  if (process.getuid?.() !== 0) return { kind: 'self' };
  try {
    return { kind: 'postgres', uid: numericId('-u'), gid: numericId('-g') };
  } catch {
    throw new Obstacle(
      'PostgreSQL does not run as root and there is no user named postgres here: install the Debian package ' +
        'postgresql, or run this command as an ordinary user.',
    );
  }
}

/** Whether the owner may enter a folder, which needs every parent to let it through as well. */
export function canEnter(owner: ClusterOwner, folder: string): boolean {
  return spawnSync('test', ['-x', folder], { ...asOwner(owner), stdio: 'ignore' }).status === 0;
}

/** How a program ended, and all it said. */
export interface Ended {
  readonly code: number;
  readonly output: string;
}

/** Runs a program as the owner, from the root folder (which everybody may enter), without a shell. */
export function runAs(owner: ClusterOwner, program: string, args: readonly string[]): Promise<Ended> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { ...asOwner(owner), stdio: ['ignore', 'pipe', 'pipe'] });
    let output = '';
    const keep = (chunk: Buffer): void => void (output += chunk.toString());
    child.stdout?.on('data', keep);
    child.stderr?.on('data', keep);
    child.once('error', reject);
    // 'exit' rather than 'close': the server that pg_ctl leaves behind may keep the pipes open.
    child.once('exit', (code) => {
      child.stdout?.destroy();
      child.stderr?.destroy();
      resolve({ code: code ?? 1, output: output.trim() });
    });
  });
}

function asOwner(owner: ClusterOwner): SpawnOptions {
  const identity = owner.kind === 'self' ? {} : { uid: owner.uid, gid: owner.gid };
  // PG* variables of the caller's shell must not steer our cluster.
  return { ...identity, cwd: '/', env: { PATH: process.env['PATH'], LC_ALL: 'C.UTF-8', TZ: 'UTC' } };
}

function numericId(flag: '-u' | '-g'): number {
  return Number(execFileSync('id', [flag, 'postgres'], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }));
}
