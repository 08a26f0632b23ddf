import { forecast, pertMoments } from '@common/forecast';
import { Chance } from '@common/planning';
import { normalShareBelow } from '@common/forecast/normal';
import { believedAfter, simulateStudio } from './simulated-studio';
import { drawZ, DWELL_LAWS, statedPoints, WORK_LAWS } from './truth-laws';

const HABIT = { overrun: 1.2, luckSd: 0.08, curingSd: 0.06, spellChance: 0.01 };

describe('a simulated studio', () => {
  it.each([...WORK_LAWS, ...DWELL_LAWS])('is told of $name what one job in a hundred stays under and over', (law) => {
    const { low, likely, high } = statedPoints(law, 100);
    expect(low).toBeLessThan(likely);
    expect(likely).toBeLessThan(high);
    const chance = new Chance(5);
    const draws = Array.from({ length: 20_000 }, () => 100 * law.at(drawZ(chance)));
    const share = (holds: (one: number) => boolean): number => draws.filter(holds).length / draws.length;
    expect(share((one) => one < low)).toBeCloseTo(normalShareBelow(-2.3263), 2);
    expect(share((one) => one > high)).toBeCloseTo(0.01, 2);
    expect(share((one) => one < 100)).toBeCloseTo(0.5, 1);
  });

  it('goes the same way each time it is made, and another way with another seed', () => {
    const [first, again, other] = [simulateStudio(3, HABIT), simulateStudio(3, HABIT), simulateStudio(4, HABIT)];
    expect(again.finishes).toEqual(first.finishes);
    expect(other.finishes).not.toEqual(first.finishes);
  });

  it('keeps the truth from the forecaster: what it is told does not change with how it goes', () => {
    const { told, problem, plan, finishes } = simulateStudio(3, { ...HABIT, overrun: 1 });
    for (const { effortMinutes } of told.stages) expect(pertMoments(effortMinutes).mean).toBeGreaterThan(0);
    const { productions } = forecast(problem, plan, told, { draws: 50, seed: 1 });
    expect(productions.map(({ productionId }) => productionId).sort()).toEqual([...finishes.keys()].sort());
  });

  it('that always runs a fifth over stops believing its estimates', () => {
    const seeds = Array.from({ length: 40 }, (_, k) => k + 1);
    const believed = (stages: number): number =>
      seeds.reduce((sum, seed) => sum + Math.exp(believedAfter(stages, seed, HABIT).meanLog), 0) / seeds.length;
    expect(believed(0)).toBeCloseTo(1.05, 6);
    expect(believed(8)).toBeGreaterThan(1.08);
    expect(believed(48)).toBeGreaterThan(1.14);
    expect(believed(48)).toBeLessThan(1.26);
  });
});
