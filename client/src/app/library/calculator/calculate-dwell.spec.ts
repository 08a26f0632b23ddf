import type { ClimateView, MaterialView } from '@common/contract';
import { constantClimate } from '@common/dwell/climate';
import {
  cureCourse,
  type DwellQuestion,
  historyOf,
  latestByLength,
  leavesTheWeek,
  readyByLength,
  sayHindrances,
  sayTemperatureLimits,
  temperatureByLength,
} from './calculate-dwell';

const HOUR = 60;
const START = 30_000_000;

/** A resin of ten hours at 20 °C, twice as fast for every ten degrees (the rule of thumb; common practice, no source). */
const dwell: MaterialView['dwells'][number] = {
  milestone: 'demould',
  minutes: { low: 8 * HOUR, likely: 10 * HOUR, high: 20 * HOUR },
  law: { kind: 'factor-per-10-degrees', factor: 2 },
  minimumCelsius: 10,
  maximumCelsius: 40,
  source: 'made up',
};
const material: MaterialView = {
  id: '00000000-0000-4000-8000-000000000001',
  name: 'Casting resin',
  family: 'epoxy',
  referenceCelsius: 20,
  referenceHumidityPercent: 50,
  attendedMinutes: 0,
  dwells: [dwell],
  cautions: [],
  note: '',
  version: 1,
};

function asking(celsius: number, more: Partial<DwellQuestion> = {}): DwellQuestion {
  const history = constantClimate({ celsius, humidityPercent: 50 });
  return { material, dwell, history, start: START, readyBy: null, ...more };
}

/** Too cold between two and eight hours after the start; 20 °C before and after. */
const coldSpell = [
  { from: START, celsius: 20, humidityPercent: 50 },
  { from: START + 2 * HOUR, celsius: 5, humidityPercent: 50 },
  { from: START + 8 * HOUR, celsius: 20, humidityPercent: 50 },
];

describe('when it is ready', () => {
  it('is told for the short, the usual and the long time', () => {
    const ready = { low: START + 4 * HOUR, likely: START + 5 * HOUR, high: START + 10 * HOUR };
    expect(readyByLength(asking(30))).toEqual(ready);
    expect(sayHindrances(asking(30))).toEqual([]);
  });

  it('is never where it stays too cold, and that is said', () => {
    expect(readyByLength(asking(8))).toEqual({ low: null, likely: null, high: null });
    expect(sayHindrances(asking(8))).toEqual([
      'It does not get there: it stays at 8 °C, and below 10 °C nothing advances.',
    ]);
  });

  it('is as good as never after a year', () => {
    const slow = { ...dwell, minimumCelsius: null, law: { kind: 'factor-per-10-degrees' as const, factor: 8 } };
    expect(readyByLength(asking(-30, { dwell: slow })).low).toBeNull();
    expect(sayHindrances(asking(-30, { dwell: slow }))).toEqual([
      'It does not get there: it would take more than a year.',
    ]);
  });

  it('is doubtful where only the short time comes before the cold', () => {
    const history = [coldSpell[0], { ...coldSpell[1], from: START + 9 * HOUR }];
    const question = asking(20, { history });
    expect(readyByLength(question)).toEqual({ low: START + 8 * HOUR, likely: null, high: null });
    expect(sayHindrances(question)[0]).toMatch(/^It may not get there: it stays at 5 °C/);
  });

  it('tells how long it stands still on the way', () => {
    const question = asking(20, { history: coldSpell });
    expect(readyByLength(question).likely).toBe(START + 16 * HOUR);
    expect(sayHindrances(question)).toEqual(['It stands still for 6 h on the way: below 10 °C nothing advances.']);
  });

  it('does not trust what is warmer than the maximum', () => {
    expect(readyByLength(asking(60))).toEqual(readyByLength(asking(40)));
    expect(sayHindrances(asking(60))).toEqual(['Above 40 °C the figure is not trusted; it is reckoned as at 40 °C.']);
  });

  it('does not dry in damp air', () => {
    const drying = { ...dwell, law: { kind: 'evaporation' as const }, minimumCelsius: null };
    const history = constantClimate({ celsius: 20, humidityPercent: 90 });
    expect(sayHindrances(asking(20, { dwell: drying, history }))).toEqual([
      'It does not get there: it stays at 20 °C, and above 85 % humidity nothing dries.',
    ]);
  });
});

describe('how late it may start', () => {
  it('is such that it is ready in time, and a minute later is not', () => {
    const readyBy = START + 30 * HOUR;
    const { likely } = latestByLength(asking(20, { history: coldSpell, readyBy }));
    const readyFrom = (start: number) => readyByLength(asking(20, { history: coldSpell, start })).likely;
    expect(likely).toBe(START + 20 * HOUR);
    expect(readyFrom(START + 20 * HOUR)).toBe(readyBy);
    expect(readyFrom(START + 20 * HOUR + 1)).toBeGreaterThan(readyBy);
  });

  it('is no time where nothing advances', () => {
    expect(latestByLength(asking(8, { readyBy: START })).likely).toBeNull();
  });
});

describe('what temperature would do', () => {
  it('is the least that is warm enough, up to the maximum', () => {
    const question = asking(15, { readyBy: START + 5 * HOUR });
    expect(temperatureByLength(question)).toEqual({ low: 26.8, likely: 30, high: 40 });
    expect(sayTemperatureLimits(question)).toBe('Never above 40 °C: there the figure is not trusted any more.');
    expect(temperatureByLength({ ...question, readyBy: START + 2 * HOUR }).likely).toBeNull();
  });

  it('is not named without a known maximum, nor for a time before the start', () => {
    const unknown = asking(15, { readyBy: START + HOUR, dwell: { ...dwell, maximumCelsius: null } });
    expect(temperatureByLength(unknown).likely).toBeNull();
    expect(sayTemperatureLimits(unknown)).toMatch(/no highest temperature/);
    expect(temperatureByLength(asking(15, { readyBy: START })).likely).toBeNull();
    expect(sayTemperatureLimits(asking(15, { readyBy: START }))).toMatch(/before it starts/);
  });
});

describe('the course of a cure', () => {
  it('has a point at each change of temperature and each quarter', () => {
    const points = cureCourse(asking(20, { history: coldSpell }));
    expect(points.map(({ at, celsius, percent }) => [(at - START) / HOUR, celsius, percent])).toEqual([
      [0, 20, 0],
      [2, 5, 20],
      [8, 20, 20],
      [8.5, 20, 25],
      [11, 20, 50],
      [13.5, 20, 75],
      [16, 20, 100],
    ]);
  });

  it('is followed for a week where it never ends', () => {
    const points = cureCourse(asking(8));
    expect(points.map(({ percent }) => percent)).toEqual([0, 0]);
    expect(points[1].at - points[0].at).toBe(7 * 24 * HOUR);
  });
});

describe('a place', () => {
  const place = { week: [] as ClimateView['week'] } as ClimateView;

  it('without any climate is none to reckon with', () => {
    expect(historyOf(place)).toBeNull();
    expect(historyOf({ ...place, week: coldSpell })).toBe(coldSpell);
  });

  it('is only known for its week', () => {
    expect(leavesTheWeek(coldSpell, [START, START + HOUR, null])).toBe(false);
    expect(leavesTheWeek(coldSpell, [START - 1])).toBe(true);
    expect(leavesTheWeek(coldSpell, [START + 7 * 24 * HOUR + 1])).toBe(true);
    expect(leavesTheWeek(constantClimate({ celsius: 20, humidityPercent: 50 }), [1, START])).toBe(false);
  });
});
