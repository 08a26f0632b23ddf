import fc from 'fast-check';
import { check } from '@common/planning/check/check';
import { levelExactly } from '@common/planning/exact/level-exactly';
import { findConflict } from '@common/planning/gaps/conflict';
import { bruteForce } from './support/brute-force';
import { timedProblem, type TimedSketch } from './support/timed-problems';
import { baySketches, crewSketches } from './support/timed-sketches';

const freely = { seed: 1, maxSchedules: 100_000, shouldStop: () => false };

describe('exact search', () => {
  it.each([
    ['with bays, minimum and maximum gaps', baySketches],
    ['with crews of several crafts', crewSketches],
  ] as const)('finds what trying every start finds, %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary, (sketch) => {
        const problem = timedProblem(sketch);
        const result = levelExactly(problem, freely);
        const best = bruteForce(sketch);
        if (result === null) throw new Error('The sketch should be a timed problem.');
        expect(result.stop).toBe('proven-best');
        if (best === null) {
          expect(result.bound.unplaced).toBe(1);
          return;
        }
        expect(check(problem, result.plan)).toEqual([]);
        expect(result.objective.finishSum).toBe(best);
        expect(result.bound.finishSum).toBe(best);
      }),
      { numRuns: 300 },
    );
  });

  it('gives the same plan for the same problem and limit', () => {
    const sketch: TimedSketch = {
      durations: [3, 2, 4, 1, 3, 2],
      bays: [{ capacity: 3, demands: [2, 1, 2, 1, 2, 3] }],
      end: 30,
    };
    const once = levelExactly(timedProblem(sketch), { ...freely, maxSchedules: 3 });
    const again = levelExactly(timedProblem(sketch), { ...freely, maxSchedules: 3 });
    expect(again).toEqual(once);
  });

  it('goes on from a known plan and never comes back with a worse one', () => {
    const problem = timedProblem({ durations: [2, 2], bays: [{ capacity: 1, demands: [1, 1] }], end: 20 });
    const known = {
      placements: [0, 10].map((start, k) => ({
        stageId: `s${k}`,
        work: [{ start, end: start + 2 }],
        crew: [],
        bayIds: ['b0'],
        dwellEnd: start + 2,
      })),
    };
    expect(levelExactly(problem, freely, known)?.objective.finishSum).toBe(4);
    expect(
      levelExactly(problem, { ...freely, shouldStop: () => true }, known)?.objective.finishSum,
    ).toBeLessThanOrEqual(12);
  });

  it('leaves a studio with shifts to others', () => {
    const problem = timedProblem({ durations: [2], holds: [[true]], needs: [[1]], end: 20 });
    const makers = problem.makers.map((maker) => ({ ...maker, shifts: [{ start: 0, end: 8 }] }));
    expect(levelExactly({ ...problem, makers }, freely)).toBeNull();
  });
});

describe('the smallest conflict', () => {
  const budget = { maxConflicts: 1000, shouldStop: () => false };

  it('is the two stages that a maximum gap keeps together and a bay keeps apart', () => {
    const problem = timedProblem({
      durations: [4, 4, 4, 1],
      gaps: [
        [0, 1, 0, 2],
        [2, 3, 4, null],
      ],
      bays: [
        { capacity: 2, demands: [1, 2, 1, 1] },
        { capacity: 9, demands: [1, 1, 1, 1] },
      ],
      end: 40,
    });
    expect(findConflict(problem, budget)).toEqual({
      kind: 'collision',
      stageIds: ['s0', 's1'],
      bayIds: ['b0'],
      craftIds: [],
      links: [problem.links[0]],
    });
  });

  it('is the chain that ends after its limit', () => {
    const problem = timedProblem({ durations: [5, 5], gaps: [[0, 1, 7, null]], end: 40 });
    const stages = problem.stages.map((stage) => (stage.id === 's1' ? { ...stage, latestEnd: 10 } : stage));
    expect(findConflict({ ...problem, stages }, budget)).toMatchObject({
      kind: 'too-late',
      firstStageId: 's0',
      stageId: 's1',
      limit: 'latest',
      notAfter: 10,
      excessMinutes: 2,
    });
  });

  it('has nothing left to leave out', () => {
    fc.assert(
      fc.property(baySketches, (sketch) => {
        const conflict = findConflict(timedProblem(sketch), budget);
        if (conflict?.kind !== 'collision') return;
        for (const id of conflict.stageIds) {
          const spared = sketch.bays?.map((bay) => ({
            ...bay,
            demands: bay.demands.map((units, k) => (conflict.stageIds.includes(`s${k}`) && `s${k}` !== id ? units : 0)),
          }));
          expect(bruteForce({ ...sketch, bays: spared })).not.toBeNull();
        }
      }),
      { numRuns: 150 },
    );
  });

  it('is nothing where there is a plan', () => {
    expect(findConflict(timedProblem({ durations: [1, 1], end: 9 }), budget)).toBeNull();
  });
});
