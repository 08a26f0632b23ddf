import fc from 'fast-check';
import { check } from '@common/planning/check/check';
import { levelExactly } from '@common/planning/exact/level-exactly';
import { findConflict } from '@common/planning/gaps/conflict';
import { timedProblem, type TimedSketch } from './support/timed-problems';

const freely = { seed: 1, maxSchedules: 100_000, shouldStop: () => false };

/** The least makespan by trying every start of every stage; null where no plan exists. */
function bruteForce(sketch: TimedSketch): number | null {
  const n = sketch.durations.length;
  const starts = new Array<number>(n).fill(0);
  let best: number | null = null;
  const visit = (stage: number): void => {
    if (stage === n) {
      const makespan = Math.max(0, ...starts.map((start, k) => start + sketch.durations[k]));
      if ((best === null || makespan < best) && crewsExist(sketch, starts)) best = makespan;
      return;
    }
    for (let at = 0; at + sketch.durations[stage] <= sketch.end; at++) {
      starts[stage] = at;
      if (fits(sketch, starts, stage)) visit(stage + 1);
    }
  };
  visit(0);
  return best;
}

function fits(sketch: TimedSketch, starts: readonly number[], last: number): boolean {
  for (const [from, to, least, most] of sketch.gaps ?? []) {
    if (Math.max(from, to) !== last) continue;
    const gap = starts[to] - starts[from];
    if (gap < least || (most !== null && gap > most)) return false;
  }
  return (sketch.bays ?? []).every(({ capacity, demands }) => {
    for (let at = starts[last]; at < starts[last] + sketch.durations[last]; at++) {
      let used = 0;
      for (let k = 0; k <= last; k++) if (starts[k] <= at && at < starts[k] + sketch.durations[k]) used += demands[k];
      if (used > capacity) return false;
    }
    return true;
  });
}

function crewsExist(sketch: TimedSketch, starts: readonly number[]): boolean {
  const { holds, needs, durations } = sketch;
  if (holds === undefined || needs === undefined) return true;
  const seats = needs.flatMap((row, stage) =>
    row.flatMap((count, craft) => Array.from({ length: durations[stage] > 0 ? count : 0 }, () => ({ stage, craft }))),
  );
  const taken: { stage: number; maker: number }[] = [];
  const overlap = (a: number, b: number): boolean =>
    a === b || (starts[a] < starts[b] + durations[b] && starts[b] < starts[a] + durations[a]);
  const seat = (k: number): boolean => {
    if (k === seats.length) return true;
    const { stage, craft } = seats[k];
    for (let maker = 0; maker < holds.length; maker++) {
      if (!holds[maker][craft] || taken.some((other) => other.maker === maker && overlap(other.stage, stage))) continue;
      taken.push({ stage, maker });
      if (seat(k + 1)) return true;
      taken.pop();
    }
    return false;
  };
  return seat(0);
}

const gap = (n: number) =>
  fc
    .tuple(fc.nat(n - 1), fc.nat(n - 1), fc.integer({ min: -3, max: 4 }), fc.option(fc.nat(4)))
    .filter(([from, to]) => from !== to)
    .map(([from, to, least, slack]): [number, number, number, number | null] => [
      from,
      to,
      least,
      slack === null ? null : least + slack,
    ]);

const sketches = fc.integer({ min: 2, max: 4 }).chain((n) =>
  fc.record({
    durations: fc.array(fc.nat(3), { minLength: n, maxLength: n }),
    gaps: fc.array(gap(n), { maxLength: 4 }),
    bays: fc.array(
      fc.record({
        capacity: fc.integer({ min: 1, max: 3 }),
        demands: fc.array(fc.nat(3), { minLength: n, maxLength: n }),
      }),
      { maxLength: 2 },
    ),
    end: fc.constant(9),
  }),
);

const crewSketches = fc.integer({ min: 2, max: 4 }).chain((n) =>
  fc.record({
    durations: fc.array(fc.nat(3), { minLength: n, maxLength: n }),
    gaps: fc.array(gap(n), { maxLength: 2 }),
    holds: fc.array(fc.tuple(fc.boolean(), fc.boolean()), { minLength: 1, maxLength: 3 }),
    needs: fc.array(fc.tuple(fc.nat(1), fc.nat(2)), { minLength: n, maxLength: n }),
    end: fc.constant(9),
  }),
);

describe('exact search', () => {
  it.each([
    ['with bays, minimum and maximum gaps', sketches],
    ['with crews of several crafts', crewSketches],
  ] as const)('finds what trying every start finds, %s', (_, arbitrary) => {
    fc.assert(
      fc.property(arbitrary as fc.Arbitrary<TimedSketch>, (sketch) => {
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
      fc.property(sketches as fc.Arbitrary<TimedSketch>, (sketch) => {
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
