import { layOutInOrder, type Link, type Problem, type Stage } from '../planning';
import { forecast } from './forecast';
import { exactly } from './three-point';
import { NO_FACTOR, type StageUncertainty, type Uncertainty } from './uncertainty';

const HORIZON = 200_000;

function stage(id: string, minutes: number): Stage {
  return {
    id,
    pieceId: 'piece',
    productionId: 'production',
    effort: { kind: 'duration', minutes },
    crew: [],
    crewLossPermille: 0,
    continuity: 'clock',
    places: [],
    dwell: null,
    earliestStart: 0,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
  };
}

function after(fromStageId: string, toStageId: string): Link {
  return {
    fromStageId,
    toStageId,
    kind: 'finish-start',
    after: 'dwell',
    minGapMinutes: 0,
    maxGapMinutes: null,
    time: 'clock',
  };
}

function problemOf(stages: readonly Stage[], links: readonly Link[], date: number): Problem {
  return {
    horizon: { start: 0, end: HORIZON },
    makers: [],
    bays: [],
    stages,
    links,
    keyDates: [
      {
        id: 'date',
        productionId: 'production',
        at: date,
        strength: 'hard',
        weight: 1,
        stageIds: stages.map(({ id }) => id),
      },
    ],
    advances: [],
    days: Array.from({ length: Math.ceil(HORIZON / 1440) }, (_, k) => ({
      day: new Date(k * 86_400_000).toISOString().slice(0, 10),
      start: k * 1440,
      end: (k + 1) * 1440,
    })),
    workingTime: [{ start: 0, end: HORIZON }],
    freezeUntil: 0,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 0, earliness: 0 },
  };
}

function unsure(...stages: readonly StageUncertainty[]): Uncertainty {
  return { stages, overrun: NO_FACTOR, curing: NO_FACTOR, absence: [] };
}

function between(stageId: string, low: number, likely: number, high: number): StageUncertainty {
  return { stageId, effortMinutes: { low, likely, high }, dwellMinutes: null, delayMinutes: exactly(0) };
}

function forecastOf(problem: Problem, uncertainty: Uncertainty, seed = 1) {
  const plan = layOutInOrder(
    problem,
    problem.stages.map(({ id }) => id),
  );
  return forecast(problem, plan, uncertainty, { draws: 4000, seed });
}

describe('a forecast', () => {
  // Two independent paths that are each in time with probability one half are both in time with one quarter (merge bias):
  // NASA/UMD TR-154, 1971, on the errors of the PERT method.
  it('shows merge bias', () => {
    const problem = problemOf([stage('a', 5000), stage('b', 5000)], [], 5000);
    const both = forecastOf(problem, unsure(between('a', 2000, 5000, 8000), between('b', 2000, 5000, 8000)));
    expect(both.keyDates[0].missChance).toBeGreaterThan(0.73);
    expect(both.keyDates[0].missChance).toBeLessThan(0.77);
    const one = forecastOf(problem, unsure(between('a', 2000, 5000, 8000)));
    expect(one.keyDates[0].missChance).toBeGreaterThan(0.48);
    expect(one.keyDates[0].missChance).toBeLessThan(0.52);
  });

  // The sum of beta distributed times: mean 15000, variance the sum of (μ − a)(b − μ) / 7; normal by then within a per cent.
  it('adds a chain of stages up to the mean and spread of their sum', () => {
    const ids = ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h', 'i'];
    const problem = problemOf(
      ids.map((id) => stage(id, 1000)),
      ids.slice(1).map((id, k) => after(ids[k], id)),
      9000,
    );
    const result = forecastOf(problem, unsure(...ids.map((id) => between(id, 500, 1000, 1500))));
    const sd = Math.sqrt((9 * 500 * 500) / 7);
    expect(Math.abs(result.keyDates[0].p50 - 9000)).toBeLessThan(60);
    expect(Math.abs(result.keyDates[0].p90 - (9000 + 1.2816 * sd))).toBeLessThan(0.05 * sd + 40);
    expect(result.keyDates[0].drivers.map(({ share }) => share)).toEqual(ids.map(() => 1));
    expect(result.keyDates[0].correlations.length).toBe(9);
  });

  it('is the same for the same seed and another for another', () => {
    const problem = problemOf([stage('a', 5000), stage('b', 4000)], [after('a', 'b')], 9000);
    const times = unsure(between('a', 2000, 5000, 8000), between('b', 1000, 4000, 9000));
    expect(forecastOf(problem, times, 7)).toEqual(forecastOf(problem, times, 7));
    expect(forecastOf(problem, times, 8)).not.toEqual(forecastOf(problem, times, 7));
  });

  it('gives every quantile as the plan has it where nothing is uncertain', () => {
    const problem = problemOf([stage('a', 300), stage('b', 500)], [after('a', 'b')], 799);
    const [date] = forecastOf(problem, unsure()).keyDates;
    expect(date).toMatchObject({ p10: 800, p50: 800, p80: 800, p90: 800, missChance: 1 });
  });

  it('finds the rank correlation of the only uncertain stage to be one', () => {
    const problem = problemOf([stage('a', 300), stage('b', 500)], [after('a', 'b')], 900);
    const [date] = forecastOf(problem, unsure(between('a', 100, 300, 800))).keyDates;
    expect(date.correlations[0].stageId).toBe('a');
    expect(date.correlations[0].rank).toBeGreaterThan(0.99);
  });

  it('delays what waits for something from outside', () => {
    const problem = problemOf([stage('a', 300)], [], 900);
    const late: StageUncertainty = {
      stageId: 'a',
      effortMinutes: exactly(300),
      dwellMinutes: null,
      delayMinutes: { low: 0, likely: 0, high: 4000 },
    };
    const [date] = forecastOf(problem, unsure(late)).keyDates;
    expect(date.p10).toBeGreaterThan(300);
    // PERT mean of the delay is 667 minutes; the date leaves 600.
    expect(date.missChance).toBeGreaterThan(0.3);
    expect(date.missChance).toBeLessThan(0.6);
  });

  it('stops early when asked and says how many draws it made', () => {
    const problem = problemOf([stage('a', 300)], [], 900);
    const plan = layOutInOrder(problem, ['a']);
    const result = forecast(problem, plan, unsure(), { draws: 1000, seed: 1, shouldStop: () => true });
    expect(result.draws).toBe(1);
  });
});
