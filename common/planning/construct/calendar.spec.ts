import fc from 'fast-check';
import type { Span } from '../../time/span';
import { Calendar } from './calendar';

const ORIGIN = 1000;
const HORIZON = 3000;
const minutes = Array.from({ length: HORIZON }, (_, minute) => minute);

/** Disjoint spans in order, which touch or leave gaps, before, over and after the horizon. */
const spans: fc.Arbitrary<Span[]> = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 400 }), fc.integer({ min: 1, max: 700 })), { maxLength: 14 })
  .map((steps) => {
    let at = ORIGIN - 500;
    return steps.map(([gap, length]) => {
      const start = at + gap;
      at = start + length;
      return { start, end: at };
    });
  });

const isIn = (list: readonly Span[], instant: number): boolean =>
  list.some(({ start, end }) => start <= instant && instant < end);

/** Whether a minute from the horizon's start is in a calendar, as the engine asks it. */
function has(calendar: Calendar, minute: number): boolean {
  const i = calendar.indexAt(minute);
  return i < calendar.count && calendar.starts[i] <= minute;
}

/** The first minute from an instant on that is in a calendar; -1 where there is none. */
function nextIn(calendar: Calendar, minute: number): number {
  const i = calendar.indexAt(minute);
  return i < calendar.count ? Math.max(minute, calendar.starts[i]) : -1;
}

describe('a calendar', () => {
  it('has the minutes of its spans but for those taken away, and finds the next of them from any minute', () => {
    fc.assert(
      fc.property(spans, spans, (there, away) => {
        const whole = Calendar.of(there, ORIGIN, HORIZON);
        const less = whole.less(away, ORIGIN, HORIZON);
        const expected = minutes.map((minute) => isIn(there, ORIGIN + minute));
        const left = minutes.map((minute) => expected[minute] && !isIn(away, ORIGIN + minute));
        expect(minutes.map((minute) => has(whole, minute))).toEqual(expected);
        expect(minutes.map((minute) => has(less, minute))).toEqual(left);
        expect(minutes.map((minute) => nextIn(less, minute))).toEqual(
          minutes.map((minute) => left.indexOf(true, minute)),
        );
      }),
      { numRuns: 60 },
    );
  });

  it('is left as it was by what is taken from it', () => {
    const whole = Calendar.of([{ start: ORIGIN, end: ORIGIN + 480 }], ORIGIN, HORIZON);
    expect(whole.less([{ start: ORIGIN, end: ORIGIN + 480 }], ORIGIN, HORIZON).count).toBe(0);
    expect(whole.covers(0, 480)).toBe(true);
  });
});
