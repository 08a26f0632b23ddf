import { forecast, NO_FACTOR, type Forecast } from '@common/forecast';
import { drivingChain, level, type Plan, type Problem } from '@common/planning';
import { buildProblem, buildUncertainty, USUAL_SPREADS, type StudioSnapshot } from '@common/planning-input';
import {
  applyMeasures,
  FIRST_TERMS,
  priceOf,
  proposeMeasures,
  searchRescues,
  type Measure,
  type RescueQuestion,
} from '@common/rescue';
import { buildDemoStudio } from '@database/demo/build-demo-studio';
import { demoMorning, demoSnapshot } from '@database/demo/demo-problem';
import { startStopwatch } from '../budget';
import { rounded, type Suite, type SuiteFigures } from './suite';

const TODAY = '2026-12-01';
/** As many as the server asks for at most. */
const DRAWS = 300;
const EXHAUSTIVE_SCHEDULES = 40;
const MOST_DRIVERS = 8;

/** How long a search for rescues of the demo's impossible date takes, and whether its cheapest is what weighing every one finds. */
export const rescueSuite: Suite = {
  about: 'rescues of the demo’s date that can’t be met, against weighing every single one thoroughly',
  run: ({ seed, say }): SuiteFigures => {
    const question = impossibleDate(seed);
    const watch = startStopwatch();
    const found = searchRescues(question, { isCancelled: () => false, tell: () => undefined });
    const seconds = watch.seconds();
    const goal = question.terms.goalPermille;
    const saving = found.rescues.filter(
      ({ measures, odds }) => measures.length === 1 && odds.missChance * 1000 <= goal,
    );
    const listed = candidates(question);
    const exhaustive = listed
      .map((measure) => ({ measure, missChance: missChanceWith(question, measure) }))
      .filter(({ missChance }) => missChance * 1000 <= goal)
      .map(({ measure }) => priceOf(measure, question.snapshot, question.terms));
    say(`${String(listed.length)} single measures, of which ${String(exhaustive.length)} save the date.`);
    return {
      seed,
      instances: 1,
      draws: DRAWS,
      seconds: rounded(seconds),
      weighed: found.weighed,
      listed: listed.length,
      savingAlone: exhaustive.length,
      cheapestFoundMinor: cheapest(saving.map(({ priceMinor }) => priceMinor)),
      cheapestOfAllMinor: cheapest(exhaustive),
    };
  },
};

function impossibleDate(seed: number): RescueQuestion {
  const snapshot = demoSnapshot(buildDemoStudio(TODAY));
  const now = demoMorning(TODAY);
  const problem = problemOf(snapshot, now);
  const { plan, unmet } = level(problem, { seed, maxSchedules: 100, shouldStop: () => false });
  const keyDateId = unmet.find(({ rule }) => rule === 'key-date')?.keyDateId;
  if (keyDateId === undefined || keyDateId === null) throw new Error('Every date of the demo can be met.');
  const beliefs = { spreads: USUAL_SPREADS, overrun: NO_FACTOR, draws: DRAWS, seed };
  return { snapshot, plan, now, keyDateId, terms: FIRST_TERMS, ...beliefs };
}

/** The list that the search chooses from: whatever the terms allow that touches what drives the date. */
function candidates(question: RescueQuestion): readonly Measure[] {
  const { snapshot, plan, now, keyDateId, terms } = question;
  const problem = problemOf(snapshot, now);
  const date = liveThrough(question, problem, plan, snapshot).keyDates.find((one) => one.keyDateId === keyDateId);
  const chain = drivingChain(problem, plan, keyDateId).steps.map((step) => step.stageId);
  const drivers = [...(date?.drivers.map(({ stageId }) => stageId) ?? []), ...chain];
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  const risk = {
    keyDateId,
    p90: date?.p90 ?? now,
    driverIds: [...new Set(drivers)].slice(0, MOST_DRIVERS),
    makersOf: (id: string) => placed.get(id)?.crew.map(({ makerId }) => makerId) ?? [],
    baysOf: (id: string) => placed.get(id)?.bayIds ?? [],
    now,
  };
  return proposeMeasures(snapshot, risk, terms);
}

function missChanceWith(question: RescueQuestion, measure: Measure): number {
  const changed = applyMeasures(question.snapshot, [measure]);
  const problem = problemOf(changed, question.now);
  const options = { seed: question.seed, maxSchedules: EXHAUSTIVE_SCHEDULES, shouldStop: () => false };
  const { keyDates } = liveThrough(question, problem, level(problem, options).plan, changed);
  return keyDates.find((date) => date.keyDateId === question.keyDateId)?.missChance ?? 1;
}

function problemOf(snapshot: StudioSnapshot, now: number): Problem {
  return buildProblem(snapshot, { now, horizonEnd: null });
}

function liveThrough(question: RescueQuestion, problem: Problem, plan: Plan, snapshot: StudioSnapshot): Forecast {
  const { spreads, overrun, draws, seed } = question;
  return forecast(problem, plan, buildUncertainty(snapshot, spreads, overrun), { draws, seed });
}

function cheapest(prices: readonly number[]): number | null {
  return prices.length === 0 ? null : Math.min(...prices);
}
