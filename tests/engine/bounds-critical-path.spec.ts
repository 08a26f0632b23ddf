import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { criticalPath } from '@common/planning/bounds/critical-path';
import type { Problem, Stage } from '@common/planning';
import { instanceProblem } from '../bench/instances/instance-problem';
import { isInstanceFile, readInstance } from '../bench/instances/read-instance';
import { sharedInstancesFor } from '../bench/shared-data';
import { timedProblem } from './support/timed-problems';

function timesOf(problem: Problem, stageId: string) {
  const path = criticalPath(problem);
  if (path.kind !== 'found') throw new Error('There should be a critical path.');
  const times = path.stages.get(stageId);
  if (times === undefined) throw new Error(`There should be times of ${stageId}.`);
  return times;
}

/** A stage changed in some parts. */
const withStage = (problem: Problem, id: string, change: Partial<Stage>): Problem => ({
  ...problem,
  stages: problem.stages.map((stage) => (stage.id === id ? { ...stage, ...change } : stage)),
});

describe('the critical path', () => {
  // Common practice, no source: reckoned by hand, forwards and backwards.
  //   s0(3) → s1(4) → s3(2);  s0 → s2(1) → s3
  const net = timedProblem({
    durations: [3, 4, 1, 2],
    gaps: [
      [0, 1, 3, null],
      [0, 2, 3, null],
      [1, 3, 4, null],
      [2, 3, 1, null],
    ],
    end: 100,
  });

  it('gives early and late times, total and free slack', () => {
    const path = criticalPath(net);
    expect(path).toMatchObject({ kind: 'found', lengthMinutes: 9, criticalStageIds: ['s0', 's1', 's3'] });
    expect(timesOf(net, 's2')).toEqual({
      stageId: 's2',
      earliestStart: 3,
      earliestFinish: 4,
      latestStart: 6,
      latestFinish: 7,
      totalSlackMinutes: 3,
      freeSlackMinutes: 3,
    });
  });

  it('pulls a stage along by a maximum gap', () => {
    // s2 may start at most 2 after s1: reckoned by hand, s1 waits for s0 so that s2, which s0 holds until 10, is near.
    const pulled = timedProblem({
      durations: [10, 1, 1],
      gaps: [
        [0, 2, 10, null],
        [1, 2, 0, 2],
      ],
      end: 100,
    });
    expect(timesOf(pulled, 's1').earliestStart).toBe(8);
    expect(timesOf(pulled, 's1').latestStart).toBe(10);
  });

  it('names the cycle of gaps that nothing can satisfy', () => {
    const tight = timedProblem({
      durations: [1, 1, 1],
      gaps: [
        [0, 1, 5, null],
        [1, 2, 5, null],
        [0, 2, 0, 8],
      ],
      end: 100,
    });
    const path = criticalPath(tight);
    if (path.kind !== 'cycle') throw new Error('There should be a cycle.');
    expect(path.excessMinutes).toBe(2);
    expect(path.steps.map((step) => [step.cause.kind, step.lagMinutes])).toEqual(
      expect.arrayContaining([
        ['min-gap', 5],
        ['min-gap', 5],
        ['max-gap', -8],
      ]),
    );
    expect(path.steps).toHaveLength(3);
  });

  it('takes the work through the hours of those who can do it, and the dwell by the clock', () => {
    // Two shifts of 4 h; 6 h of work begun at once end 2 h into the second shift; then 10 h of dwell.
    const base = timedProblem({ durations: [360], holds: [[true]], needs: [[1]], end: 10_000 });
    const shifts = [
      { start: 0, end: 240 },
      { start: 1440, end: 1680 },
    ];
    const dwell = { minutes: 600, advance: {}, attendedMinutes: 0, window: null };
    const studio = withStage({ ...base, makers: base.makers.map((maker) => ({ ...maker, shifts })) }, 's0', {
      continuity: 'shifts',
      dwell,
    });
    expect(timesOf(studio, 's0')).toMatchObject({ earliestStart: 0, earliestFinish: 1440 + 120 + 600 });
    // As a session it does not fit any shift.
    expect(timesOf(withStage(studio, 's0', { continuity: 'session' }), 's0').earliestStart).toBe(Infinity);
  });

  it('slows a dwell in the cold', () => {
    const base = timedProblem({ durations: [60], end: 10_000 });
    const dwell = { minutes: 100, advance: { room: 'night' }, attendedMinutes: 0, window: null };
    const advances = [{ id: 'night', from: [0, 100, 200], permille: [1000, 500, 0] }];
    const cold = withStage({ ...base, advances }, 's0', { dwell });
    // 40 minutes at full rate until 100, then 50 of worth in 100 minutes, then nothing any more.
    expect(timesOf(cold, 's0').earliestFinish).toBe(Infinity);
    const mild = { ...cold, advances: [{ ...advances[0], permille: [1000, 500, 250] }] };
    expect(timesOf(mild, 's0').earliestFinish).toBe(200 + 40);
  });
});

const shared = sharedInstancesFor('published critical paths');
(shared === null ? describe.skip : describe)('published critical paths', () => {
  // PSPLIB (Kolisch & Sprecher 1996): the MPM-Time of each file's header.
  it.each(['j30', 'j60', 'j120'])('%s', (set) => {
    const directory = join(shared ?? '', 'psplib', set);
    for (const name of readdirSync(directory).filter(isInstanceFile)) {
      const file = join(directory, name);
      const path = criticalPath(instanceProblem(readInstance(file)));
      expect({ name, length: path.kind === 'found' ? path.lengthMinutes : null }).toEqual({
        name,
        length: mpmTime(file),
      });
    }
  });
});

function mpmTime(file: string): number {
  const lines = readFileSync(file, 'utf8').split(/\r?\n/);
  const titles = lines.findIndex((line) => line.includes('MPM-Time'));
  return Number(lines[titles + 1].trim().split(/\s+/).at(-1));
}
