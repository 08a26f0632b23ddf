import type { KeyDateView, PromiseWayView } from '@common/contract';
import { askedFor, pushedBy, sayAge, sayAgainst, sayEarliest, sayMargin } from './say-promise';

const date: KeyDateView = {
  id: '11111111-0000-4000-8000-000000000001',
  productionId: '11111111-0000-4000-8000-000000000002',
  kind: 'delivery',
  at: '2026-12-10T10:00:00Z',
  strength: 'wished',
  weight: 10,
  pieceIds: [],
  version: 1,
};
const AT = Date.parse(date.at) / 60_000;

function pushed(name: string, marginAfter: number, missChanceAfter: number): PromiseWayView['others'][number] {
  return {
    keyDateId: date.id,
    productionName: name,
    kind: 'opening',
    strength: 'hard',
    marginBefore: 100,
    marginAfter,
    missChanceBefore: 0.1,
    missChanceAfter,
  };
}

describe('the words of a promise', () => {
  it('tell an instant in the studio’s zone, and that there is none', () => {
    expect(sayEarliest(AT, 'UTC')).toContain('10:00');
    expect(sayEarliest(null, 'UTC')).toBe('not within the months ahead');
  });

  it('compare it with the date asked for', () => {
    expect(sayAgainst(AT - 120, date)).toBe('2 h before the date asked for');
    expect(sayAgainst(AT + 120, date)).toBe('2 h after the date asked for');
    expect(sayAgainst(AT, date)).toBe('just at the date asked for');
    expect([sayAgainst(null, date), sayAgainst(AT, null)]).toEqual(['', '']);
  });

  it('take the delivery for what is asked, else the first date', () => {
    const opening = { ...date, kind: 'opening' as const, at: '2026-12-01T10:00:00Z' };
    expect(askedFor([opening, date])).toBe(date);
    expect(askedFor([opening])).toBe(opening);
    expect(askedFor([])).toBeNull();
  });

  it('name only dates that are pushed, the worst first', () => {
    const others = [pushed('Same', 100, 0.105), pushed('Moved', 40, 0.1), pushed('Worse', 100, 0.5)];
    const way: PromiseWayView = { p50: 1, p80: 2, p90: 3, plannedReady: 1, drivers: [], asked: [], others };
    expect(pushedBy(way).map(({ productionName }) => productionName)).toEqual(['Worse', 'Moved']);
  });

  it('tell margins and ages', () => {
    expect([sayMargin(120), sayMargin(-120)]).toEqual(['2 h', 'late by 2 h']);
    expect(sayAge(date.at, Date.parse(date.at) + 30_000)).toBe('just now');
    expect(sayAge(date.at, Date.parse(date.at) + 7_200_000)).toBe('2 h ago');
  });
});
