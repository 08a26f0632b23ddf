import fc from 'fast-check';
import type { TimedSketch } from './timed-problems';

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

/** Little timed problems with bays, minimum and maximum gaps; some have no plan. */
export const baySketches: fc.Arbitrary<TimedSketch> = fc.integer({ min: 2, max: 4 }).chain((n) =>
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

/** Little timed problems with makers of two crafts; some have no plan. */
export const crewSketches: fc.Arbitrary<TimedSketch> = fc.integer({ min: 2, max: 4 }).chain((n) =>
  fc.record({
    durations: fc.array(fc.nat(3), { minLength: n, maxLength: n }),
    gaps: fc.array(gap(n), { maxLength: 2 }),
    holds: fc.array(fc.tuple(fc.boolean(), fc.boolean()), { minLength: 1, maxLength: 3 }),
    needs: fc.array(fc.tuple(fc.nat(1), fc.nat(2)), { minLength: n, maxLength: n }),
    end: fc.constant(9),
  }),
);
