import { forecast, NO_FACTOR } from '@common/forecast';
import { level, type Plan } from '@common/planning';
import { buildProblem, buildUncertainty, USUAL_SPREADS } from '@common/planning-input';
import { applyMeasures, FIRST_TERMS, priceOf, proposeMeasures, searchRescues, type Measure } from '@common/rescue';
import { buildDemoStudio } from '@database/demo/build-demo-studio';
import { demoMorning, demoSnapshot } from '@database/demo/demo-problem';

jest.setTimeout(120_000);

const TODAY = '2026-03-02';
const DRAWS = 40;
const SEED = 1;

describe('the demo’s date that can’t be met', () => {
  const snapshot = demoSnapshot(buildDemoStudio(TODAY));
  const now = demoMorning(TODAY);
  const problem = buildProblem(snapshot, { now, horizonEnd: null });
  const { plan, unmet } = level(problem, { seed: SEED, maxSchedules: 100, shouldStop: () => false });
  const keyDateId = unmet.find(({ rule }) => rule === 'key-date')?.keyDateId ?? '';
  const terms = { ...FIRST_TERMS, allowed: ['weekend-shift', 'part-delivery', 'later-date'] as const };
  const question = {
    snapshot,
    plan,
    now,
    keyDateId,
    terms,
    spreads: USUAL_SPREADS,
    overrun: NO_FACTOR,
    draws: DRAWS,
    seed: SEED,
  };
  const hooks = { isCancelled: () => false, tell: () => undefined };

  it('is saved by the cheapest single rescue that weighing every one of the list thoroughly finds', () => {
    const found = searchRescues(question, hooks);
    const risk = riskOf(plan);
    const every = proposeMeasures(snapshot, risk, terms).map((measure) => ({
      measure,
      price: priceOf(measure, snapshot, terms),
      missChance: missChanceWith(measure),
    }));
    const saving = every.filter(({ missChance }) => missChance * 1000 <= terms.goalPermille);
    expect(saving.length).toBeGreaterThan(0);
    const cheapest = Math.min(...saving.map(({ price }) => price));
    const singles = found.rescues.filter(
      ({ measures, odds }) => measures.length === 1 && odds.missChance * 1000 <= terms.goalPermille,
    );
    expect(singles[0].priceMinor).toBe(cheapest);
    expect(found.weighed).toBe(every.length);
  });

  it('is searched alike each time, and nothing is changed by searching', () => {
    const before = JSON.stringify(snapshot);
    const narrow = { ...question, terms: { ...terms, allowed: ['later-date'] as const } };
    expect(searchRescues(narrow, hooks)).toEqual(searchRescues(narrow, hooks));
    expect(JSON.stringify(snapshot)).toBe(before);
  });

  it('stops a search that is cancelled with what it has', () => {
    const found = searchRescues(question, { isCancelled: () => true, tell: () => undefined });
    expect(found.rescues.every(({ measures }) => measures.length === 0)).toBe(true);
  });

  function missChanceWith(measure: Measure): number {
    const changed = applyMeasures(snapshot, [measure]);
    const with_ = buildProblem(changed, { now, horizonEnd: null });
    const found = level(with_, { seed: SEED, maxSchedules: 40, shouldStop: () => false });
    const { keyDates } = forecast(with_, found.plan, buildUncertainty(changed, USUAL_SPREADS, NO_FACTOR), {
      draws: DRAWS,
      seed: SEED,
    });
    return keyDates.find((date) => date.keyDateId === keyDateId)?.missChance ?? 1;
  }

  function riskOf(current: Plan): Parameters<typeof proposeMeasures>[1] {
    const found = forecast(problem, current, buildUncertainty(snapshot, USUAL_SPREADS, NO_FACTOR), {
      draws: DRAWS,
      seed: SEED,
    });
    const date = found.keyDates.find((one) => one.keyDateId === keyDateId);
    const placed = new Map(current.placements.map((placement) => [placement.stageId, placement]));
    return {
      keyDateId,
      p90: date?.p90 ?? now,
      driverIds: date?.drivers.map(({ stageId }) => stageId).slice(0, 8) ?? [],
      makersOf: (id) => placed.get(id)?.crew.map(({ makerId }) => makerId) ?? [],
      baysOf: (id) => placed.get(id)?.bayIds ?? [],
      now,
    };
  }
});

describe('measures', () => {
  const snapshot = demoSnapshot(buildDemoStudio(TODAY));
  const now = demoMorning(TODAY);
  const [maker] = snapshot.makers;
  const [bay] = snapshot.bays;

  it('leave the studio as it was when they are taken out again', () => {
    expect(applyMeasures(snapshot, [])).toBe(snapshot);
    const measure = { kind: 'second-mould', bayId: bay.id } as const;
    const changed = applyMeasures(snapshot, [measure]);
    expect(changed.bays.find(({ id }) => id === bay.id)?.capacity).toBe(bay.capacity + 1);
    expect(snapshot.bays.find(({ id }) => id === bay.id)?.capacity).toBe(bay.capacity);
  });

  it('offer no more time than they say', () => {
    const measure = {
      kind: 'weekend-shift',
      makerId: maker.id,
      day: '2026-03-07',
      startMinuteOfDay: 540,
      minutes: 480,
    } as const;
    const minutes = (one: typeof snapshot): number =>
      buildProblem(one, { now, horizonEnd: null })
        .makers.find(({ id }) => id === maker.id)
        ?.overtime.reduce((sum, span) => sum + span.end - span.start, 0) ?? 0;
    expect(minutes(applyMeasures(snapshot, [measure])) - minutes(snapshot)).toBe(480);
  });

  it('heat a bay only while the heater is on, and only where it is colder', () => {
    const cold = { ...snapshot, bays: [{ ...bay, climate: [{ from: 0, celsius: 12, humidityPercent: 60 }] }] };
    const heat = { kind: 'heat', bayId: bay.id, celsius: 24, from: 1000, until: 2000 } as const;
    expect(applyMeasures(cold, [heat]).bays[0].climate).toEqual([
      { from: 0, celsius: 12, humidityPercent: 60 },
      { from: 1000, celsius: 24, humidityPercent: 60 },
      { from: 2000, celsius: 12, humidityPercent: 60 },
    ]);
  });

  it('cost what their terms say', () => {
    const price = (measure: Measure): number => priceOf(measure, snapshot, FIRST_TERMS);
    expect(price({ kind: 'freelancer', makerId: 'x', craftId: 'c', from: TODAY, days: 5 })).toBe(130_000);
    expect(price({ kind: 'heat', bayId: bay.id, celsius: 24, from: 0, until: 600 })).toBe(1800);
    // Ten working days of two hours at one and a half times the hour.
    const overtime = {
      kind: 'overtime',
      makerId: maker.id,
      from: '2026-03-02',
      until: '2026-03-16',
      minutesADay: 120,
    } as const;
    expect(price(overtime)).toBe(Math.ceil(20 * maker.hourCostMinor * 1.5));
  });
});
