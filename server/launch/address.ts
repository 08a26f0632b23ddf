import { setTimeout as pause } from 'node:timers/promises';
import { LOOPBACK, portTrouble } from '@database/cluster/free-port';
import { Obstacle } from '@database/cluster/obstacle';

/** Where the application listens. */
export interface Address {
  readonly host: string;
  readonly port: number;
  /** What a browser on this machine is given. */
  readonly url: string;
}

/** The port when PORT says nothing. */
export const USUAL_PORT = 4300;

const DRAIN_MS = 3_000;

/** Reads PORT and HOST; both have defaults that suit one person at one machine. */
export function readAddress(env: Readonly<Record<string, string | undefined>>): Address {
  const asked = env['PORT'] ?? '';
  const port = asked === '' ? USUAL_PORT : Number(asked);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new Obstacle(`PORT is "${asked}", which is no port: give a whole number from 1 to 65535.`);
  }
  const host = env['HOST'] ?? LOOPBACK;
  // "Every interface" is no address to visit; from this machine loopback is.
  const visited = host === '0.0.0.0' ? LOOPBACK : host === '::' ? '::1' : host;
  return { host, port, url: `http://${visited.includes(':') ? `[${visited}]` : visited}:${String(port)}` };
}

/** Refuses early, before anything is built, a port that cannot be had. */
export async function refuseTakenPort({ host, port }: Address): Promise<void> {
  const trouble = await lastingTrouble(port, host);
  const other = `choose another, for example PORT=${String(port + 1)} npm start`;
  if (trouble === 'taken') throw new Obstacle(`Port ${String(port)} is used by another program: ${other}.`);
  if (trouble === 'forbidden') throw new Obstacle(`Port ${String(port)} may not be used without being root: ${other}.`);
}

/** A server whose launcher was killed is still draining; it deserves a moment. */
async function lastingTrouble(port: number, host: string): Promise<'taken' | 'forbidden' | undefined> {
  const deadline = Date.now() + DRAIN_MS;
  for (;;) {
    const trouble = await portTrouble(port, host);
    if (trouble !== 'taken' || Date.now() > deadline) return trouble;
    await pause(200);
  }
}
