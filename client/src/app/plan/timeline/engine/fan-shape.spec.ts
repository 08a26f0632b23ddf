import fc from 'fast-check';
import { fanShape } from './fan-shape';
import { makeTimeScale } from './time-scale';

const scale = makeTimeScale({ start: 0, end: 100_000 }, [], { litPx: 6, unlitPx: 6 });
const fans = fc
  .array(fc.integer({ min: 0, max: 90_000 }), { minLength: 41, maxLength: 41 })
  .map((instants) => instants.sort((a, b) => a - b));

describe('a date fan', () => {
  it('reaches from P10 to P90, its marks inside it and in order', () => {
    fc.assert(
      fc.property(fans, (fan) => {
        const { x, width, p50, p80 } = fanShape(fan, scale, 20);
        expect(x).toBeCloseTo(fan[4] / 10, 6);
        expect(x + width).toBeGreaterThanOrEqual(fan[36] / 10 - 1e-6);
        expect(p50).toBeGreaterThanOrEqual(-1e-6);
        expect(p80).toBeGreaterThanOrEqual(p50);
        expect(p80).toBeLessThanOrEqual(width + 1e-6);
      }),
    );
  });

  it('stays in its box and reaches its top where most draws end', () => {
    const fan = Array.from({ length: 41 }, (_, k) => 1000 + Math.round(400 * Math.sinh((k - 20) / 8)));
    const heights = [...fanShape(fan, scale, 20).path.matchAll(/L[\d.-]+ ([\d.-]+)/g)].map(([, y]) => Number(y));
    expect(Math.min(...heights)).toBe(0);
    expect(Math.max(...heights)).toBeLessThanOrEqual(20);
    expect(heights.indexOf(0)).toBeGreaterThan(8);
    expect(heights.indexOf(0)).toBeLessThan(24);
  });

  it('is still seen where nothing is uncertain', () => {
    expect(fanShape(new Array<number>(41).fill(500), scale, 20).width).toBe(3);
  });
});
