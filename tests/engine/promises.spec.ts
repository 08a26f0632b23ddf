import { NO_FACTOR } from '@common/forecast';
import { check, level } from '@common/planning';
import { buildProblem, buildUncertainty, USUAL_SPREADS } from '@common/planning-input';
import { promise } from '@common/promise';
import { buildDemoStudio } from '@database/demo/build-demo-studio';
import { demoMorning, demoSnapshot } from '@database/demo/demo-problem';

jest.setTimeout(120_000);

const TODAY = '2026-03-02';

describe('the demo’s enquiry', () => {
  const snapshot = demoSnapshot(buildDemoStudio(TODAY));
  const problem = buildProblem(snapshot, { now: demoMorning(TODAY), horizonEnd: null });
  const { plan } = level(problem, { seed: 1, maxSchedules: 60, shouldStop: () => false });
  const productionId = snapshot.productions.find(({ state }) => state === 'tentative')?.id ?? '';
  const told: number[] = [];
  const found = promise(problem, plan, buildUncertainty(snapshot, USUAL_SPREADS, NO_FACTOR), {
    productionId,
    earliestStart: null,
    draws: 40,
    seed: 1,
    maxSchedules: 60,
    onProgress: (_, share) => told.push(share),
  });

  it('is promised both ways, later for more certainty', () => {
    for (const { p50, p80, p90 } of [found?.behind, found?.among].flatMap((way) => way ?? [])) {
      const dates = [p50, p80, p90].map((at) => at ?? Infinity);
      expect(dates).toEqual([...dates].sort((a, b) => a - b));
      expect(p50).toBeGreaterThan(problem.horizon.start);
    }
    expect(told.every((share) => share >= 0 && share <= 1)).toBe(true);
  });

  it('pushes no date of the others behind them, and shows every date of theirs', () => {
    const dates = problem.keyDates.filter((date) => date.productionId !== productionId);
    expect(found?.behind.others.map(({ keyDateId }) => keyDateId)).toEqual(dates.map(({ id }) => id));
    const end = new Map(plan.placements.map(({ stageId, dwellEnd }) => [stageId, dwellEnd]));
    found?.behind.others.forEach(({ marginAfter, missChanceAfter, missChanceBefore }, k) => {
      const ready = Math.max(...dates[k].stageIds.map((id) => end.get(id) ?? Infinity));
      expect(marginAfter).toBe(dates[k].at - ready);
      expect(missChanceAfter).toBe(missChanceBefore);
    });
  });

  it('asks for crafts and bays that the studio has', () => {
    const crafts = new Set(problem.makers.flatMap((maker) => maker.crafts.map(({ craftId }) => craftId)));
    expect(found?.shortages.crafts.length).toBeGreaterThan(0);
    expect(found?.shortages.crafts.every(({ id }) => crafts.has(id))).toBe(true);
  });

  it('leaves the levelled plan as sound as it was', () => {
    expect(check(problem, plan).every(({ rule }) => rule === 'key-date')).toBe(true);
  });
});
