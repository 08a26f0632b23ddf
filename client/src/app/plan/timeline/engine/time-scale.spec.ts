import type { Span } from '@common/time/span';
import fc from 'fast-check';
import { makeTimeScale, minuteAt, xOf } from './time-scale';

/** Sorted disjoint spans built from gaps and lengths, so that no filter can run for ever. */
const litSpans = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 3000 }), fc.integer({ min: 1, max: 3000 })), { maxLength: 30 })
  .map((pairs) => {
    let end = -2000;
    return pairs.map(([gap, length]): Span => {
      const start = end + gap;
      end = start + length;
      return { start, end };
    });
  });
const hourWidths = fc.record({
  litPx: fc.double({ min: 1, max: 96, noNaN: true }),
  unlitPx: fc.double({ min: 0.2, max: 96, noNaN: true }),
});
const scales = fc
  .tuple(fc.integer({ min: 1, max: 60_000 }), litSpans, hourWidths)
  .map(([length, lit, widths]) => makeTimeScale({ start: 0, end: length }, lit, widths));

describe('time scale', () => {
  it('gives every minute back, inside its frame and outside', () => {
    fc.assert(
      fc.property(scales, fc.integer({ min: -90_000, max: 150_000 }), (scale, at) => {
        expect(minuteAt(scale, xOf(scale, at))).toBe(at);
      }),
    );
  });

  it('never puts a later minute further left', () => {
    fc.assert(
      fc.property(
        scales,
        fc.integer({ min: -5000, max: 70_000 }),
        fc.integer({ min: 1, max: 5000 }),
        (scale, at, later) => {
          expect(xOf(scale, at + later)).toBeGreaterThan(xOf(scale, at));
        },
      ),
    );
  });

  it('draws lit hours and folded hours at their own widths', () => {
    const scale = makeTimeScale({ start: 0, end: 1440 }, [{ start: 480, end: 1020 }], { litPx: 10, unlitPx: 2 });
    expect(xOf(scale, 480)).toBeCloseTo(16);
    expect(xOf(scale, 1020) - xOf(scale, 480)).toBeCloseTo(90);
    expect(scale.width).toBeCloseTo(16 + 90 + 14);
  });

  it('keeps a width for an empty frame', () => {
    const scale = makeTimeScale({ start: 100, end: 100 }, [], { litPx: 10, unlitPx: 10 });
    expect(scale.width).toBeGreaterThan(0);
    expect(minuteAt(scale, xOf(scale, 100))).toBe(100);
  });
});
