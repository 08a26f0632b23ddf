import { climateWarnings } from './climate-words';

describe('a place’s coming week', () => {
  it('needs no words where it is dry and steady', () => {
    expect(climateWarnings([{ from: 0, celsius: 18, humidityPercent: 55 }])).toEqual([]);
  });

  it('is told to be damp above 85 %', () => {
    expect(climateWarnings([{ from: 0, celsius: 8, humidityPercent: 91 }])[0]).toMatch(/^Up to 91 % humidity/);
  });

  it('is told where warm moist air meets what stood in the cold', () => {
    // Air of 18 °C and 60 % has its dew point at 10.1 °C (Magnus form, WMO-No. 8): within 3 °C of a night at 12 °C.
    const week = [
      { from: 0, celsius: 12, humidityPercent: 70 },
      { from: 480, celsius: 18, humidityPercent: 60 },
    ];
    expect(climateWarnings(week).join()).toContain('dew point');
    expect(climateWarnings([{ ...week[0], celsius: 14 }, week[1]])).toEqual([]);
  });
});
