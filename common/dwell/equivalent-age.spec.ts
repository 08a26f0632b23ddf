import { advanceRate } from './advance';
import {
  arrheniusFactor,
  fitTenDegreeFactor,
  GAS_CONSTANT,
  nurseSaulFactor,
  tenDegreeFactor,
  tenDegreeFactorOf,
} from './equivalent-age';
import type { DwellBehaviour } from './law';
import { creditMinutes } from './ready';

/** ASTM C1074 takes E/R of about 5000 K for plain cement. */
const CEMENT_ENERGY = 5000 * GAS_CONSTANT;

const behaviour = (given: Partial<DwellBehaviour>): DwellBehaviour => ({
  law: { kind: 'none' },
  referenceCelsius: 20,
  referenceHumidityPercent: 50,
  minimumCelsius: null,
  maximumCelsius: null,
  ...given,
});

/** 6 h at 10 °C, 12 h at 15 °C, 6 h at 30 °C. */
const DAY = [
  { from: 0, celsius: 10, humidityPercent: 50 },
  { from: 6 * 60, celsius: 15, humidityPercent: 50 },
  { from: 18 * 60, celsius: 30, humidityPercent: 50 },
];

function hoursOfDay(given: Partial<DwellBehaviour>): number {
  return creditMinutes(0, 24 * 60, behaviour(given), DAY) / 60;
}

describe('Arrhenius equivalent age', () => {
  // ASTM C1074 (Arrhenius form, E/R = 5000 K), rate factors computed apart from this code.
  it.each([
    [5, 0.3986, 0.3354],
    [10, 0.5475, 0.4606],
    [15, 0.7438, 0.6258],
    [18, 0.8894, 0.7483],
    [20, 1, 0.8413],
    [23, 1.1886, 1],
    [25, 1.3311, 1.1199],
    [30, 1.7553, 1.4768],
    [35, 2.2939, 1.9299],
    [40, 2.9723, 2.5006],
  ])('at %d °C advances by %d of 20 °C and %d of 23 °C', (celsius, of20, of23) => {
    expect(arrheniusFactor(celsius, 20, CEMENT_ENERGY)).toBeCloseTo(of20, 4);
    expect(arrheniusFactor(celsius, 23, CEMENT_ENERGY)).toBeCloseTo(of23, 4);
  });

  // Worked example by the same standard, computed apart from this code.
  it('makes 22.74 h at 20 °C, or 19.13 h at 23 °C, of a cool day with a warm evening', () => {
    const law = { kind: 'arrhenius', activationEnergyJPerMol: CEMENT_ENERGY } as const;
    expect(hoursOfDay({ law })).toBeCloseTo(22.7426, 4);
    expect(hoursOfDay({ law, referenceCelsius: 23 })).toBeCloseTo(19.1339, 4);
  });

  // From the Arrhenius equation between 15 and 25 °C, computed apart from this code. That table writes 3.07 for 80 kJ/mol,
  // which is 3.0649 rounded twice; here it stands as it was after the first rounding.
  it.each([
    [23_600, 1.39],
    [40_000, 1.75],
    [41_570, 1.79],
    [50_000, 2.01],
    [60_000, 2.32],
    [80_000, 3.065],
    [90_000, 3.53],
  ])('with %d J/mol comes to a factor of %d per ten degrees', (energy, factor) => {
    expect(tenDegreeFactorOf(energy, 15, 25)).toBeCloseTo(factor, 2);
  });
});

describe('Nurse–Saul maturity', () => {
  // ASTM C1074, temperature-time factor; a step below the datum adds nothing. Computed apart from this code.
  it.each([
    [0, 420 / 20],
    [-10, 660 / 30],
    [5, 300 / 15],
  ])('with a datum of %d °C makes %d h of the same day', (datumCelsius, hours) => {
    expect(hoursOfDay({ law: { kind: 'nurse-saul', datumCelsius } })).toBeCloseTo(hours, 9);
  });

  it('counts nothing below the datum', () => {
    expect(nurseSaulFactor(-3, 20, 0)).toBe(0);
    expect(hoursOfDay({ law: { kind: 'nurse-saul', datumCelsius: 12 } })).toBeCloseTo((3 * 12 + 18 * 6) / 8, 9);
  });
});

describe('factor per ten degrees', () => {
  // The doubling rule, t(T) = tref · 2^((Tref − T)/10): computed apart from this code.
  it.each([
    [5, 2.828],
    [10, 2],
    [12, 1.741],
    [15, 1.414],
    [18, 1.149],
    [23, 0.812],
    [25, 0.707],
    [30, 0.5],
  ])('with a factor of 2 takes at %d °C %d times as long as at 20 °C', (celsius, times) => {
    expect(1 / tenDegreeFactor(celsius, 20, 2)).toBeCloseTo(times, 3);
  });
});

describe('a published table, beside the rule', () => {
  // Epoxy gel, recoat and cure chart (scribd.com document 708897795); the fits were computed apart from this code.
  const CELSIUS = [4, 10, 16, 21, 27, 32, 38, 43];
  const table = (hours: readonly number[]) => hours.map((value, i) => ({ celsius: CELSIUS[i], minutes: value }));

  it.each([
    ['gel', [180, 110, 62, 52, 30, 25, 18, 16], 1.88],
    ['dry', [540, 360, 240, 180, 120, 90, 55, 45], 1.91],
    ['latest recoat', [360, 235, 150, 116, 75, 58, 37, 31], 1.89],
    ['65 Shore D', [96, 75, 20, 8, 4.75, 2.83, 2, 1.67], 3.11],
  ])('fits %s', (_name, times, factor) => {
    expect(fitTenDegreeFactor(table(times))).toBeCloseTo(factor, 2);
  });

  it('fits parts of the table by other factors: no single one holds', () => {
    const shore = table([96, 75, 20, 8, 4.75, 2.83]).slice(1);
    expect(fitTenDegreeFactor(shore)).toBeCloseTo(4.29, 2);
    expect(fitTenDegreeFactor(shore.slice(0, 2))).toBeCloseTo(9.05, 2);
    expect(fitTenDegreeFactor(table([180, 110, 62, 52, 30, 25]).slice(1))).toBeCloseTo(1.96, 2);
  });

  // Red-oxide alkyd primer sheet (idoc.tips, berger-red-oxide-primer), at 15, 25 and 35 °C.
  it.each([
    ['touch', [8, 7, 6], 1.15],
    ['earliest recoat', [24, 20, 16], 1.22],
    ['latest recoat', [14, 12, 10], 1.18],
  ])('fits an oxidative primer’s %s', (_name, times, factor) => {
    const rows = times.map((minutes, i) => ({ celsius: 15 + 10 * i, minutes }));
    expect(fitTenDegreeFactor(rows)).toBeCloseTo(factor, 2);
  });

  // Gelcoat field charts: boatcraft.com gel-coat-application-guide (10 ml/l), and sailtortuguita.blogspot.com 2017/10.
  it('fits gelcoat field charts by about eight', () => {
    const chart = [
      { celsius: 25, minutes: 30 },
      { celsius: 20, minutes: 120 },
      { celsius: 15, minutes: 240 },
    ];
    expect(Math.round(fitTenDegreeFactor(chart))).toBe(8);
    const second = [
      { celsius: 5, minutes: 120 },
      { celsius: 20, minutes: 5 },
    ];
    expect(fitTenDegreeFactor(second)).toBeCloseTo(8.3, 1);
  });
});

describe('limits of a law', () => {
  const doubling = behaviour({
    law: { kind: 'factor-per-10-degrees', factor: 2 },
    minimumCelsius: 15,
    maximumCelsius: 30,
  });
  const at = (celsius: number) => advanceRate(doubling, { celsius, humidityPercent: 50 });

  it('credits nothing below the minimum, and something at it', () => {
    expect(at(14.9)).toBe(0);
    expect(at(15)).toBeCloseTo(0.7071, 4);
  });

  it('credits no more above the maximum than at it', () => {
    expect(at(45)).toBe(at(30));
  });

  it('is the stated pace at the reference, whatever the law', () => {
    const laws = [
      { kind: 'none' },
      { kind: 'arrhenius', activationEnergyJPerMol: 50_000 },
      { kind: 'factor-per-10-degrees', factor: 3 },
      { kind: 'nurse-saul', datumCelsius: -10 },
      { kind: 'evaporation' },
    ] as const;
    for (const law of laws) {
      expect(advanceRate(behaviour({ law }), { celsius: 20, humidityPercent: 50 })).toBe(1);
    }
  });
});
