import * as fc from 'fast-check';
import { advanceSteps, isSteady } from './advance';
import { climateAt, type ClimateHistory, constantClimate } from './climate';
import type { DwellLaw } from './law';
import { creditMinutes, type DwellTime, latestStart, readyAt, readyExactly, temperatureFor } from './ready';
import { windowMissMinutes, workableSpan } from './window';

const HOUR = 60;

const dwell = (given: Partial<DwellTime>): DwellTime => ({
  minutes: 16 * HOUR,
  law: { kind: 'factor-per-10-degrees', factor: 2 },
  referenceCelsius: 20,
  referenceHumidityPercent: 50,
  minimumCelsius: null,
  maximumCelsius: null,
  ...given,
});

const step = (from: number, celsius: number) => ({ from, celsius, humidityPercent: 50 });

/** A room at 20 °C whose heating is set back to 12 °C from 18:00 to 07:00; minute 0 is midnight before the pour. */
const SET_BACK_NIGHT: ClimateHistory = [step(0, 20), step(18 * HOUR, 12), step((24 + 7) * HOUR, 20)];
const POUR = 17 * HOUR;
const nextDay = (hours: number, minutes: number) => (24 + hours) * HOUR + minutes;

describe('a pour at 17:00 that needs 16 h at 20 °C', () => {
  // Night set-back example by the doubling rule, computed apart from this code.
  it('is ready at 14:32 after a night at 12 °C', () => {
    expect(readyAt(POUR, dwell({}), SET_BACK_NIGHT)).toBe(nextDay(14, 32));
  });

  it('is ready at 22:00 where 12 °C earns nothing', () => {
    expect(readyAt(POUR, dwell({ minimumCelsius: 15 }), SET_BACK_NIGHT)).toBe(nextDay(22, 0));
  });

  it('is ready at 09:00 in a room kept at 20 °C', () => {
    expect(readyAt(POUR, dwell({}), constantClimate(step(0, 20)))).toBe(nextDay(9, 0));
  });

  it('is never ready where it stays too cold', () => {
    expect(readyAt(POUR, dwell({ minimumCelsius: 15 }), [step(0, 20), step(18 * HOUR, 12)])).toBeNull();
    expect(latestStart(POUR, dwell({ minimumCelsius: 15 }), [step(0, 12), step(POUR - HOUR, 20)])).toBeNull();
  });

  it('had to be poured by 17:00 to be ready by 14:32', () => {
    expect(latestStart(nextDay(14, 32), dwell({}), SET_BACK_NIGHT)).toBe(POUR);
  });
});

const histories: fc.Arbitrary<ClimateHistory> = fc
  .array(
    fc.record({
      length: fc.integer({ min: 1, max: 900 }),
      celsius: fc.integer({ min: 2, max: 34 }),
      humidityPercent: fc.integer({ min: 20, max: 95 }),
    }),
    { minLength: 1, maxLength: 6 },
  )
  .map((parts) => {
    let from = 0;
    return parts.map(({ length, celsius, humidityPercent }) => {
      const at = from;
      from += length;
      return { from: at, celsius, humidityPercent };
    });
  });

const laws: fc.Arbitrary<DwellLaw> = fc.constantFrom(
  { kind: 'none' },
  { kind: 'arrhenius', activationEnergyJPerMol: 50_000 },
  { kind: 'factor-per-10-degrees', factor: 3 },
  { kind: 'nurse-saul', datumCelsius: 0 },
  { kind: 'evaporation' },
);

const dwells = fc
  .record({ minutes: fc.integer({ min: 0, max: 3000 }), law: laws, minimumCelsius: fc.constantFrom(null, 10, 15) })
  .map(dwell);

const starts = fc.integer({ min: -500, max: 3000 });

describe('laws of readiness', () => {
  it('has earned its minutes when it is ready', () => {
    fc.assert(
      fc.property(histories, dwells, starts, (history, time, start) => {
        const exact = readyExactly(start, time, history);
        if (exact !== null) {
          expect(creditMinutes(start, exact, time, history)).toBeCloseTo(time.minutes, 6);
        }
      }),
    );
  });

  it('is never readier for being begun later', () => {
    fc.assert(
      fc.property(histories, dwells, starts, fc.nat(400), (history, time, start, later) => {
        const early = readyExactly(start, time, history) ?? Infinity;
        const late = readyExactly(start + later, time, history) ?? Infinity;
        expect(late).toBeGreaterThanOrEqual(early - 1e-6);
      }),
    );
  });

  it('is reached from its latest start and from none later', () => {
    fc.assert(
      fc.property(histories, dwells, starts, (history, time, readyBy) => {
        const start = latestStart(readyBy, time, history);
        if (start !== null) {
          expect(readyAt(start, time, history)).not.toBeNull();
          expect(readyAt(start, time, history)).toBeLessThanOrEqual(readyBy);
          expect(readyAt(start + 1, time, history) ?? Infinity).toBeGreaterThan(readyBy);
        }
      }),
    );
  });

  it('is told to the engine in thousandths that come out within a hundredth of the dwell', () => {
    fc.assert(
      fc.property(histories, dwells, (history, time) => {
        const steps = advanceSteps(time, history);
        history.forEach(({ from }, i) => {
          const until = history[i + 1]?.from ?? from + 1000;
          const rate = steps.permille[steps.from.findLastIndex((at) => at <= from)];
          expect(
            Math.abs((rate * (until - from)) / 1000 - creditMinutes(from, until, time, history)),
          ).toBeLessThanOrEqual((until - from) * 0.0005 + 1e-9);
        });
      }),
    );
  });
});

describe('what a room has to be', () => {
  const resin = dwell({ minimumCelsius: 15, maximumCelsius: 40 });
  const air = { celsius: 20, humidityPercent: 50 };

  // By the doubling rule 16 h become 8 h at 30 °C.
  it('is 30 °C to halve the time', () => {
    expect(temperatureFor(0, 8 * HOUR, resin, air)).toBe(30);
  });

  it('is no colder than the minimum however long there is', () => {
    expect(temperatureFor(0, 500 * HOUR, resin, air)).toBe(15);
  });

  it('is nothing known where the maximum is too little or not known', () => {
    expect(temperatureFor(0, 2 * HOUR, resin, air)).toBeNull();
    expect(temperatureFor(0, 0, resin, air)).toBeNull();
    expect(temperatureFor(0, 8 * HOUR, dwell({}), air)).toBeNull();
  });

  it('is just warm enough', () => {
    fc.assert(
      fc.property(fc.integer({ min: 4, max: 22 }), (hours) => {
        const celsius = temperatureFor(0, hours * HOUR, resin, air);
        if (celsius !== null) {
          expect(readyExactly(0, resin, constantClimate({ ...air, celsius }))).toBeLessThanOrEqual(hours * HOUR + 1e-3);
        }
        if (celsius !== null && celsius > 15) {
          const cooler = constantClimate({ ...air, celsius: celsius - 0.1 });
          expect(readyExactly(0, resin, cooler)).toBeGreaterThan(hours * HOUR);
        }
      }),
    );
  });
});

describe('windows', () => {
  const doubling = (minutes: number) => dwell({ minutes });

  it('open and close earlier in the warm', () => {
    const span = workableSpan(0, doubling(120), doubling(720), constantClimate(step(0, 30)));
    expect(span).toEqual({ from: 60, until: 360 });
    expect(windowMissMinutes(span, 400)).toBe(40);
    expect(windowMissMinutes(span, 100)).toBe(0);
  });

  it('may never close', () => {
    const span = workableSpan(0, doubling(120), null, constantClimate(step(0, 20)));
    expect(windowMissMinutes(span, 1e6)).toBe(0);
  });

  // Epoxy hand application (scribd.com document 708897795): earliest and latest recoat at 10 and 32 °C.
  it('move as a data sheet says when its own factor is used', () => {
    const factor = 1.89;
    const latest = dwell({ minutes: 116, referenceCelsius: 21, law: { kind: 'factor-per-10-degrees', factor } });
    const at = (celsius: number) => readyAt(0, latest, constantClimate(step(0, celsius))) ?? NaN;
    expect(Math.abs(at(10) - 235) / 235).toBeLessThan(0.05);
    expect(Math.abs(at(32) - 58) / 58).toBeLessThan(0.05);
  });
});

describe('a course of climates', () => {
  it('holds its first step before it begins', () => {
    expect(climateAt(SET_BACK_NIGHT, -5).celsius).toBe(20);
    expect(climateAt(SET_BACK_NIGHT, 18 * HOUR).celsius).toBe(12);
  });

  it('is steady only where it keeps the stated pace throughout', () => {
    expect(isSteady(advanceSteps(dwell({}), constantClimate(step(0, 20))))).toBe(true);
    expect(isSteady(advanceSteps(dwell({}), constantClimate(step(0, 21))))).toBe(false);
    expect(advanceSteps(dwell({}), SET_BACK_NIGHT)).toEqual({ from: [0, 1080, 1860], permille: [1000, 574, 1000] });
  });
});
