import { Obstacle } from '@database/cluster/obstacle';
import { findPrograms, onPath } from '@database/cluster/programs';
import { runErrand } from './child';
import { say } from './terminal';

/** A program that comes from the operating system, not from npm. */
export interface SystemPackage {
  readonly debianName: string;
  /** Why it is wanted, to end the sentence "… is needed". */
  readonly purpose: string;
  isPresent(): boolean;
}

/** The database server. */
export const POSTGRESQL: SystemPackage = {
  debianName: 'postgresql',
  purpose: 'to keep the studio’s data',
  isPresent: () => findPrograms() !== undefined,
};

/** A browser for the browser tests. */
export const CHROMIUM: SystemPackage = {
  debianName: 'chromium',
  purpose: 'to test in a browser',
  isPresent: () => chromiumPath() !== undefined,
};

/** The browser's program: what FETTLE_CHROMIUM names, else what the search path offers. */
export function chromiumPath(): string | undefined {
  return process.env['FETTLE_CHROMIUM'] ?? onPath('chromium') ?? onPath('chromium-browser');
}

const APT_LIMIT_MS = 10 * 60_000;
const APT_OPTIONS = ['-q', '-o', 'DPkg::Lock::Timeout=120', '-o', 'Acquire::Retries=3'];

/**
 * Installs from Debian's packages what is missing. Only root can; anybody else is told in one sentence what to
 * install.
 */
export async function ensureSystemPackages(wanted: readonly SystemPackage[]): Promise<void> {
  const missing = wanted.filter((one) => !one.isPresent());
  if (missing.length === 0) return;
  const names = missing.map((one) => one.debianName);
  const manual = `install it with "apt-get install ${names.join(' ')}" as root and run this command again`;
  const needed = missing.map((one) => `${one.debianName} is needed ${one.purpose}`).join(' and ');
  if (process.getuid?.() !== 0 || onPath('apt-get') === undefined) throw new Obstacle(`${capital(needed)}: ${manual}.`);
  say(`Installing ${names.join(' and ')} from Debian's packages, once.`);
  // An installation that was interrupted before is brought to its end first; otherwise nothing happens here.
  await fromDebian('dpkg', '--configure', '-a');
  await fromDebian('apt-get', ...APT_OPTIONS, 'update');
  await fromDebian('apt-get', ...APT_OPTIONS, 'install', '-y', '--no-install-recommends', ...names);
  const still = missing.find((one) => !one.isPresent());
  if (still !== undefined) throw new Obstacle(`${capital(still.debianName)} could not be installed: ${manual}.`);
}

async function fromDebian(program: string, ...args: readonly string[]): Promise<void> {
  const { code } = await runErrand({
    program,
    args,
    env: { DEBIAN_FRONTEND: 'noninteractive' },
    stdio: ['ignore', process.stderr, process.stderr],
    limitMs: APT_LIMIT_MS,
  });
  if (code !== 0) throw new Obstacle(`${program} failed: see what it says above, and run this command again.`);
}

function capital(sentence: string): string {
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}
