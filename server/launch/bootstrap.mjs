// The first step of every npm script, from a clone where nothing is installed yet:
//   node server/launch/bootstrap.mjs SCRIPT.ts [ARGUMENTS…]
// sees that Node.js and the packages are right, then runs the script and ends as it ends.
import { spawn } from 'node:child_process';
import { constants } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { installPackages, nodeTrouble, packagesFit } from './fresh-clone.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

const trouble = nodeTrouble(process.versions.node) ?? (packagesFit(root) ? undefined : installPackages(root));
if (trouble === undefined) {
  run(process.argv.slice(2));
} else {
  console.error(trouble);
  process.exitCode = 1;
}

/** @param {string[]} script */
function run(script) {
  const child = spawn(process.execPath, ['--import', 'tsx', ...script], { cwd: root, stdio: 'inherit' });
  // Whoever is told to end tells the script, and stays until it has. From a terminal the script hears Ctrl-C twice.
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => child.kill(signal));
  }
  child.once('exit', (code, signal) => {
    process.exitCode = code ?? 128 + (signal === null ? 0 : constants.signals[signal]);
  });
}
