import * as fc from 'fast-check';
import type { Span } from './span';
import {
  clipSpans,
  intersectSpans,
  normaliseSpans,
  spanAt,
  subtractSpans,
  totalMinutes,
  uniteSpans,
} from './span-list';

const anySpans = fc.array(
  fc
    .tuple(fc.integer({ min: -50, max: 50 }), fc.integer({ min: -3, max: 20 }))
    .map(([start, length]) => ({ start, end: start + length })),
  { maxLength: 12 },
);

/** The laws are checked minute by minute against sets: slow, and nothing can be hidden in it. */
function minutesOf(spans: readonly Span[]): Set<number> {
  const minutes = new Set<number>();
  for (const { start, end } of spans) {
    for (let minute = start; minute < end; minute += 1) {
      minutes.add(minute);
    }
  }
  return minutes;
}

function sorted(minutes: Iterable<number>): number[] {
  return [...minutes].sort((a, b) => a - b);
}

function expectNormal(spans: readonly Span[]): void {
  spans.forEach((span, i) => {
    expect(span.end).toBeGreaterThan(span.start);
    if (i > 0) {
      expect(span.start).toBeGreaterThan(spans[i - 1].end);
    }
  });
}

describe('span lists', () => {
  it('melts together spans that touch and drops empty ones', () => {
    expect(
      normaliseSpans([
        { start: 5, end: 5 },
        { start: 3, end: 4 },
        { start: 1, end: 3 },
        { start: 8, end: 6 },
      ]),
    ).toEqual([{ start: 1, end: 4 }]);
  });

  it('gives touching spans nothing in common', () => {
    expect(intersectSpans([{ start: 0, end: 5 }], [{ start: 5, end: 9 }])).toEqual([]);
  });

  it('holds the same minutes as the sets it stands for', () => {
    fc.assert(
      fc.property(anySpans, anySpans, (left, right) => {
        const a = normaliseSpans(left);
        const b = normaliseSpans(right);
        const [inA, inB] = [minutesOf(left), minutesOf(right)];
        const union = uniteSpans(left, right);
        const both = intersectSpans(a, b);
        const rest = subtractSpans(a, b);
        [a, b, union, both, rest].forEach(expectNormal);
        expect(sorted(minutesOf(union))).toEqual(sorted(new Set([...inA, ...inB])));
        expect(sorted(minutesOf(both))).toEqual(sorted([...inA].filter((minute) => inB.has(minute))));
        expect(sorted(minutesOf(rest))).toEqual(sorted([...inA].filter((minute) => !inB.has(minute))));
        expect(totalMinutes(both) + totalMinutes(rest)).toBe(totalMinutes(a));
      }),
    );
  });

  it('finds the span of a minute, and none at its end', () => {
    fc.assert(
      fc.property(anySpans, fc.integer({ min: -60, max: 80 }), (spans, minute) => {
        const list = normaliseSpans(spans);
        const found = spanAt(list, minute);
        expect(found !== null).toBe(minutesOf(list).has(minute));
        expect(clipSpans(list, { start: minute, end: minute + 1 })).toHaveLength(found ? 1 : 0);
      }),
    );
  });

  it('clips to nothing where the frame is empty', () => {
    expect(clipSpans([{ start: 0, end: 9 }], { start: 5, end: 5 })).toEqual([]);
  });
});
