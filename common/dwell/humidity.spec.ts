import { advanceRate, FASTEST_DRYING, SLOWEST_DRYING } from './advance';
import { coatingFault, dewPoint, dewPointFromBulbs, evaporationTimeFactor } from './humidity';

const air = (celsius: number, humidityPercent: number) => ({ celsius, humidityPercent });

describe('dew point', () => {
  // Magnus formula with 17.62 and 243.12 (WMO guide), computed apart from this code.
  it.each([
    [16, 71, 10.74],
    [20, 50, 9.26],
    [20, 85, 17.4],
    [23, 50, 12.01],
  ])('of air at %d °C and %d %% is %d °C', (celsius, humidity, dew) => {
    expect(dewPoint(air(celsius, humidity))).toBeCloseTo(dew, 2);
  });

  // Coating conditions as published (fr.scribd.com document 146044552), to the whole degree.
  it('agrees with a coating manual', () => {
    expect(Math.round(dewPoint(air(16, 71)))).toBe(11);
    expect(Math.round(dewPointFromBulbs(21, 17))).toBe(15);
  });

  it('is the temperature itself where the air is saturated, and nowhere in dry air', () => {
    expect(dewPoint(air(12, 100))).toBeCloseTo(12, 9);
    expect(dewPoint(air(12, 0))).toBe(-Infinity);
  });
});

describe('evaporation', () => {
  // Dalton in still air beside 20 °C and 50 %, computed apart from this code.
  it.each([
    [15, 50, 1.37],
    [20, 80, 2.5],
    [15, 80, 3.43],
    [10, 80, 4.76],
    [20, 90, 5.0],
    [25, 40, 0.62],
  ])('at %d °C and %d %% takes %d times as long', (celsius, humidity, times) => {
    expect(evaporationTimeFactor(air(celsius, humidity), air(20, 50))).toBeCloseTo(times, 2);
  });

  const drying = {
    law: { kind: 'evaporation' },
    referenceCelsius: 20,
    referenceHumidityPercent: 50,
    minimumCelsius: 10,
    maximumCelsius: null,
  } as const;

  // Limit of 85 % relative humidity: the same coating manual.
  it('is stopped by damp and by cold', () => {
    expect(advanceRate(drying, air(20, 85))).toBeGreaterThan(0);
    expect(advanceRate(drying, air(20, 85.1))).toBe(0);
    expect(advanceRate(drying, air(9.9, 50))).toBe(0);
  });

  it('is kept within bounds', () => {
    expect(advanceRate(drying, air(35, 10))).toBe(FASTEST_DRYING);
    expect(advanceRate(drying, air(10, 85))).toBe(SLOWEST_DRYING);
  });
});

describe('coating', () => {
  // Surface at least 3 °C above the dew point, humidity at most 85 %: the same coating manual.
  it('is refused in damp air and on a surface near the dew point', () => {
    expect(coatingFault(air(20, 50), 18)).toBeNull();
    expect(coatingFault(air(20, 86), 20)).toContain('85 %');
    expect(coatingFault(air(20, 80), 19)).toContain('dew forms at 16.4 °C');
  });
});
