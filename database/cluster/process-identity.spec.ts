import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { identify, isAlive } from './process-identity';

describe('process identity', () => {
  it('knows a living process from its beginning to its end', async () => {
    const child = spawn(process.execPath, ['-e', 'setTimeout(() => 0, 60_000)']);
    await once(child, 'spawn');
    const identity = identify(child.pid ?? 0);
    if (identity === undefined) throw new Error('The child has no identity.');
    expect(isAlive(identity)).toBe(true);
    child.kill('SIGKILL');
    await once(child, 'exit');
    expect(isAlive(identity)).toBe(false);
  });

  it('does not take another process of the same number for it', () => {
    expect(isAlive({ pid: process.pid, birth: 'another boot/1' })).toBe(false);
  });

  it('knows nothing of a number that nobody has', () => {
    // Linux hands out numbers below 2^22; source: proc(5), /proc/sys/kernel/pid_max.
    expect(identify(2 ** 22 + 1)).toBeUndefined();
  });
});
