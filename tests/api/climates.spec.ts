import { ClimateLogResult, ClimateView, WorkingPlanView } from '@common/contract';
import { withStudio, type Visitor } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

const WINTER = {
  winterCelsius: 4,
  summerCelsius: 4,
  winterHumidityPercent: 80,
  summerHumidityPercent: 80,
  heating: null,
  setBackCelsius: null,
};

describe('climates', () => {
  const studio = withStudio();
  let manager: Visitor;
  let shop: Workshop;

  const list = async () => ClimateView.array().parse((await manager.get('/api/climates')).body);
  const room = async () => (await list())[0];
  const log = async (csv: string, mode: 'try' | 'take' = 'take') => {
    const { status, body } = await manager.post('/api/climates/log', { bayId: null, csv, mode });
    expect(status).toBe(200);
    return ClimateLogResult.parse(body);
  };

  beforeAll(async () => {
    manager = await studio.as('manager');
    shop = await furnish(manager);
  });

  it('begin with the one temperature of the settings', async () => {
    expect(await room()).toMatchObject({ bayId: null, profile: null, readings: null, version: 0 });
    expect((await room()).week).toMatchObject([{ celsius: 18, humidityPercent: 55 }]);
  });

  it('move the end of a cure: a cold studio takes longer', async () => {
    const { pieceId } = await addProduction(manager, shop.clientId, 'Heron');
    const law = { kind: 'factor-per-10-degrees', factor: 2 };
    const material = {
      name: 'Resin',
      family: 'polyester',
      referenceCelsius: 20,
      referenceHumidityPercent: 50,
      attendedMinutes: 0,
      cautions: ['Styrene: extract, and wear a fitted mask.'],
      note: '',
      dwells: [
        {
          milestone: 'demould',
          minutes: { low: 500, likely: 600, high: 900 },
          law,
          minimumCelsius: null,
          maximumCelsius: 40,
          source: 'from memory',
        },
      ],
    };
    const made = await manager.post('/api/materials', material);
    expect([made.status, made.body.errors]).toEqual([201, undefined]);
    const dwell = {
      materialId: made.body.id,
      milestone: 'demould',
      minutes: 600,
      attendedMinutes: 0,
      window: null,
    };
    expect(
      (await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(shop.craftId, 'Lay up', { dwell }))).status,
    ).toBe(201);
    const cure = async (): Promise<number> => {
      const { plan } = WorkingPlanView.parse((await manager.get('/api/plan')).body);
      const [{ work, dwellEnd }] = plan.placements;
      return dwellEnd - work[work.length - 1].end;
    };
    const before = await cure();
    // 18 °C against 20 °C: 600 · 2^0.2 = 689 minutes.
    expect(before).toBeGreaterThanOrEqual(688);
    expect(before).toBeLessThanOrEqual(690);
    const set = await manager.put('/api/climates', { bayId: null, profile: WINTER, version: 0 });
    expect(set.status).toBe(200);
    // 4 °C: 600 · 2^1.6 = 1,819 minutes.
    expect(await cure()).toBeGreaterThanOrEqual(1817);
    expect(await cure()).toBeLessThanOrEqual(1821);
  });

  it('are not overwritten unseen', async () => {
    const late = await manager.put('/api/climates', { bayId: null, profile: null, version: 0 });
    expect([late.status, late.body.type]).toEqual([409, '/problems/version-conflict']);
  });

  it('refuse what no air can be, at its field', async () => {
    const profile = {
      ...WINTER,
      winterHumidityPercent: -3,
      heating: { days: ['MO'], fromMinuteOfDay: 900, untilMinuteOfDay: 600, celsius: 20 },
    };
    const { status, body } = await manager.put('/api/climates', { bayId: null, profile, version: 1 });
    expect(status).toBe(422);
    expect(body.errors).toEqual([
      { pointer: '/profile/winterHumidityPercent', detail: 'Humidity can’t be below 0 %.' },
      {
        pointer: '/profile/heating/untilMinuteOfDay',
        detail: 'Heating ends after it begins; for a night, heat until 24:00 and from 0:00.',
      },
    ]);
  });

  it('take a log as a spreadsheet writes it: byte order mark, semicolons, decimal commas', async () => {
    const csv =
      '\uFEFFDate and time;Temperature (°C);Humidity (%)\r\n31.01.2026 17:00;12,5;71,5\r\n31.01.2026 18:00;12,0;72\r\n';
    expect(await log(csv, 'try')).toMatchObject({ readings: 2, faults: [], taken: false });
    expect((await room()).readings).toBeNull();
    expect(await log(csv)).toMatchObject({ readings: 2, gaps: [], taken: true });
    expect((await room()).readings).toEqual({
      count: 2,
      from: '2026-01-31T17:00:00.000Z',
      until: '2026-01-31T18:00:00.000Z',
    });
  });

  it('tell of gaps in a log, which the profile fills', async () => {
    const { gaps } = await log('at,celsius,humidity\n2026-02-01 00:00,10,60\n2026-02-02 00:00,11,60\n', 'try');
    expect(gaps).toEqual([{ from: '2026-02-01T00:00:00.000Z', until: '2026-02-02T00:00:00.000Z' }]);
  });

  it('tell every faulty row of a log and take none of it', async () => {
    const csv =
      'at,celsius,humidity\nyesterday,10,60\n2026-02-03 00:00,warm,60\n2026-02-03 01:00,10,-5\n2026-02-03 02:00,9,50\n';
    const { faults, taken, readings } = await log(csv);
    expect({ taken, readings }).toEqual({ taken: false, readings: 0 });
    expect(faults.map(({ line }) => line)).toEqual([2, 3, 4]);
    expect(faults[2].detail).toBe('“-5” is no humidity from 0 to 100 %.');
    expect((await room()).readings?.count).toBe(2);
  });

  it('say what is wrong with a file that is none', async () => {
    expect((await log('hello')).faults[0].detail).toBe('The first line names no column “at”, “celsius”, “humidity”.');
    const unknown = await manager.post('/api/climates/log', { bayId: shop.craftId, csv: '', mode: 'try' });
    expect([unknown.status, unknown.body.detail]).toEqual([422, 'There is no such bay.']);
  });
});
