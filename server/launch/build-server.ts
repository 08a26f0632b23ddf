import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { build, type BuildOptions } from 'esbuild';
import { DIST, ROOT } from './places';

const COMMON: BuildOptions = {
  outdir: join(DIST, 'server'),
  absWorkingDir: ROOT,
  bundle: true,
  platform: 'node',
  format: 'cjs',
  target: 'node20',
  // Several packages look for files beside their own.
  packages: 'external',
  sourcemap: true,
  tsconfig: join(ROOT, 'tsconfig.json'),
  logLevel: 'warning',
};

/**
 * Bundles the server into dist/server: `main.js`, `migrate.js`, and each worker thread's file beside them, under its
 * own name.
 */
export async function buildServer(): Promise<void> {
  // Class names carry meaning for the entities; engine code in workers is spared the calls that keep them.
  await build({
    ...COMMON,
    entryPoints: { main: join(ROOT, 'server/main.ts'), migrate: join(ROOT, 'database/migrate.ts') },
    keepNames: true,
  });
  await build({ ...COMMON, entryPoints: workerEntries() });
}

function workerEntries(): Record<string, string> {
  const files = readdirSync(join(ROOT, 'server'), { recursive: true, encoding: 'utf8' });
  const workers = files.filter((file) => /(^|[/-])worker\.ts$/.test(file));
  return Object.fromEntries(workers.map((file) => [basename(file, '.ts'), join(ROOT, 'server', file)]));
}
