import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { level } from '@common/planning';
import { lowerBound } from '@common/planning/bounds/lower-bound';
import { readBestKnown } from '../bench/instances/best-known';
import { instanceProblem } from '../bench/instances/instance-problem';
import { isInstanceFile, readInstance } from '../bench/instances/read-instance';
import { sharedInstancesFor } from '../bench/shared-data';
import { bruteForce } from './support/brute-force';
import { randomStudio } from './support/random-studio';
import { timedProblem } from './support/timed-problems';
import { baySketches, crewSketches } from './support/timed-sketches';

describe('the lower bound', () => {
  it.each([
    ['bays and gaps', baySketches],
    ['crews', crewSketches],
  ])('is never above the best plan there is, with %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary, (sketch) => {
        const bound = lowerBound(timedProblem(sketch));
        const best = bruteForce(sketch);
        if (best === null) return;
        expect(bound.unplaced).toBe(0);
        expect(bound.finishSum).toBeLessThanOrEqual(best);
      }),
      { numRuns: 300 },
    );
  });

  it('counts the work that shares a bay, with what comes before and after it', () => {
    // Common practice, no source: three stages of 4 in a bay for one, each after 2 and before 3: 2 + 12 + 3.
    const problem = timedProblem({
      durations: [2, 4, 4, 4, 3],
      gaps: [1, 2, 3].flatMap((k) => [[0, k, 2, null] as const, [k, 4, 4, null] as const]),
      bays: [{ capacity: 1, demands: [0, 1, 1, 1, 0] }],
      end: 100,
    });
    expect(lowerBound(problem).finishSum).toBe(17);
  });

  it('counts shared-out work against the hours of those who can do it', () => {
    // Common practice, no source: 20 h of one craft, two makers of usual pace, 4 h each a day: 16 h by the end of the second
    // day, the last 4 h take both of them 2 h of the third.
    const base = timedProblem({
      durations: [60, 60, 60, 60],
      holds: [[true], [true]],
      needs: [[1], [1], [1], [1]],
      end: 20_000,
    });
    const shifts = [0, 1, 2, 3].map((day) => ({ start: day * 1440 + 480, end: day * 1440 + 720 }));
    const problem = {
      ...base,
      makers: base.makers.map((maker) => ({ ...maker, shifts })),
      stages: base.stages.map((stage) => ({
        ...stage,
        effort: { kind: 'person-minutes' as const, minutes: 300 },
        continuity: 'free' as const,
      })),
    };
    expect(lowerBound(problem).finishSum).toBe(2 * 1440 + 480 + 120);
    const date = {
      id: 'd',
      productionId: 'production',
      at: 2880,
      strength: 'hard' as const,
      weight: 3,
      stageIds: ['s0', 's1', 's2', 's3'],
    };
    expect(lowerBound({ ...problem, keyDates: [date] }).hardLateness).toBe(3 * 600);
  });

  it.each([1, 2, 3, 4, 5, 6])('holds for what levelling finds in an invented studio (%i)', (seed) => {
    const problem = randomStudio({ seed, productions: 3, piecesPerProduction: 2, makers: 4, weeks: 12, tricky: false });
    const { objective } = level(problem, { seed, maxSchedules: 60, shouldStop: () => false });
    const bound = lowerBound(problem);
    if (objective.unplaced > 0) return;
    expect(bound.hardLateness).toBeLessThanOrEqual(objective.hardLateness);
    expect(bound.wishedLateness).toBeLessThanOrEqual(objective.wishedLateness);
    expect(bound.finishSum).toBeLessThanOrEqual(objective.finishSum);
    expect(bound.finishSum).toBeGreaterThan(0);
  });
});

const shared = sharedInstancesFor('bounds of published sets');
(shared === null ? describe.skip : describe)('bounds of published sets', () => {
  // Best known makespans as the tables beside the sets give them.
  it.each(['psplib/j30', 'psplib/j120', 'rcpsp-max/ubo50', 'multi-skill/set-1a'])('%s', (set) => {
    const directory = join(shared ?? '', set);
    const known = readBestKnown(directory);
    for (const name of readdirSync(directory).filter(isInstanceFile).slice(0, 120)) {
      const best = known.get(name)?.best;
      if (typeof best !== 'number') continue;
      const bound = lowerBound(instanceProblem(readInstance(join(directory, name))));
      expect({ name, unplaced: bound.unplaced, isTrue: (bound.finishSum ?? 0) <= best }).toEqual({
        name,
        unplaced: 0,
        isTrue: true,
      });
    }
  });
});
