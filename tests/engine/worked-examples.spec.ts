import {
  check,
  craftLoad,
  level,
  levelWithinDates,
  type LevelResult,
  measure,
  type Plan,
  type Problem,
  type Stage,
} from '@common/planning';
import { link, maker, MON, stage, studio } from './support/small-studio';

/**
 * The levelling example of a set of university lecture slides on resource levelling: eleven activities and one resource. Durations
 * and demands as printed; the logic is rebuilt from the printed early and late starts, and gives the printed profile. The sum of
 * squares of the early profile, 743, is published; 701, the least of all 3,185 schedules within float, was found by exhaustion; the
 * lengths under a cap were computed by hand-checked serial generation with priority by latest start, then name.
 */
const ACTIVITIES: Readonly<Record<string, { readonly days: number; readonly hands: number; readonly after: string }>> =
  {
    A: { days: 3, hands: 3, after: '' },
    B: { days: 5, hands: 2, after: '' },
    C: { days: 6, hands: 3, after: 'A' },
    D: { days: 2, hands: 4, after: 'A' },
    E: { days: 3, hands: 2, after: 'D' },
    F: { days: 3, hands: 1, after: 'D' },
    G: { days: 4, hands: 3, after: 'B' },
    H: { days: 5, hands: 2, after: 'G' },
    I: { days: 4, hands: 3, after: 'C' },
    J: { days: 2, hands: 4, after: 'IEF' },
    K: { days: 3, hands: 5, after: 'J' },
  };
/** One "day" of the example is a quarter of an hour here, so that a unit of load is a quarter hour. */
const DAY = 15;

function example(hands: number, horizonDays: number): Problem {
  const horizon = { start: MON, end: MON + horizonDays * DAY };
  const stages = Object.entries(ACTIVITIES).map(([id, { days, hands: wanted }]) =>
    stage(id, {
      effort: { kind: 'duration', minutes: days * DAY },
      crew: [{ craftId: 'craft', least: wanted, most: wanted }],
      continuity: 'session',
    }),
  );
  return studio({
    horizon,
    stages,
    links: Object.entries(ACTIVITIES).flatMap(([to, { after }]) => [...after].map((from) => link(from, to))),
    makers: Array.from({ length: hands }, (_, k) => maker(`maker-${k}`, { craft: 1000 }, { shifts: [horizon] })),
    days: Array.from({ length: horizonDays }, (_, d) => ({
      day: `day-${d}`,
      start: MON + d * DAY,
      end: MON + (d + 1) * DAY,
    })),
    workingTime: [horizon],
    keyDates: [
      { id: 'end', productionId: 'production', at: MON + 18 * DAY, strength: 'hard', weight: 1, stageIds: ['K', 'H'] },
    ],
  });
}

/** All at their earliest, everybody there who is needed: the early profile. */
function earlyPlan(problem: Problem): Plan {
  const ends = new Map<string, number>();
  const busy = new Map<string, number>();
  const starts = new Map<string, number>();
  for (const [id, { days, after }] of Object.entries(ACTIVITIES)) {
    const start = Math.max(MON, ...[...after].map((before) => ends.get(before) ?? MON));
    starts.set(id, start);
    ends.set(id, start + days * DAY);
  }
  const inTime = Object.keys(ACTIVITIES).sort((a, b) => (starts.get(a) ?? 0) - (starts.get(b) ?? 0));
  return {
    placements: inTime.map((id) => {
      const start = starts.get(id) ?? MON;
      const end = ends.get(id) ?? MON;
      const crew = problem.makers.filter((one) => (busy.get(one.id) ?? MON) <= start).slice(0, ACTIVITIES[id].hands);
      for (const one of crew) busy.set(one.id, end);
      return {
        stageId: id,
        work: [{ start, end }],
        crew: crew.map((one) => ({ makerId: one.id, craftId: 'craft' })),
        bayIds: [],
        dwellEnd: end,
      };
    }),
  };
}

describe('the levelling example', () => {
  const problem = example(20, 18);
  const early = earlyPlan(problem);

  it('has the published early profile and sum of squares', () => {
    expect(check(problem, early)).toEqual([]);
    const [{ cells }] = craftLoad(problem, early);
    expect(cells.map((cell) => cell.loadMinutes / DAY)).toEqual([5, 5, 5, 9, 9, 9, 9, 9, 6, 5, 5, 5, 5, 6, 4, 5, 5, 5]);
    expect(measure(problem, early, []).unevenness).toBe(743);
  });

  it('is evened to 713 or less, and never below what is possible', () => {
    const { objective, unmet } = levelWithinDates(problem, early, {
      seed: 1,
      maxSchedules: 200,
      shouldStop: () => false,
    });
    expect(unmet).toEqual([]);
    expect(objective.unevenness).toBeLessThanOrEqual(713);
    expect(objective.unevenness).toBeGreaterThanOrEqual(701);
  });

  it.each([
    [9, 18],
    [8, 18],
    [7, 19],
    [6, 22],
    [5, 27],
  ])('with a bay of %i takes no longer than the %i days of serial generation by latest start', (capacity, days) => {
    const result = levelCapped(capacity);
    expect(result.unmet).toEqual([]);
    const makespan = Math.max(...result.plan.placements.map((one) => one.dwellEnd)) - MON;
    expect(makespan).toBeLessThanOrEqual(days * DAY);
    // The work alone takes 111 unit days, and the longest path 18 days.
    expect(makespan).toBeGreaterThanOrEqual(Math.max(18, Math.ceil(111 / capacity)) * DAY);
  });

  it('is never quicker with less', () => {
    const spans = [9, 8, 7, 6, 5].map((capacity) =>
      Math.max(...levelCapped(capacity).plan.placements.map((one) => one.dwellEnd)),
    );
    expect(spans).toEqual([...spans].sort((a, b) => a - b));
  });
});

function levelCapped(capacity: number): LevelResult {
  const base = example(0, 60);
  const stages = base.stages.map((one): Stage => ({
    ...one,
    crew: [],
    continuity: 'clock',
    places: [{ bayIds: ['bay'], units: ACTIVITIES[one.id].hands, hold: { kind: 'work' } }],
  }));
  const problem = { ...base, stages, keyDates: [], bays: [{ id: 'bay', capacity, open: null }] };
  return level(problem, { seed: 1, maxSchedules: 500, shouldStop: () => false });
}
