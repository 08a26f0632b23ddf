import fc from 'fast-check';
import { cratePath, flagPath, hatchPath, tagPath, tapePath, ticketPath } from './shapes';

const numbersOf = (path: string): number[] => (path.match(/-?\d+(\.\d+)?/g) ?? []).map(Number);
const sizes = fc.tuple(fc.double({ min: 1, max: 4000, noNaN: true }), fc.double({ min: 8, max: 60, noNaN: true }));

function strokesOf(path: string): { x1: number; x2: number; y1: number; y2: number }[] {
  return [...path.matchAll(/M(\S+) (\S+)L(\S+) (\S+?)(?=M|$)/g)].map((match) => {
    const [x1, y1, x2, y2] = match.slice(1).map(Number);
    return { x1, y1, x2, y2 };
  });
}

describe('a hatch', () => {
  it('stays inside its box', () => {
    fc.assert(
      fc.property(sizes, ([width, height]) => {
        for (const { x1, x2, y1, y2 } of strokesOf(hatchPath(width, height))) {
          expect(Math.min(x1, x2)).toBeGreaterThanOrEqual(0);
          expect(Math.max(x1, x2)).toBeLessThanOrEqual(width + 0.01);
          expect(Math.min(y1, y2)).toBeGreaterThanOrEqual(-0.01);
          expect(Math.max(y1, y2)).toBeLessThanOrEqual(height + 0.01);
        }
      }),
    );
  });

  it('closes from wet to firm', () => {
    const starts = strokesOf(hatchPath(400, 24))
      .map((stroke) => stroke.x1)
      .filter((x) => x > 0);
    const gaps = starts.slice(1).map((x, index) => x - starts[index]);
    gaps.slice(1).forEach((gap, index) => expect(gap).toBeLessThanOrEqual(gaps[index] + 0.02));
    expect(gaps[0]).toBeGreaterThan(2.5 * gaps[gaps.length - 1]);
  });

  it('draws no more than is looked at', () => {
    const all = strokesOf(hatchPath(6000, 24)).length;
    const some = strokesOf(hatchPath(6000, 24, { from: 1000, to: 1200 }));
    expect(some.length).toBeGreaterThan(10);
    expect(some.length).toBeLessThan(all / 10);
  });
});

describe('outlines', () => {
  it('stay inside their boxes', () => {
    fc.assert(
      fc.property(sizes, ([width, height]) => {
        const outlines = [
          tapePath(width, height, { start: true, end: true }),
          tagPath(width, height),
          ticketPath(width, height),
          cratePath(width, height),
        ];
        for (const path of outlines) {
          expect(Math.min(...numbersOf(path))).toBeGreaterThanOrEqual(-0.01);
          expect(Math.max(...numbersOf(path))).toBeLessThanOrEqual(Math.max(width, height) + 0.01);
        }
      }),
    );
  });

  it('tell hard from wished and late from in time', () => {
    const outlines = (['hard', 'wished'] as const).flatMap((strength) =>
      [true, false].map((late) => flagPath(120, 22, { strength, late })),
    );
    expect(new Set(outlines).size).toBe(4);
  });

  it('are straight where tape is cut and toothed where it is torn', () => {
    const cut = tapePath(80, 26, { start: false, end: false });
    expect(cut.match(/L/g)).toHaveLength(4);
    expect(tapePath(80, 26, { start: false, end: true }).match(/L/g)?.length).toBeGreaterThan(10);
  });
});
