import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { sep } from 'node:path/posix';

/** The project's folder. */
export const ROOT = join(__dirname, '..', '..');

const NOT_OURS = new Set(['node_modules', 'dist', 'coverage', 'screenshots', '.git', '.fettle', '.angular']);

/** Every file that is committed or about to be, by its path from the root, in order. */
export function projectFiles(folder = ''): readonly string[] {
  return readdirSync(join(ROOT, folder), { withFileTypes: true })
    .filter((entry) => !NOT_OURS.has(entry.name))
    .flatMap((entry) => {
      const path = folder === '' ? entry.name : `${folder}${sep}${entry.name}`;
      return entry.isDirectory() ? projectFiles(path) : [path];
    })
    .sort();
}

/** The program's own files: TypeScript and plain modules of the five source folders. */
export function sourceFiles(): readonly string[] {
  return projectFiles().filter((path) => /^(client|server|common|database|tests)\/.*\.(ts|mjs|cjs)$/.test(path));
}

/** A file's text. */
export function read(path: string): string {
  return readFileSync(join(ROOT, path), 'utf8');
}

/** Whether a file only tests others: specs, harnesses, fakes, and all of tests/. */
export function isTest(path: string): boolean {
  return path.startsWith('tests/') || /(\.spec|\.fake|-harness|-fixture)\.ts$|\/testing\//.test(path);
}
