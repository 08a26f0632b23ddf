import { chownSync, existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type ClusterFolder } from './cluster-folder';
import { freePort, LOOPBACK } from './free-port';
import { lastLine, SETTINGS_FILE } from './make-cluster';
import { Obstacle } from './obstacle';
import { runAs, type ClusterOwner } from './owner';
import { clearKilledServer, runningPostmaster } from './postmaster';
import { type Programs } from './programs';

/** `kept`: survives a power cut. `thrown-away`: trades that for speed, for tests. */
export type Durability = 'kept' | 'thrown-away';

// Replaying the log after a kill can take a while on a slow disk.
const START_SECONDS = 120;
const STOP_SECONDS = 30;
const PORT_ATTEMPTS = 5;

/**
 * Starts the folder's server on a free loopback port and answers with the port; one that already runs there (left
 * by a killed launcher) is taken over as it is.
 */
export async function startServer(
  folder: ClusterFolder,
  owner: ClusterOwner,
  programs: Programs,
  durability: Durability,
): Promise<number> {
  const running = runningPostmaster(folder.data);
  if (running !== undefined) return running.port;
  await clearKilledServer(folder.data);
  for (let attempt = 1; ; attempt++) {
    const port = await freePort();
    const failure = await tryStart(folder, owner, programs, settings(port, durability));
    if (failure === undefined) return port;
    // Somebody took the port between our probe and the server's bind: ask for another.
    if (!/could not bind|address already in use/i.test(failure) || attempt === PORT_ATTEMPTS) {
      throw new Obstacle(`The database in ${folder.path} does not start: ${lastLine(failure)}`);
    }
  }
}

/** Stops the folder's server: open sessions are ended, and if it will not hear, it is stopped at once. */
export async function stopServer(folder: ClusterFolder, owner: ClusterOwner, programs: Programs): Promise<void> {
  if (runningPostmaster(folder.data) === undefined) return;
  const stop = (mode: 'fast' | 'immediate') =>
    runAs(owner, programs.pgCtl, [
      'stop',
      ...['--pgdata', folder.data, '--mode', mode, '--wait', '--timeout', String(STOP_SECONDS), '--silent'],
    ]);
  const { code } = await stop('fast');
  if (code !== 0) await stop('immediate');
}

async function tryStart(
  folder: ClusterFolder,
  owner: ClusterOwner,
  programs: Programs,
  lines: readonly string[],
): Promise<string | undefined> {
  const file = join(folder.data, SETTINGS_FILE);
  writeFileSync(file, lines.map((line) => `${line}\n`).join(''));
  if (owner.kind === 'postgres') chownSync(file, owner.uid, owner.gid);
  if (existsSync(folder.log)) renameSync(folder.log, `${folder.log}.previous`);
  const { code, output } = await runAs(owner, programs.pgCtl, [
    'start',
    ...['--pgdata', folder.data, '--log', folder.log, '--wait', '--timeout', String(START_SECONDS), '--silent'],
  ]);
  if (code === 0) return undefined;
  const log = existsSync(folder.log) ? readFileSync(folder.log, 'utf8') : '';
  // The server's own last words say more than those of the program that started it.
  return [output, log, ...(log.match(/^.*FATAL.*$/gm) ?? [])].join('\n');
}

function settings(port: number, durability: Durability): readonly string[] {
  return [
    `port = ${String(port)}`,
    `listen_addresses = '${LOOPBACK}'`,
    // No socket file: its path may be longer than the system allows, and loopback with a password is enough.
    `unix_socket_directories = ''`,
    `timezone = 'UTC'`,
    `log_timezone = 'UTC'`,
    `log_min_messages = 'warning'`,
    `max_connections = 60`,
    ...(durability === 'thrown-away' ? ['fsync = off', 'synchronous_commit = off', 'full_page_writes = off'] : []),
  ];
}
