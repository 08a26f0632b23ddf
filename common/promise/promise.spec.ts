import { exactly, forecast, type Uncertainty } from '../forecast';
import { check, layOutBeside, layOutInOrder, type Link, type Maker, type Problem, type Stage } from '../planning';
import { handOverFrom } from './hand-over';
import { promise, type PromiseOptions } from './promise';

const DAY = 1440;
const DAYS = 60;

/** Two makers, eight hours a day, every day. */
function maker(id: string): Maker {
  const shifts = Array.from({ length: DAYS }, (_, k) => ({ start: k * DAY + 480, end: k * DAY + 960 }));
  const crafts = [{ craftId: 'carving', pacePermille: 1000 }];
  return { id, crafts, shifts, overtime: [], hourCostMinor: 1, overtimeHourCostMinor: 2, limits: null };
}

function stage(productionId: string, name: string, minutes: number): Stage {
  return {
    id: `${productionId}-${name}`,
    pieceId: `${productionId}-piece`,
    productionId,
    effort: { kind: 'person-minutes', minutes },
    crew: [{ craftId: 'carving', least: 1, most: 1 }],
    crewLossPermille: 0,
    continuity: 'shifts',
    places: [{ bayIds: ['table'], units: 1, hold: { kind: 'work' } }],
    dwell: null,
    earliestStart: 0,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
  };
}

function chain(stages: readonly Stage[]): Link[] {
  return stages.slice(1).map((to, k) => ({
    fromStageId: stages[k].id,
    toStageId: to.id,
    kind: 'finish-start',
    after: 'dwell',
    minGapMinutes: 0,
    maxGapMinutes: null,
    time: 'clock',
  }));
}

/** Two productions that are promised, and an enquiry whose work they leave little room for. */
function studio(): Problem {
  const heron = [stage('heron', 'a', 900), stage('heron', 'b', 1300), stage('heron', 'c', 600)];
  const moon = [stage('moon', 'a', 700), stage('moon', 'b', 1100)];
  const enquiry = [stage('enquiry', 'a', 800), stage('enquiry', 'b', 900)];
  const date = (productionId: string, of: readonly Stage[], day: number) => ({
    id: `${productionId}-delivery`,
    productionId,
    at: day * DAY,
    strength: 'wished' as const,
    weight: 1,
    stageIds: [of[of.length - 1].id],
  });
  const makers = [maker('ada'), maker('ben')];
  return {
    horizon: { start: 0, end: DAYS * DAY },
    makers,
    bays: [{ id: 'table', capacity: 2, open: null }],
    stages: [...heron, ...moon, ...enquiry],
    links: [...chain(heron), ...chain(moon), ...chain(enquiry)],
    keyDates: [date('heron', heron, 9), date('moon', moon, 6), date('enquiry', enquiry, 5)],
    advances: [],
    days: Array.from({ length: DAYS }, (_, k) => ({
      day: new Date(k * 86_400_000).toISOString().slice(0, 10),
      start: k * DAY,
      end: (k + 1) * DAY,
    })),
    workingTime: makers[0].shifts,
    freezeUntil: 0,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 0, earliness: 1 },
  };
}

const problem = studio();
const others = problem.stages.filter(({ productionId }) => productionId !== 'enquiry').map(({ id }) => id);
const plan = layOutInOrder(problem, others);
const uncertainty: Uncertainty = {
  stages: problem.stages.map(({ id, effort }) => ({
    stageId: id,
    effortMinutes: { low: effort.minutes * 0.7, likely: effort.minutes, high: effort.minutes * 2 },
    dwellMinutes: null,
    delayMinutes: exactly(0),
  })),
  overrun: { meanLog: 0.05, sdLog: 0.2 },
  curing: { meanLog: 0, sdLog: 0 },
  absence: problem.makers.map(({ id }) => ({ makerId: id, perDay: 0.05 })),
};
const options: PromiseOptions = {
  productionId: 'enquiry',
  earliestStart: null,
  draws: 200,
  seed: 3,
  maxSchedules: 200,
};

function ask(more: Partial<PromiseOptions> = {}) {
  const found = promise(problem, plan, uncertainty, { ...options, ...more });
  if (!found) throw new Error('It was stopped.');
  return found;
}

describe('a promise', () => {
  const found = ask();

  it('changes nothing by asking', () => {
    const [problemBefore, planBefore] = [JSON.stringify(problem), JSON.stringify(plan)];
    ask({ seed: 9 });
    expect([JSON.stringify(problem), JSON.stringify(plan)]).toEqual([problemBefore, planBefore]);
  });

  it('is the same for the same seed', () => {
    expect(ask()).toEqual(found);
  });

  it('never comes sooner for more certainty', () => {
    for (const { p50, p80, p90 } of [found.behind, found.among]) {
      const order = [p50, p80, p90].map((at) => at ?? Infinity);
      expect(order).toEqual([...order].sort((a, b) => a - b));
      expect(p50).not.toBeNull();
    }
  });

  it('is handed over while the studio is at work', () => {
    for (const at of [found.behind.p50, found.behind.p80, found.behind.p90]) {
      const isAtWork = problem.workingTime.some(({ start, end }) => start <= (at ?? -1) && (at ?? -1) <= end);
      expect(isAtWork).toBe(true);
    }
  });

  it('behind pushes nothing: margins and chances are those of the plan without the enquiry', () => {
    const isOther = (id: string): boolean => !id.startsWith('enquiry');
    const before = forecast(
      { ...problem, stages: problem.stages, keyDates: problem.keyDates.filter(({ id }) => isOther(id)) },
      { placements: plan.placements.filter(({ stageId }) => isOther(stageId)) },
      uncertainty,
      { draws: 200, seed: 3 },
    );
    const chances = new Map(before.keyDates.map(({ keyDateId, missChance }) => [keyDateId, missChance]));
    expect(found.behind.others).toHaveLength(2);
    for (const date of found.behind.others) {
      expect(date.missChanceAfter).toBe(chances.get(date.keyDateId));
      expect(date.marginAfter).toBe(date.marginBefore);
    }
  });

  it('among comes no later than behind where the enquiry’s own date is in danger', () => {
    expect(found.among.plannedReady).toBeLessThanOrEqual(found.behind.plannedReady ?? Infinity);
    expect(found.among.plannedReady).not.toBeNull();
  });

  it('does not begin before it may', () => {
    const later = ask({ earliestStart: 20 * DAY });
    expect(later.behind.plannedReady).toBeGreaterThan(20 * DAY);
  });

  it('says in which weeks the craft is short, no shorter than what is asked', () => {
    const { crafts, weeks } = found.shortages;
    expect(crafts.map(({ id }) => id)).toEqual(['carving']);
    expect(crafts[0].shortMinutes).toHaveLength(weeks.length);
    expect(crafts[0].shortMinutes.reduce((sum, minutes) => sum + minutes, 0)).toBeGreaterThan(0);
    crafts[0].shortMinutes.forEach((short, k) => expect(short).toBeLessThanOrEqual(crafts[0].askedMinutes[k]));
  });

  it('has no answer where it was stopped, and none for an enquiry without stages', () => {
    expect(promise(problem, plan, uncertainty, { ...options, shouldStop: () => true })).toBeNull();
    expect(() => ask({ productionId: 'nobody' })).toThrow('without stages');
  });

  it('is null beyond the horizon', () => {
    const { behind } = ask({ earliestStart: (DAYS - 1) * DAY });
    expect([behind.p50, behind.p90, behind.plannedReady]).toEqual([null, null, null]);
  });
});

describe('a plan with an enquiry fitted in', () => {
  it('keeps every rule, and every other stage where it stood', () => {
    const own = new Set(['enquiry-a', 'enquiry-b']);
    const kept = plan.placements.filter(({ stageId }) => !own.has(stageId));
    const laid = layOutBeside(problem, plan, { stageIds: own, seed: 1, tries: 5, shouldStop: () => false });
    expect(laid.placements.filter(({ stageId }) => !own.has(stageId))).toEqual(kept);
    expect(laid.placements).toHaveLength(problem.stages.length);
    expect(check(problem, laid).filter(({ rule }) => rule !== 'key-date')).toEqual([]);
  });
});

describe('the hour of handing over', () => {
  const time = [
    { start: 480, end: 960 },
    { start: 1920, end: 2400 },
  ];
  it.each([
    [500, 540],
    [960, 960],
    [961, 1920],
    [0, 480],
    [2401, null],
  ])('of what is ready at minute %d is %s', (finish, at) => {
    expect(handOverFrom(finish, time)).toBe(at);
  });
});
