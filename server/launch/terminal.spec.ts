import { writeFileSync } from 'node:fs';
import { Obstacle } from '@database/cluster/obstacle';
import { obstacleIn } from './terminal';

describe('obstacleIn', () => {
  it('passes on the sentence of an obstacle', () => {
    expect(obstacleIn(new Obstacle('Do this.'))).toBe('Do this.');
  });

  it('names the file that may not be written', () => {
    const refused = Object.assign(new Error('EACCES'), { code: 'EACCES', path: '/srv/fettle/launcher.json' });
    expect(obstacleIn(refused)).toMatch(/^\/srv\/fettle\/launcher\.json may not be written by this user/);
  });

  it('knows a full disk by the error that Linux gives for one', () => {
    // Source: full(4), "Writes to /dev/full fail with an ENOSPC error".
    let full: unknown;
    try {
      writeFileSync('/dev/full', 'anything');
    } catch (error) {
      full = error;
    }
    expect(obstacleIn(full)).toContain('The disk is full');
  });

  it('leaves the program’s own faults to be shown whole', () => {
    expect(obstacleIn(new TypeError('x is not a function'))).toBeUndefined();
  });
});
