import fc from 'fast-check';
import { instantOfLocal, MINUTES_PER_DAY } from '../time/zone';
import { dayNumber } from '../time/calendar-day';
import { climateAt } from './climate';
import { profileHistory, readingGaps, withReadings, type ClimateProfile } from './climate-profile';

const ZONE = 'Europe/London';
const at = (day: string, minuteOfDay: number): number =>
  instantOfLocal(dayNumber(day) * MINUTES_PER_DAY + minuteOfDay, ZONE);
const HEATED: ClimateProfile = {
  winterCelsius: 6,
  summerCelsius: 22,
  winterHumidityPercent: 80,
  summerHumidityPercent: 60,
  heating: { days: ['MO', 'TU', 'WE', 'TH', 'FR'], fromMinuteOfDay: 450, untilMinuteOfDay: 1080, celsius: 19 },
  setBackCelsius: 12,
};
const YEAR = { start: at('2026-01-01', 0), end: at('2027-01-01', 0) };

describe('a climate over the week and the seasons', () => {
  const history = profileHistory(HEATED, YEAR, ZONE);

  it('is warm in a January working day, set back at night and at the weekend', () => {
    // 2026-01-15 is a Thursday, the 17th a Saturday.
    expect(climateAt(history, at('2026-01-15', 600)).celsius).toBe(19);
    expect(climateAt(history, at('2026-01-15', 1140)).celsius).toBe(12);
    expect(climateAt(history, at('2026-01-15', 1320)).celsius).toBe(12);
    expect(climateAt(history, at('2026-01-17', 600)).celsius).toBe(12);
  });

  it('needs no heating in July', () => {
    expect(climateAt(history, at('2026-07-16', 600)).celsius).toBe(22);
    expect(climateAt(history, at('2026-07-16', 60)).celsius).toBe(22);
  });

  it('dries the air that it warms', () => {
    // Air of 6 °C and 80 % warmed to 19 °C: saturation pressures 9.35 and 21.96 hPa (WMO-No. 8), so 34 %.
    expect(climateAt(history, at('2026-01-15', 600)).humidityPercent).toBeCloseTo(34.1, 0);
  });

  it('keeps the studio’s clock over a change of clocks', () => {
    // Clocks go forward on 29 March 2026: Monday's heating begins at 07:30 by the clock, 06:30 UTC.
    expect(climateAt(history, at('2026-03-30', 449)).celsius).toBe(12);
    expect(climateAt(history, at('2026-03-30', 450)).celsius).toBe(19);
  });

  it('rises in time without repeats, whatever the profile', () => {
    const celsius = fc.integer({ min: -20, max: 45 });
    fc.assert(
      fc.property(
        celsius,
        celsius,
        fc.option(celsius),
        fc.integer({ min: 0, max: 700 }),
        (winter, summer, back, from) => {
          const steps = profileHistory(
            {
              ...HEATED,
              winterCelsius: winter,
              summerCelsius: summer,
              setBackCelsius: back,
              heating: { days: ['MO', 'SU'], fromMinuteOfDay: from, untilMinuteOfDay: 1440, celsius: 18 },
            },
            { start: YEAR.start, end: YEAR.start + 40 * MINUTES_PER_DAY },
            ZONE,
          );
          steps.slice(1).forEach((step, k) => {
            expect(step.from).toBeGreaterThan(steps[k].from);
            expect([step.celsius, step.humidityPercent]).not.toEqual([steps[k].celsius, steps[k].humidityPercent]);
          });
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('a measured log', () => {
  const flat = [{ from: 0, celsius: 15, humidityPercent: 50 }];

  it('holds from each reading to the next, and lets the profile through where it has a gap', () => {
    const readings = [
      { at: 100, celsius: 10, humidityPercent: 70 },
      { at: 160, celsius: 11, humidityPercent: 70 },
      { at: 2000, celsius: 9, humidityPercent: 75 },
    ];
    const history = withReadings(flat, readings);
    expect(climateAt(history, 99).celsius).toBe(15);
    expect(climateAt(history, 100).celsius).toBe(10);
    expect(climateAt(history, 161).celsius).toBe(11);
    expect(climateAt(history, 160 + 361).celsius).toBe(15);
    expect(climateAt(history, 2000).celsius).toBe(9);
    expect(climateAt(history, 2000 + 361).celsius).toBe(15);
    expect(readingGaps(readings)).toEqual([{ start: 160, end: 2000 }]);
  });

  it('of none leaves the profile as it is', () => {
    expect(withReadings(flat, [])).toBe(flat);
  });
});
