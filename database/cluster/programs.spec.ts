import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { findPrograms } from './programs';

describe('findPrograms', () => {
  let debian: string;
  const install = (major: string, files: readonly string[]) => {
    mkdirSync(join(debian, major, 'bin'), { recursive: true });
    for (const file of files) writeFileSync(join(debian, major, 'bin', file), '');
  };
  const server = ['initdb', 'pg_ctl', 'postgres'];
  beforeEach(() => (debian = mkdtempSync(join(tmpdir(), 'fettle-debian-'))));
  afterEach(() => rmSync(debian, { recursive: true }));

  it('finds nothing on a machine without PostgreSQL', () => {
    expect(findPrograms(undefined, join(debian, 'absent'))).toBeUndefined();
    expect(findPrograms(undefined, debian)).toBeUndefined();
  });

  it('takes the newest whole server by number, not by spelling', () => {
    install('15', server);
    install('100', server);
    install('101', ['psql']);
    expect(findPrograms(undefined, debian)?.major).toBe(100);
  });

  it('takes the asked version and no other', () => {
    install('15', server);
    install('17', server);
    expect(findPrograms(15, debian)?.pgCtl).toBe(join(debian, '15', 'bin', 'pg_ctl'));
    expect(findPrograms(16, debian)).toBeUndefined();
  });

  it('passes over a version that is too old', () => {
    install('13', server);
    expect(findPrograms(undefined, debian)).toBeUndefined();
  });
});
