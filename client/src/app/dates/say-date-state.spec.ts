import fc from 'fast-check';
import { marginPlace, sayDateMargin } from './say-date-state';

describe('a date’s margin', () => {
  it('is told by the clock and in working time', () => {
    expect(sayDateMargin({ marginMinutes: 3060, workingMarginMinutes: 690 })).toBe(
      '2 d 3 h in hand, 11 h 30 of it working time',
    );
    expect(sayDateMargin({ marginMinutes: -90, workingMarginMinutes: -90 })).toBe(
      'Late by 1 h 30 min, 1 h 30 of it working time',
    );
    expect(sayDateMargin({ marginMinutes: null, workingMarginMinutes: null })).toBe('No margin is known yet');
  });

  it('has a place on the line that grows with it, the brink in the middle', () => {
    expect(marginPlace(0)).toBe(0.5);
    expect(marginPlace(null)).toBeNull();
    fc.assert(
      fc.property(fc.integer({ min: -60_000, max: 60_000 }), fc.integer({ min: 0, max: 10_000 }), (margin, more) => {
        const [place, further] = [marginPlace(margin) ?? -1, marginPlace(margin + more) ?? -1];
        expect(further).toBeGreaterThanOrEqual(place);
        expect(place).toBeGreaterThanOrEqual(0);
        expect(further).toBeLessThanOrEqual(1);
      }),
    );
  });
});
