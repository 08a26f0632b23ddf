import { join } from 'node:path';
import { type Address } from './address';
import { DATA_FOLDER, DIST } from './places';
import { keptSecret } from './secret';

/**
 * What the server is told, as its configuration names it. What the caller's environment says already is left alone,
 * except for where the database is.
 */
export function serverSettings(address: Address, databaseUrl: string): Readonly<Record<string, string>> {
  const usual = {
    NODE_ENV: 'production',
    // The terminal belongs to the person who typed the command: only what needs them.
    LOG_LEVEL: 'warn',
    SESSION_SECRET: keptSecret(DATA_FOLDER, 'session-secret'),
    CLIENT_FOLDER: join(DIST, 'client', 'browser'),
  };
  const given = Object.fromEntries(Object.keys(usual).flatMap((name) => entry(name, process.env[name])));
  return { ...usual, ...given, HOST: address.host, PORT: String(address.port), DATABASE_URL: databaseUrl };
}

function entry(name: string, value: string | undefined): readonly (readonly [string, string])[] {
  return value === undefined ? [] : [[name, value]];
}
