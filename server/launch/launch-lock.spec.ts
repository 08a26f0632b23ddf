import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { takeLaunchLock } from './launch-lock';

describe('takeLaunchLock', () => {
  const folder = mkdtempSync(join(tmpdir(), 'fettle-lock-'));
  const file = join(folder, 'launcher.json');
  afterEach(() => rmSync(file, { force: true }));
  afterAll(() => rmSync(folder, { recursive: true }));

  it('refuses a second launcher, saying where the first one serves', () => {
    takeLaunchLock(file, 'http://127.0.0.1:4300');
    expect(() => takeLaunchLock(file, 'http://127.0.0.1:4301')).toThrow(
      `already running from this folder, at http://127.0.0.1:4300 (process ${String(process.pid)})`,
    );
  });

  it('is free again once given back', () => {
    takeLaunchLock(file, 'a')();
    expect(existsSync(file)).toBe(false);
    expect(() => takeLaunchLock(file, 'b')).not.toThrow();
  });

  it('takes over from a launcher that was killed, even when its number lives on in another program', () => {
    writeFileSync(file, JSON.stringify({ launcher: { pid: process.pid, birth: 'another boot/1' }, address: 'old' }));
    takeLaunchLock(file, 'new');
    expect(JSON.parse(readFileSync(file, 'utf8'))).toMatchObject({ address: 'new' });
  });

  it('takes over a lock that was torn while being written', () => {
    writeFileSync(file, '{"launcher":');
    expect(() => takeLaunchLock(file, 'new')).not.toThrow();
  });
});
