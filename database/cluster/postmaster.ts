import { readdirSync, readFileSync, readlinkSync, realpathSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';

/** A running server, as its own lock file describes it. */
export interface Postmaster {
  readonly pid: number;
  readonly port: number;
}

const ORPHANS_LEAVE_MS = 5_000;

/**
 * The server that runs on a data folder, or undefined. A lock file alone proves nothing: after a kill it stays, and
 * its number may by now be another program's. So the process must work in this very folder.
 */
export function runningPostmaster(dataFolder: string): Postmaster | undefined {
  const lock = readLock(dataFolder);
  if (lock === undefined) return undefined;
  return processesIn(dataFolder).includes(lock.pid) ? lock : undefined;
}

/**
 * Makes a data folder startable after its server was killed: waits for the server's children to notice, ends those
 * that do not, and removes the stale lock file. Must not be called while a server runs.
 */
export async function clearKilledServer(dataFolder: string): Promise<void> {
  const deadline = Date.now() + ORPHANS_LEAVE_MS;
  while (processesIn(dataFolder).length > 0) {
    if (Date.now() > deadline) processesIn(dataFolder).forEach(end);
    await pause(50);
  }
  rmSync(join(dataFolder, 'postmaster.pid'), { force: true });
}

/** Every PostgreSQL process whose working folder is the data folder: a server and its children have no other. */
export function processesIn(dataFolder: string): readonly number[] {
  const home = realpathSync(dataFolder);
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .filter((name) => worksIn(name, home))
    .map(Number);
}

function worksIn(pid: string, home: string): boolean {
  try {
    return (
      readFileSync(`/proc/${pid}/comm`, 'utf8').startsWith('postgres') && readlinkSync(`/proc/${pid}/cwd`) === home
    );
  } catch {
    // It ended meanwhile, or is somebody else's: either way not ours.
    return false;
  }
}

function readLock(dataFolder: string): Postmaster | undefined {
  try {
    const lines = readFileSync(join(dataFolder, 'postmaster.pid'), 'utf8').split('\n');
    const [pid, port] = [Number(lines[0]), Number(lines[3])];
    return pid > 0 && port > 0 ? { pid, port } : undefined;
  } catch {
    return undefined;
  }
}

function end(pid: number): void {
  try {
    process.kill(pid, 'SIGKILL');
  } catch {
    // Gone in the meantime.
  }
}
