import { spawn, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { Obstacle } from '@database/cluster/obstacle';
import { DIST, ROOT } from './places';

/** The built server, running. */
export interface ServerProcess {
  /** Resolves with its exit code when it ends, asked or not. */
  readonly ended: Promise<number>;
  /** Asks it to finish what it is doing and end; past the deadline it is killed. */
  stop(): Promise<void>;
}

const READY_LIMIT_MS = 60_000;
// Longer than the server's own deadline for draining.
const STOP_LIMIT_MS = 20_000;

/** Starts the built server and waits until it and its database answer at `url`. */
export async function startBuiltServer(url: string, env: Readonly<Record<string, string>>): Promise<ServerProcess> {
  const child = spawn(
    process.execPath,
    ['--enable-source-maps', '--require', join(__dirname, 'follow-launcher.cjs'), join(DIST, 'server', 'main.js')],
    // A group of its own: Ctrl-C in the terminal comes to us, and we stop things in order.
    { cwd: ROOT, env: { ...process.env, ...env }, stdio: ['ignore', 'inherit', 'inherit', 'ipc'], detached: true },
  );
  const ended = new Promise<number>((resolve) => child.once('exit', (code) => resolve(code ?? 1)));
  const server = { ended, stop: () => stop(child, ended) };
  const outcome = await Promise.race([untilAnswering(url), ended]);
  if (outcome === 'ready') return server;
  await server.stop();
  throw new Obstacle(
    outcome === 'silent'
      ? `The server did not answer at ${url} within a minute and was stopped.`
      : 'The server ended while starting: see what it says above.',
  );
}

async function untilAnswering(url: string): Promise<'ready' | 'silent'> {
  const deadline = Date.now() + READY_LIMIT_MS;
  while (Date.now() < deadline) {
    const answer = fetch(`${url}/api/ready`, { signal: AbortSignal.timeout(2_000) });
    const isReady = await answer.then(
      (response) => response.ok,
      () => false,
    );
    if (isReady) return 'ready';
    await pause(100);
  }
  return 'silent';
}

async function stop(child: ChildProcess, ended: Promise<number>): Promise<void> {
  child.kill('SIGTERM');
  const kill = setTimeout(() => child.kill('SIGKILL'), STOP_LIMIT_MS);
  await ended;
  clearTimeout(kill);
}
