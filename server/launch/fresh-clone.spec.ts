import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { nodeTrouble, packagesFit } from './fresh-clone.cjs';

describe('nodeTrouble', () => {
  // Source of the lines: the `engines` field of @angular/core 21, ^20.19.0 || ^22.12.0 || >=24.0.0.
  it.each(['20.19.0', '20.20.2', '22.12.0', '24.0.0', '26.1.0'])('accepts %s', (version) => {
    expect(nodeTrouble(version)).toBeUndefined();
  });

  it.each(['18.20.0', '20.18.3', '21.7.0', '22.11.0', '23.5.0'])(
    'refuses %s in a sentence that names it',
    (version) => {
      expect(nodeTrouble(version)).toContain(version);
    },
  );
});

describe('packagesFit', () => {
  const root = mkdtempSync(join(tmpdir(), 'fettle-clone-'));
  const asked = {
    '': {},
    'node_modules/a': { version: '1.0.0' },
    'node_modules/b': { version: '2.0.0', optional: true },
  };
  const write = (path: string, packages: object) => writeFileSync(join(root, path), JSON.stringify({ packages }));
  afterAll(() => rmSync(root, { recursive: true }));
  beforeEach(() => {
    rmSync(join(root, 'node_modules'), { recursive: true, force: true });
    write('package-lock.json', asked);
  });

  it('misses everything in a fresh clone', () => {
    expect(packagesFit(root)).toBe(false);
  });

  it('misses everything after an interrupted installation, which leaves no record', () => {
    mkdirSync(join(root, 'node_modules', 'a'), { recursive: true });
    expect(packagesFit(root)).toBe(false);
  });

  it('is content with what the lock asks for, less the optional packages of other systems', () => {
    mkdirSync(join(root, 'node_modules'));
    write('node_modules/.package-lock.json', { 'node_modules/a': { version: '1.0.0' } });
    expect(packagesFit(root)).toBe(true);
  });

  it('notices that the lock asks for another version now', () => {
    mkdirSync(join(root, 'node_modules'));
    write('node_modules/.package-lock.json', { 'node_modules/a': { version: '0.9.0' } });
    expect(packagesFit(root)).toBe(false);
  });
});
