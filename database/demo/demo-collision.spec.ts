import { check, layOutInOrder, level, type Plan, type Problem } from '@common/planning';
import { buildProblem } from '@common/planning-input';
import { startOfDay } from '@common/time/calendar-day';
import { minuteOfDay } from '@common/time/local-time';
import { buildDemoStudio } from './build-demo-studio';
import { demoProblem, demoSnapshot } from './demo-problem';

const ZONE = 'Europe/London';

/** A search so short that it takes a second or two; the interface gives it more. */
const SCHEDULES = 80;

/** Days on which the demo may be set up, and clock readings; the last week holds the change to summer time of 2027. */
const MOMENTS = [
  ['2026-12-01', '07:30'],
  ['2026-12-03', '23:00'],
  ['2026-12-04', '07:30'],
  ['2026-12-05', '10:00'],
  ['2026-12-07', '23:00'],
  ['2027-03-22', '07:30'],
] as const;

function missed(problem: Problem, plan: Plan): string[] {
  return check(problem, plan).map((unmet) => `${unmet.rule} ${unmet.keyDateId ?? unmet.stageIds.join()}`);
}

function inOrderOfEntry(problem: Problem): Plan {
  return layOutInOrder(
    problem,
    problem.stages.map((stage) => stage.id),
  );
}

function levelled(problem: Problem): Plan {
  return level(problem, { seed: 1, maxSchedules: SCHEDULES, shouldStop: () => false }).plan;
}

const MOON = 'key-date key-date:moon/technical-rehearsal';
const FOUNTAIN = 'key-date key-date:fountain/delivery';

describe('the demo', () => {
  it.each(MOMENTS)(
    'of %s at %s misses a technical rehearsal as work came, and once levelled only what can not be',
    (today, time) => {
      const now = startOfDay(today, ZONE) + minuteOfDay(time);
      const problem = buildProblem(demoSnapshot(buildDemoStudio(today)), { now, horizonEnd: null });
      expect(missed(problem, inOrderOfEntry(problem))).toEqual(expect.arrayContaining([MOON, FOUNTAIN]));
      expect(missed(problem, levelled(problem))).toEqual([FOUNTAIN]);
    },
  );
});

describe('the fountain', () => {
  const problem = demoProblem('2026-12-01');
  const date = problem.keyDates.find((one) => one.productionId === 'production:fountain');

  it('can not be ready though everybody work on nothing else', () => {
    const stages = problem.stages.filter((stage) => stage.productionId === 'production:fountain');
    const ids = new Set(stages.map((stage) => stage.id));
    const alone: Problem = {
      ...problem,
      stages,
      links: problem.links.filter((link) => ids.has(link.fromStageId)),
      keyDates: problem.keyDates.filter((one) => one.id === date?.id),
    };
    expect(missed(alone, levelled(alone))).toEqual([FOUNTAIN]);
  });

  it('waits longer for its concrete alone than there is time', () => {
    const dwells = problem.stages.filter(
      (stage) => stage.pieceId === 'piece:fountain/basin' && stage.progress.kind === 'to-do',
    );
    const minutes = dwells.reduce((sum, stage) => sum + (stage.dwell?.minutes ?? 0), 0);
    expect(minutes).toBeGreaterThan((date?.at ?? Infinity) - problem.horizon.start);
  });
});
