import { closeSync, mkdirSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';
import { dirname } from 'node:path';
import { Obstacle } from '@database/cluster/obstacle';
import { identify, isAlive, type ProcessIdentity } from '@database/cluster/process-identity';

/** What a running launcher leaves for others to read. */
interface Holder {
  readonly launcher: ProcessIdentity;
  readonly address: string;
}

/**
 * Takes the lock that keeps two launchers from sharing one data folder, and answers with what gives it back. One that
 * a killed launcher left is taken over.
 *
 * @param address where this launcher will serve, for the sentence that a second one prints
 */
export function takeLaunchLock(file: string, address: string): () => void {
  mkdirSync(dirname(file), { recursive: true });
  const launcher = identify(process.pid);
  if (launcher === undefined) throw new Error('This process cannot identify itself.');
  if (!tryWrite(file, { launcher, address })) {
    const holder = read(file);
    if (holder !== undefined && isAlive(holder.launcher)) {
      throw new Obstacle(
        `Fettle is already running from this folder, at ${holder.address} (process ${String(holder.launcher.pid)}).`,
      );
    }
    rmSync(file, { force: true });
    if (!tryWrite(file, { launcher, address })) {
      throw new Obstacle('Fettle is being started from this folder by another command at this moment.');
    }
  }
  return () => rmSync(file, { force: true });
}

function tryWrite(file: string, holder: Holder): boolean {
  try {
    const handle = openSync(file, 'wx', 0o600);
    writeSync(handle, JSON.stringify(holder));
    closeSync(handle);
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false;
    throw error;
  }
}

function read(file: string): Holder | undefined {
  try {
    return JSON.parse(readFileSync(file, 'utf8')) as Holder;
  } catch {
    // Torn by a kill in mid-write: nobody holds it.
    return undefined;
  }
}
