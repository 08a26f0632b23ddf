import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/**
 * A secret of this installation, made at first use and kept in a file that only its owner can read, so that sign-ins
 * and links survive a restart.
 */
export function keptSecret(dataFolder: string, name: string): string {
  const file = join(dataFolder, name);
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('base64url'), { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}
