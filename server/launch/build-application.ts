import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Obstacle } from '@database/cluster/obstacle';
import { buildClient } from './build-client';
import { buildServer } from './build-server';
import { DIST, ROOT } from './places';
import { sourceHash } from './source-hash';
import { say } from './terminal';

/** One half of the application and all that its build depends on. */
interface Half {
  readonly name: 'client' | 'server';
  readonly sources: readonly string[];
  readonly build: () => Promise<void>;
}

const HALVES: readonly Half[] = [
  {
    name: 'server',
    sources: ['server', 'database', 'common', 'tsconfig.json', 'package-lock.json'],
    build: buildServer,
  },
  {
    name: 'client',
    sources: ['client', 'common', 'angular.json', 'tsconfig.json', 'package-lock.json'],
    build: buildClient,
  },
];

/** Builds what has changed since the last build that succeeded. */
export async function buildApplication(): Promise<void> {
  for (const half of HALVES) await buildIfChanged(half);
}

async function buildIfChanged({ name, sources, build }: Half): Promise<void> {
  const stamp = join(DIST, `${name}.stamp`);
  const hash = sourceHash(ROOT, sources);
  const output = join(DIST, name);
  if (existsSync(output) && existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return;
  say(`Building the ${name}.`);
  // Without its stamp a half-written output is never taken for a whole one.
  rmSync(stamp, { force: true });
  rmSync(output, { recursive: true, force: true });
  mkdirSync(DIST, { recursive: true });
  await build();
  if (!existsSync(output)) throw new Obstacle(`The build of the ${name} left nothing in dist/${name}.`);
  writeFileSync(stamp, hash);
}
