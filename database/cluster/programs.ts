import { existsSync, readdirSync } from 'node:fs';
import { delimiter, join } from 'node:path';

/** One installed PostgreSQL server. */
export interface Programs {
  readonly major: number;
  readonly initdb: string;
  readonly pgCtl: string;
}

/** Before this version the settings and SQL used here are not all there. */
export const OLDEST_MAJOR = 14;

const DEBIAN_ROOT = '/usr/lib/postgresql';

/**
 * The PostgreSQL server to use: of the asked major version when one is asked for (a cluster's files belong to one
 * major version), else the newest that is recent enough. Undefined when there is none.
 */
export function findPrograms(major?: number, debianRoot: string = DEBIAN_ROOT): Programs | undefined {
  const installed = installedMajors(debianRoot).filter((version) => version >= OLDEST_MAJOR);
  const chosen = major === undefined ? Math.max(...installed) : installed.find((version) => version === major);
  if (chosen === undefined || !Number.isFinite(chosen)) return undefined;
  const folder = join(debianRoot, String(chosen), 'bin');
  return { major: chosen, initdb: join(folder, 'initdb'), pgCtl: join(folder, 'pg_ctl') };
}

/** Where a program is on the search path, or undefined. */
export function onPath(program: string, path: string = process.env['PATH'] ?? ''): string | undefined {
  return path
    .split(delimiter)
    .filter((folder) => folder !== '')
    .map((folder) => join(folder, program))
    .find((file) => existsSync(file));
}

function installedMajors(debianRoot: string): readonly number[] {
  if (!existsSync(debianRoot)) return [];
  return readdirSync(debianRoot)
    .filter((name) => /^\d+$/.test(name))
    .filter((name) => ['initdb', 'pg_ctl', 'postgres'].every((file) => existsSync(join(debianRoot, name, 'bin', file))))
    .map(Number);
}
