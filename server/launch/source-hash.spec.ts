import { mkdirSync, mkdtempSync, renameSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { sourceHash } from './source-hash';

describe('sourceHash', () => {
  let root: string;
  const hash = () => sourceHash(root, ['code', 'lock.json', 'absent']);
  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'fettle-hash-'));
    mkdirSync(join(root, 'code', 'deep'), { recursive: true });
    writeFileSync(join(root, 'code', 'deep', 'a.ts'), 'a');
    writeFileSync(join(root, 'lock.json'), '{}');
  });
  afterEach(() => rmSync(root, { recursive: true }));

  it('does not mind dates, specs and files outside', () => {
    const before = hash();
    utimesSync(join(root, 'code', 'deep', 'a.ts'), 1, 1);
    writeFileSync(join(root, 'code', 'a.spec.ts'), 'spec');
    writeFileSync(join(root, 'other.ts'), 'other');
    expect(hash()).toBe(before);
  });

  it('changes with a content, a name, a new file and a single file of the list', () => {
    const seen = new Set([hash()]);
    writeFileSync(join(root, 'code', 'deep', 'a.ts'), 'b');
    seen.add(hash());
    renameSync(join(root, 'code', 'deep', 'a.ts'), join(root, 'code', 'deep', 'b.ts'));
    seen.add(hash());
    writeFileSync(join(root, 'code', 'c.ts'), '');
    seen.add(hash());
    writeFileSync(join(root, 'lock.json'), '{"a":1}');
    seen.add(hash());
    expect(seen.size).toBe(5);
  });
});
