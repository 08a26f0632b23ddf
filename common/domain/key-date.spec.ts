import { CRAFTS, isCraftKey } from './craft';
import { keyDateCautions } from './key-date';
import { costOfMinutes, formatMoney, permilleOf } from './money';
import { CAUTION_NOTICE, cautionsForFamily, cautionsForHazard, HAZARDS, MATERIAL_FAMILIES } from './safety';

describe('the order of key dates', () => {
  it('is cautioned where a later kind comes earlier', () => {
    expect(
      keyDateCautions([
        { kind: 'technical-rehearsal', at: 10 },
        { kind: 'delivery', at: 12 },
        { kind: 'rehearsal-loan', at: 99 },
      ]),
    ).toEqual(['Technical rehearsal comes before delivery.']);
  });

  it('is left alone where all is in order, or of one kind', () => {
    expect(
      keyDateCautions([
        { kind: 'delivery', at: 1 },
        { kind: 'delivery', at: 0 },
        { kind: 'opening', at: 1 },
      ]),
    ).toEqual([]);
  });
});

describe('crafts', () => {
  it('have keys of the right shape, each once', () => {
    expect(CRAFTS.every((craft) => isCraftKey(craft.key))).toBe(true);
    expect(new Set(CRAFTS.map((craft) => craft.key)).size).toBe(CRAFTS.length);
    expect(isCraftKey('Filling & sanding')).toBe(false);
  });
});

describe('money', () => {
  it('stays in whole minor units', () => {
    expect(costOfMinutes(50, 2_350)).toBe(1958);
    expect(permilleOf(1_005, 150)).toBe(151);
  });

  // ISO 4217: two decimals for GBP, none for JPY.
  it('is written in its currency', () => {
    expect(formatMoney(123_450, 'GBP')).toBe('£1,234.50');
    expect(formatMoney(123_450, 'JPY')).toBe('JP¥123,450');
  });
});

describe('cautions', () => {
  it('are there for every family and hazard, short enough to store', () => {
    const all = [...MATERIAL_FAMILIES.map(cautionsForFamily), ...HAZARDS.map(cautionsForHazard)];
    all.forEach((cautions) => expect(cautions.length).toBeGreaterThan(0));
    all.flat().forEach((caution) => expect(caution.length).toBeLessThanOrEqual(400));
  });

  it('defer to the sheet, to law and to the competent', () => {
    expect(CAUTION_NOTICE).toMatch(/data sheet.*law.*competent/s);
    expect(cautionsForFamily('of the studio’s own')).toEqual([]);
  });
});
