// The first step of every npm script, from a clone where nothing is installed yet:
//   node server/launch/bootstrap.mjs [--bundled] SCRIPT.ts [ARGUMENTS…]
// sees that Node.js and the packages are right, then runs the script and ends as it ends. `--bundled` is for programs
// whose speed is the point: they run from one plain file, without a loader's help at run time.
import { spawn } from 'node:child_process';
import { mkdirSync, renameSync, writeFileSync } from 'node:fs';
import { constants } from 'node:os';
import { basename, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { installPackages, nodeTrouble, packagesFit } from './fresh-clone.cjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

const trouble = nodeTrouble(process.versions.node) ?? (packagesFit(root) ? undefined : installPackages(root));
if (trouble === undefined) {
  const [first = '', ...rest] = process.argv.slice(2);
  run(first === '--bundled' ? await bundled(rest) : ['--import', 'tsx', first, ...rest]);
} else {
  console.error(trouble);
  process.exitCode = 1;
}

/** @param {string[]} args for Node.js */
function run(args) {
  const child = spawn(process.execPath, args, { cwd: root, stdio: 'inherit' });
  // Whoever is told to end tells the script, and stays until it has. From a terminal the script hears Ctrl-C twice.
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => child.kill(signal));
  }
  child.once('exit', (code, signal) => {
    process.exitCode = code ?? 128 + (signal === null ? 0 : constants.signals[signal]);
  });
}

/**
 * Bundles a script to dist/bench, as deep below the root as tests/bench, so that what it finds beside itself it still
 * finds. The file is put in place whole, since several of these may start at once.
 *
 * @param {string[]} script
 */
async function bundled([source = '', ...args]) {
  const { build } = await import('esbuild');
  const file = join(root, 'dist', 'bench', `${basename(source, '.ts')}.cjs`);
  const { outputFiles } = await build({
    absWorkingDir: root,
    entryPoints: [source],
    bundle: true,
    platform: 'node',
    format: 'cjs',
    target: 'node20',
    packages: 'external',
    tsconfig: join(root, 'tsconfig.json'),
    logLevel: 'warning',
    write: false,
  });
  const unfinished = `${file}.${String(process.pid)}`;
  mkdirSync(dirname(file), { recursive: true });
  writeFileSync(unfinished, outputFiles[0]?.contents ?? '');
  renameSync(unfinished, file);
  return [file, ...args];
}
