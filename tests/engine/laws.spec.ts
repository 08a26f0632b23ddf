import {
  check,
  compareObjectives,
  drivingChain,
  explain,
  fingerprint,
  level,
  levelWithinDates,
  type LevelResult,
  measure,
  type Problem,
  replaceAfterMove,
  validate,
} from '@common/planning';
import fc from 'fast-check';
import { randomStudio, type StudioSize } from './support/random-studio';

/**
 * Laws that hold for every studio, tried on invented ones. Common practice (property-based testing, Claessen & Hughes 2000), no
 * source for the laws themselves.
 */
const sizes = (tricky: boolean): fc.Arbitrary<StudioSize> =>
  fc.record({
    seed: fc.nat(1_000_000),
    productions: fc.integer({ min: 1, max: 3 }),
    piecesPerProduction: fc.integer({ min: 1, max: 2 }),
    makers: fc.integer({ min: 3, max: 6 }),
    weeks: fc.constant(14),
    tricky: fc.constant(tricky),
  });
const studios = (tricky: boolean): fc.Arbitrary<Problem> => sizes(tricky).map(randomStudio);
const run = (problem: Problem, maxSchedules: number, seed = 1): LevelResult =>
  level(problem, { seed, maxSchedules, shouldStop: () => false });
const settled = { seed: 20_260_105, endOnFailure: true };

describe('levelling', () => {
  it('keeps every rule wherever a studio leaves room for it', () => {
    fc.assert(
      fc.property(studios(false), fc.integer({ min: 1, max: 12 }), (problem, schedules) => {
        fc.pre(validate(problem).length === 0);
        expect(run(problem, schedules).unmet.filter((one) => one.rule !== 'key-date')).toEqual([]);
      }),
      { ...settled, numRuns: 150 },
    );
  });

  it('gives every stage a place or says which has none, whatever is asked', () => {
    fc.assert(
      fc.property(studios(true), fc.integer({ min: 1, max: 8 }), (problem, schedules) => {
        const { plan, unmet } = run(problem, schedules);
        const missing = new Set(unmet.filter((one) => one.rule === 'placed-once').flatMap((one) => one.stageIds));
        const placed = new Set(plan.placements.map((one) => one.stageId));
        for (const stage of problem.stages) expect(placed.has(stage.id)).toBe(!missing.has(stage.id));
        expect(unmet).toEqual(check(problem, plan));
      }),
      { ...settled, numRuns: 150 },
    );
  });

  it('gives the same plan for the same problem, seed and schedules', () => {
    fc.assert(
      fc.property(studios(true), fc.nat(1000), (problem, seed) => {
        expect(run(structuredClone(problem), 30, seed)).toEqual(run(problem, 30, seed));
      }),
      { ...settled, numRuns: 25 },
    );
  });

  it('does not care in which order things are listed', () => {
    fc.assert(
      fc.property(studios(true), fc.nat(), (problem, salt) => {
        const shuffled = shuffle(problem, salt);
        expect(run(shuffled, 20).objective).toEqual(run(problem, 20).objective);
        expect(fingerprint(shuffled)).toBe(fingerprint(problem));
      }),
      { ...settled, numRuns: 25 },
    );
  });

  it('is never worse for more schedules', () => {
    fc.assert(
      fc.property(studios(true), (problem) => {
        const start = run(problem, 1);
        const end = run(problem, 60);
        expect(
          compareObjectives(end.objective, start.objective, { ...problem.weights, unevenness: 0, earliness: 0 }),
        ).toBeLessThanOrEqual(0);
      }),
      { ...settled, numRuns: 40 },
    );
  });

  it('stops when told, with a plan all the same', () => {
    fc.assert(
      fc.property(studios(false), fc.integer({ min: 1, max: 40 }), (problem, patience) => {
        let asked = 0;
        const result = level(problem, { seed: 1, maxSchedules: 1_000_000, shouldStop: () => ++asked > patience });
        expect(result.stop).toBe('cancelled');
        expect(result.plan.placements.length).toBe(problem.stages.length);
      }),
      { ...settled, numRuns: 40 },
    );
  });
});

describe('evening the load', () => {
  it('only ever makes it more even, and breaks nothing', () => {
    fc.assert(
      fc.property(studios(false), (problem) => {
        fc.pre(validate(problem).length === 0);
        const { plan } = run(problem, 1);
        const before = measure(problem, plan, check(problem, plan));
        const after = levelWithinDates(problem, plan, { seed: 1, maxSchedules: 4, shouldStop: () => false });
        expect(after.objective.unevenness).toBeLessThanOrEqual(before.unevenness);
        expect(after.objective.hardLateness).toBeLessThanOrEqual(before.hardLateness);
        expect(after.objective.wishedLateness).toBeLessThanOrEqual(before.wishedLateness);
        expect(after.objective.costMinor).toBeLessThanOrEqual(before.costMinor);
        expect(after.unmet.filter((one) => one.rule !== 'key-date')).toEqual([]);
      }),
      { ...settled, numRuns: 60 },
    );
  });
});

describe('explaining', () => {
  it('gives every stage a reason that holds until its start', () => {
    fc.assert(
      fc.property(studios(true), (problem) => {
        const { plan } = run(problem, 3);
        const starts = new Map(plan.placements.map((one) => [one.stageId, one.work[0].start]));
        const told = explain(problem, plan);
        expect(told.map((one) => one.stageId).sort()).toEqual([...starts.keys()].sort());
        for (const { stageId, reasons } of told) {
          expect(reasons.length).toBeGreaterThan(0);
          const isFree = problem.stages.find((one) => one.id === stageId)?.latestEnd === null;
          if (isFree) expect(reasons[0].until).toBeGreaterThanOrEqual(starts.get(stageId) ?? 0);
        }
      }),
      { ...settled, numRuns: 60 },
    );
  });

  it('leads from every date back to something that waits for nothing, each step letting go no later than the one after starts', () => {
    fc.assert(
      fc.property(studios(false), (problem) => {
        fc.pre(validate(problem).length === 0);
        const { plan } = run(problem, 2);
        const starts = new Map(plan.placements.map((one) => [one.stageId, one.work[0].start]));
        for (const date of problem.keyDates) {
          const chain = drivingChain(problem, plan, date.id);
          expect(chain.steps.length).toBeGreaterThan(0);
          for (const step of chain.steps) expect(step.because.until).toBeLessThanOrEqual(starts.get(step.stageId) ?? 0);
          expect(['horizon', 'earliest']).toContain(chain.steps[chain.steps.length - 1].because.kind);
        }
      }),
      { ...settled, numRuns: 50 },
    );
  });
});

describe('a move by hand', () => {
  it('holds the stage where it was put and breaks no rule that does not touch it', () => {
    fc.assert(
      fc.property(studios(false), fc.nat(), fc.integer({ min: 0, max: 6 }), (problem, which, days) => {
        fc.pre(validate(problem).length === 0);
        const { plan } = run(problem, 1);
        const moved = plan.placements[which % plan.placements.length];
        const start = moved.work[0].start + days * 1440;
        const move = {
          stageId: moved.stageId,
          start,
          makerIds: moved.crew.map((one) => one.makerId),
          bayIds: moved.bayIds,
        };
        const result = replaceAfterMove(problem, plan, move);
        expect(result.plan.placements.find((one) => one.stageId === moved.stageId)?.work[0].start).toBe(start);
        const others = result.unmet.filter(
          (one) => !['key-date', 'limits', 'horizon'].includes(one.rule) && !one.stageIds.includes(moved.stageId),
        );
        expect(others).toEqual([]);
        expect(replaceAfterMove(problem, plan, move)).toEqual(result);
      }),
      { ...settled, numRuns: 150 },
    );
  });

  it('changes nothing where nothing moves', () => {
    fc.assert(
      fc.property(studios(false), fc.nat(), (problem, which) => {
        fc.pre(validate(problem).length === 0);
        const { plan } = run(problem, 1);
        const still = plan.placements[which % plan.placements.length];
        const makerIds = still.crew.map((one) => one.makerId);
        const result = replaceAfterMove(problem, plan, {
          stageId: still.stageId,
          start: still.work[0].start,
          makerIds,
          bayIds: still.bayIds,
        });
        expect(result.moved).toEqual([]);
      }),
      { ...settled, numRuns: 60 },
    );
  });
});

function shuffle(problem: Problem, salt: number): Problem {
  const mix = <T>(items: readonly T[]): T[] =>
    items
      .map((item, i) => ({ item, key: Math.imul(i + 1, 0x9e3779b1 ^ salt) >>> 0 }))
      .sort((a, b) => a.key - b.key)
      .map(({ item }) => item);
  return {
    ...problem,
    makers: mix(problem.makers),
    bays: mix(problem.bays),
    stages: mix(problem.stages),
    links: mix(problem.links),
    keyDates: mix(problem.keyDates),
    advances: mix(problem.advances),
  };
}
