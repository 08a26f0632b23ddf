import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { join, relative } from 'node:path';

/**
 * A fingerprint of files: their paths and contents, whatever their dates, so that a fresh clone and a worked-in one
 * agree. Folders count with all that is in them except specs, which are never built.
 */
export function sourceHash(root: string, paths: readonly string[]): string {
  const hash = createHash('sha256');
  for (const file of paths.flatMap((path) => filesUnder(join(root, path))).sort()) {
    hash
      .update(`${relative(root, file)}\0`)
      .update(readFileSync(file))
      .update('\0');
  }
  return hash.digest('hex');
}

function filesUnder(path: string): readonly string[] {
  if (!existsSync(path)) return [];
  if (statSync(path).isFile()) return [path];
  return readdirSync(path, { withFileTypes: true })
    .filter((entry) => !entry.name.endsWith('.spec.ts') && entry.name !== 'node_modules')
    .flatMap((entry) => filesUnder(join(path, entry.name)));
}
