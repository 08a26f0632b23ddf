import type { Span } from '@common/time/span';
import fc from 'fast-check';
import { at, idOf, planFixture } from '../../testing/plan-fixture';
import { magnetsOf, nudgeStart, type SnapField, snapStart, workableSpans } from './snap';

const spans = fc
  .array(fc.tuple(fc.integer({ min: 30, max: 900 }), fc.integer({ min: 30, max: 900 })), {
    minLength: 1,
    maxLength: 12,
  })
  .map((pairs) => {
    let end = 0;
    return pairs.map(([gap, length]): Span => {
      const start = end + gap;
      end = start + length;
      return { start, end };
    });
  });
const fields = fc.record<SnapField>({
  earliest: fc.constant(0),
  workable: spans,
  magnets: fc.array(fc.integer({ min: 0, max: 9000 }), { maxLength: 4 }),
  reachMinutes: fc.integer({ min: 0, max: 60 }),
});
const inSpans = (start: number, workable: readonly Span[] | null): boolean =>
  workable?.some((span) => start >= span.start && start < span.end) ?? true;

describe('snapping', () => {
  it('puts a stage down only where somebody could begin', () => {
    fc.assert(
      fc.property(fields, fc.integer({ min: -500, max: 20_000 }), (field, minute) => {
        expect(inSpans(snapStart(minute, field), field.workable)).toBe(true);
      }),
    );
  });

  it('leaves a snapped start where it is', () => {
    fc.assert(
      fc.property(fields, fc.integer({ min: 0, max: 20_000 }), (field, minute) => {
        const still = { ...field, magnets: [] };
        const first = snapStart(minute, still);
        const again = snapStart(first, still);
        expect(Math.abs(again - first)).toBeLessThan(15);
        expect(snapStart(again, still)).toBe(snapStart(snapStart(again, still), still));
      }),
    );
  });

  it('nudges later, earlier and back without leaving working time', () => {
    fc.assert(
      fc.property(
        fields,
        fc.integer({ min: 0, max: 20_000 }),
        fc.integer({ min: -8, max: 8 }),
        (field, minute, steps) => {
          const start = snapStart(minute, field);
          const nudged = nudgeStart(start, steps, field);
          expect(inSpans(nudged, field.workable)).toBe(true);
          expect(Math.sign(nudged - start) * Math.sign(steps)).toBeGreaterThanOrEqual(0);
        },
      ),
    );
  });

  it('catches on the end of a cure that is near, and not on one that is far', () => {
    const field: SnapField = { earliest: 0, workable: null, magnets: [607], reachMinutes: 20 };
    expect(snapStart(595, field)).toBe(607);
    expect(snapStart(560, field)).toBe(555);
  });

  it('goes over the night to the next morning and back', () => {
    const view = planFixture();
    const workable = workableSpans(view.problem, view.problem.stages[0], [idOf('maker', 0)]);
    const field: SnapField = { earliest: at(0, 0), workable, magnets: [], reachMinutes: 0 };
    expect(nudgeStart(at(0, 16, 45), 1, field)).toBe(at(1, 8));
    expect(nudgeStart(at(1, 8), -1, field)).toBe(at(0, 16, 45));
    expect(snapStart(at(5, 12), field)).toBe(at(4, 16, 45));
  });

  it('knows what a stage waits for', () => {
    const view = planFixture();
    const laminated = view.plan.placements.find((placement) => placement.stageId === idOf('stage', 2));
    expect(magnetsOf(view.problem, view.plan, idOf('stage', 3))).toEqual([laminated?.dwellEnd]);
  });
});
