// Plain Node without dependencies: this runs before anything is installed.
const { spawnSync } = require('node:child_process');
const { existsSync, readFileSync } = require('node:fs');
const { join } = require('node:path');

/**
 * Why this Node.js is too old or of an unsuitable line, in one sentence, or undefined when it will do.
 * The lines are those that the client's compiler supports.
 *
 * @param {string} version such as `20.19.0`
 * @returns {string | undefined}
 */
function nodeTrouble(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  if ((major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major >= 24) return undefined;
  return `Fettle needs Node.js 20.19 or later of line 20, 22.12 or later of line 22, or 24 and later; this is ${version}.`;
}

/**
 * Whether what is installed is what the lock asks for. npm writes its own record at the end of an installation,
 * so one that was interrupted counts as missing.
 *
 * @param {string} root the project's folder
 */
function packagesFit(root) {
  const installed = readLock(join(root, 'node_modules', '.package-lock.json'));
  const asked = readLock(join(root, 'package-lock.json'));
  return Object.entries(asked).every(
    // Optional packages are those of other systems as well.
    ([path, entry]) => path === '' || entry.optional === true || installed[path]?.version === entry.version,
  );
}

/**
 * Installs exactly what the lock says, talking to stderr alone, so that a program's own output stays clean.
 *
 * @param {string} root the project's folder
 * @returns {string | undefined} one sentence when it failed
 */
function installPackages(root) {
  console.error('Installing the packages that package-lock.json names; this takes a minute or two, once.');
  const args = ['ci', '--ignore-scripts', '--no-fund', '--no-audit', '--loglevel=error'];
  const npm = process.env['npm_execpath'];
  const [program, given] = npm === undefined ? ['npm', args] : [process.execPath, [npm, ...args]];
  const { status } = spawnSync(program, given, { cwd: root, stdio: ['ignore', process.stderr, process.stderr] });
  if (status === 0) return undefined;
  return 'The packages could not be installed: see what npm says above, check the network and run the command again.';
}

/**
 * @param {string} file
 * @returns {Record<string, { version?: string, optional?: boolean }>}
 */
function readLock(file) {
  if (!existsSync(file)) return {};
  try {
    /** @type {unknown} */
    const lock = JSON.parse(readFileSync(file, 'utf8'));
    return /** @type {{ packages: Record<string, { version?: string, optional?: boolean }> }} */ (lock).packages;
  } catch {
    return {};
  }
}

module.exports = { nodeTrouble, packagesFit, installPackages };
