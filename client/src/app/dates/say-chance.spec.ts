import { judgeChance, sayBasis, sayChance, sayChanceMoved } from './say-chance';

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

describe('a chance of missing a date', () => {
  it('is judged in a word from a fifth and from a half on', () => {
    expect(judgeChance(0.199)).toBeNull();
    expect(judgeChance(0.2)).toEqual({ word: 'at risk', tone: 'risk' });
    expect(judgeChance(0.5)).toEqual({ word: 'likelier missed than met', tone: 'fault' });
  });
});

describe('what chances are from', () => {
  const stages = [{ stageId: 'a', p10: 1, p50: 2, p80: 3, p90: 4 }];
  const overrun = { learning: 'past-hours' as const, middlePermille: 1123, spreadPermille: 80, pastStages: 41 };

  it('is told with what finished work says', () => {
    expect(sayBasis({ draws: 1000, drawsAsked: 1000, stages, overrun })).toBe(
      'Chances are from living the plan through: 1,000 draws. 41 finished stages say that the studio needs 112 % of its estimates.',
    );
    expect(sayBasis({ draws: 1000, drawsAsked: 1000, stages, overrun: { ...overrun, pastStages: 0 } })).toContain(
      'No finished work to learn from yet: the studio is taken to need 112 % of its estimates.',
    );
    expect(
      sayBasis({ draws: 1000, drawsAsked: 1000, stages, overrun: { ...overrun, learning: 'estimates' } }),
    ).toContain('Estimates are believed as they stand');
  });

  it('is nothing before anything has a place', () => {
    expect(sayBasis({ draws: 1000, drawsAsked: 1000, stages: [], overrun })).toBe(
      'Nothing has a place in the plan yet; chances come with it.',
    );
  });

  it('is told as cut short where it was', () => {
    expect(sayBasis({ draws: 320, drawsAsked: 1000, stages, overrun })).toContain(
      '320 of 1,000 draws, for it was stopped.',
    );
  });
});
