import { sayChance, sayChanceMoved } from './say-chance';

describe('a chance', () => {
  it('is told as far as the draws can tell it', () => {
    expect(sayChance(0, 1000)).toBe('under 1 in 1,000');
    expect(sayChance(0.042, 1000)).toBe('4.2 %');
    expect(sayChance(0.633, 1000)).toBe('63 %');
    expect(sayChance(0.998, 1000)).toBe('99.8 %');
    expect(sayChance(1, 1000)).toBe('over 999 in 1,000');
  });

  it('is compared with an earlier day in whole per cents', () => {
    expect(sayChanceMoved(0.3, 0.12, 'Mon 30 Nov')).toBe('up from 12 % on Mon 30 Nov');
    expect(sayChanceMoved(0.05, 0.12, 'Mon 30 Nov')).toBe('down from 12 % on Mon 30 Nov');
    expect(sayChanceMoved(0.121, 0.12, 'Mon 30 Nov')).toBe('as on Mon 30 Nov');
  });
});
