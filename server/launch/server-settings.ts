import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { type Address } from './address';
import { DATA_FOLDER, DIST } from './places';
import { keptSecret } from './secret';

/**
 * What the server is told, as its configuration names it. What the caller's environment says already is left alone,
 * except for where the database is.
 */
export function serverSettings(address: Address, databaseUrl: string): Readonly<Record<string, string>> {
  const files = join(DATA_FOLDER, 'files');
  mkdirSync(files, { recursive: true, mode: 0o700 });
  const usual = {
    NODE_ENV: 'production',
    PUBLIC_URL: address.url,
    SESSION_SECRET: keptSecret(DATA_FOLDER, 'session-secret'),
    FILES_FOLDER: files,
    CLIENT_FOLDER: join(DIST, 'client', 'browser'),
  };
  const given = Object.fromEntries(Object.keys(usual).flatMap((name) => entry(name, process.env[name])));
  return { ...usual, ...given, HOST: address.host, PORT: String(address.port), DATABASE_URL: databaseUrl };
}

function entry(name: string, value: string | undefined): readonly (readonly [string, string])[] {
  return value === undefined ? [] : [[name, value]];
}
