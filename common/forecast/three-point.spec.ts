import { normalQuantile, normalShareBelow } from './normal';
import { pertQuantile } from './pert-quantile';
import { betaPertMoments, betaPertShapes, pertMoments, type ThreePoint, triangularMoments } from './three-point';

const estimate = (low: number, likely: number, high: number): ThreePoint => ({ low, likely, high });

// Moments of four estimates; formulas of PERT Summary Report Phase 1, 1958, and of the beta and triangular distributions,
// figures recomputed by script.
const TABLE = [
  { of: estimate(2, 5, 8), mean: 5, variance: 1, shapes: [3, 3], beta: 1.2857, triangular: [5, 1.5] },
  { of: estimate(1, 1, 7), mean: 2, variance: 1, shapes: [1, 5], beta: 0.7143, triangular: [3, 2] },
  { of: estimate(1, 2, 9), mean: 3, variance: 1.7778, shapes: [1.5, 4.5], beta: 1.7143, triangular: [4, 3.1667] },
  { of: estimate(5, 8, 17), mean: 9, variance: 4, shapes: [2, 4], beta: 4.5714, triangular: [10, 6.5] },
];

describe('an estimate by three points', () => {
  it.each(TABLE)('has the published moments for $of', ({ of, mean, variance, shapes, beta, triangular }) => {
    expect(pertMoments(of).mean).toBeCloseTo(mean, 4);
    expect(pertMoments(of).variance).toBeCloseTo(variance, 4);
    expect(betaPertMoments(of).variance).toBeCloseTo(beta, 4);
    expect(betaPertShapes(of)).toEqual(shapes);
    expect(triangularMoments(of).mean).toBeCloseTo(triangular[0], 4);
    expect(triangularMoments(of).variance).toBeCloseTo(triangular[1], 4);
  });

  it.each(TABLE)('is drawn with the mean and variance of its beta distribution for $of', ({ of }) => {
    const draws = 4000;
    const values = Array.from({ length: draws }, (_, k) => pertQuantile(of, (k + 0.5) / draws));
    const mean = values.reduce((sum, value) => sum + value, 0) / draws;
    const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / draws;
    expect(mean).toBeCloseTo(betaPertMoments(of).mean, 2);
    expect(variance).toBeCloseTo(betaPertMoments(of).variance, 1);
    expect(Math.min(...values)).toBeGreaterThanOrEqual(of.low);
    expect(Math.max(...values)).toBeLessThanOrEqual(of.high);
  });

  it('takes an estimate without width for certain', () => {
    expect(pertQuantile(estimate(5, 5, 5), 0.99)).toBe(5);
  });
});

interface Activity {
  readonly of: ThreePoint;
  readonly after: readonly string[];
}

/** Expected finish and its variance along the critical path of expected durations. */
function finishOf(network: Readonly<Record<string, Activity>>): { mean: number; variance: number } {
  const done = new Map<string, { mean: number; variance: number }>();
  for (const [name, { of, after }] of Object.entries(network)) {
    const before = after.map((one) => done.get(one) ?? { mean: NaN, variance: NaN });
    const last = before.reduce((a, b) => (b.mean > a.mean ? b : a), { mean: 0, variance: 0 });
    const own = pertMoments(of);
    done.set(name, { mean: last.mean + own.mean, variance: last.variance + own.variance });
  }
  return [...done.values()].reduce((a, b) => (b.mean > a.mean ? b : a));
}

const after = (low: number, likely: number, high: number, ...names: string[]): Activity => ({
  of: estimate(low, likely, high),
  after: names,
});

describe('the PERT calculation of published networks', () => {
  // pmknowledgecenter.be, PERT article; probabilities recomputed with the exact normal distribution.
  it('finds 15 for the six-activity network', () => {
    const finish = finishOf({
      A: after(2, 5, 8),
      B: after(1, 2, 9, 'A'),
      C: after(0.25, 0.5, 3.75, 'A'),
      D: after(1, 1, 7, 'B'),
      E: after(1, 2, 9, 'B', 'C'),
      F: after(1, 3, 11, 'D', 'E'),
    });
    expect(finish.mean).toBeCloseTo(15, 6);
    expect(finish.variance).toBeCloseTo(7.3333, 4);
    const share = (by: number): number => normalShareBelow((by - finish.mean) / Math.sqrt(finish.variance));
    expect(share(16)).toBeCloseTo(0.644, 3);
    expect(share(17)).toBeCloseTo(0.7699, 3);
    expect(share(20)).toBeCloseTo(0.9676, 3);
  });

  // flylib.com/books/en/3.287.1.117: P(finish by 28) = 0.9633 with z rounded to 1.79.
  it('gives .963 for the four critical activities', () => {
    const finish = finishOf({
      a: after(5, 8, 17),
      b: after(3, 5, 7, 'a'),
      c: after(4, 6, 8, 'b'),
      d: after(3, 4, 5, 'c'),
    });
    expect(finish.mean).toBeCloseTo(24, 6);
    expect(finish.variance).toBeCloseTo(5, 6);
    expect(normalShareBelow((28 - 24) / Math.sqrt(5))).toBeCloseTo(0.96318, 4);
  });

  // coursehero.com file 6151556: published expected duration 20.83.
  it('finds 20.83 for the arrow network', () => {
    const finish = finishOf({
      '1-2': after(2, 5, 8),
      '1-3': after(1, 4, 7),
      '2-3': after(0, 0, 0, '1-2'),
      '2-4': after(2, 4, 6, '1-2'),
      '2-6': after(5, 7, 12, '1-2'),
      '3-4': after(3, 5, 10, '1-3', '2-3'),
      '3-5': after(3, 6, 9, '1-3', '2-3'),
      '4-5': after(4, 6, 10, '2-4', '3-4'),
      '4-6': after(2, 5, 8, '2-4', '3-4'),
      '5-6': after(2, 4, 6, '3-5', '4-5'),
    });
    expect(finish.mean).toBeCloseTo(20.83, 2);
    expect(finish.variance).toBeCloseTo(3.8056, 4);
    expect(normalShareBelow((22 - finish.mean) / Math.sqrt(finish.variance))).toBeCloseTo(0.7251, 3);
    expect(normalShareBelow((24 - finish.mean) / Math.sqrt(finish.variance))).toBeCloseTo(0.9477, 3);
  });

  // Inputs docslib.org/doc/13905693 (after Levin, Rubin et al. 1989, p. 605); results recomputed.
  it('finds 42.83 for the thirteen-activity network', () => {
    const finish = finishOf({
      A: after(2, 3, 4),
      B: after(9, 12, 15, 'A'),
      C: after(4, 9, 18),
      D: after(1, 1, 1, 'B'),
      E: after(1, 2, 3, 'C', 'D'),
      F: after(1, 1, 1, 'E'),
      G: after(5, 6, 9, 'F'),
      H: after(2, 5, 10, 'F'),
      I: after(1, 1, 1, 'F'),
      J: after(2, 3, 5, 'G'),
      K: after(8, 10, 14, 'H', 'I', 'J'),
      L: after(2, 2, 2, 'K'),
      M: after(2, 2, 2, 'L'),
    });
    expect(finish.mean).toBeCloseTo(42.8333, 4);
    expect(finish.variance).toBeCloseTo(2.9167, 4);
    expect(normalShareBelow((41 - finish.mean) / Math.sqrt(finish.variance))).toBeCloseTo(0.1415, 3);
    expect(normalShareBelow((43 - finish.mean) / Math.sqrt(finish.variance))).toBeCloseTo(0.5389, 3);
  });

  // A textbook classic, from memory: expected 15, variance 3.1111, .7157 by 16 with z rounded to .57.
  it('finds 15 for the eight-activity network', () => {
    const finish = finishOf({
      A: after(1, 2, 3),
      B: after(2, 3, 4),
      C: after(1, 2, 3, 'A'),
      D: after(2, 4, 6, 'A', 'B'),
      E: after(1, 4, 7, 'C'),
      F: after(1, 2, 9, 'C'),
      G: after(3, 4, 11, 'D', 'E'),
      H: after(1, 2, 3, 'F', 'G'),
    });
    expect(finish.mean).toBeCloseTo(15, 6);
    expect(finish.variance).toBeCloseTo(3.1111, 4);
    expect(normalShareBelow((16 - 15) / Math.sqrt(finish.variance))).toBeCloseTo(0.7146, 3);
    expect(15 + normalQuantile(0.99) * Math.sqrt(finish.variance)).toBeCloseTo(19.1, 1);
  });
});
