import { forecast } from '@common/forecast';
import { Chance } from '@common/planning';
import { believedAfter, simulateStudio, type StudioHabit } from '../calibration/simulated-studio';
import { drawZ } from '../calibration/truth-laws';
import { startStopwatch } from '../budget';
import { mean, rounded, type Suite, type SuiteFigures } from './suite';

const USUAL_STUDIOS = 300;
const DRAWS = 400;
/** Margins of dates, in shares of the time from now to the planned finish. */
const LEAST_MARGIN = -0.05;
const MOST_MARGIN = 0.3;

/** One production as forecast and as it went. */
interface Outcome {
  readonly finish: number;
  readonly p10: number;
  readonly p50: number;
  readonly p80: number;
  readonly p90: number;
  readonly missChance: number;
  readonly missed: 0 | 1;
  /** Whether the plan of likely times would miss the date. */
  readonly planMisses: 0 | 1;
}

/**
 * Hundreds of simulated studios, lived through once by laws that the forecaster does not know: how often its P10, P50, P80 and P90
 * were kept, and the Brier score (Brier 1950) of its chances for dates of all margins, against the base rate and the naive plan.
 */
export const calibrationSuite: Suite = {
  about: `how true the forecast is: ${String(USUAL_STUDIOS)} simulated studios of four productions (--limit: studios)`,
  run: ({ seed, limit, say }): SuiteFigures => {
    const watch = startStopwatch();
    const studios = Math.min(limit, USUAL_STUDIOS);
    const outcomes = Array.from({ length: studios }, (_, k) => outcomesOf(seed * 10_000 + k)).flat();
    const missed = mean(outcomes.map((one) => one.missed)) ?? 0;
    const brier = mean(outcomes.map((one) => (one.missChance - one.missed) ** 2));
    const always = believe(1.2, seed);
    say(`A studio that always runs 20 % over believes after 0, 8, 24 and 48 stages: ${always.join(', ')}.`);
    return {
      studios,
      productions: outcomes.length,
      draws: DRAWS,
      seed,
      p50Coverage: share(outcomes, (one) => one.finish <= one.p50),
      p80Coverage: share(outcomes, (one) => one.finish <= one.p80),
      p90Coverage: share(outcomes, (one) => one.finish <= one.p90),
      p10p90Coverage: share(outcomes, (one) => one.finish >= one.p10 && one.finish <= one.p90),
      brier: rounded(brier, 4),
      brierBaseRate: rounded(missed * (1 - missed), 4),
      brierNaive: rounded(mean(outcomes.map((one) => (one.planMisses - one.missed) ** 2)), 4),
      missedShare: rounded(missed, 3),
      believedAfter48: always[always.length - 1],
      seconds: rounded(watch.seconds()),
    };
  },
};

function outcomesOf(seed: number): readonly Outcome[] {
  const chance = new Chance(seed + 77);
  const habit: StudioHabit = {
    overrun: 1.05 * Math.exp(0.15 * drawZ(chance)),
    luckSd: 0.08,
    curingSd: 0.06,
    spellChance: 0.01,
  };
  const { problem, plan, told, finishes } = simulateStudio(seed, habit);
  const found = forecast(problem, plan, told, { draws: DRAWS, seed: 1 });
  const ends = new Map(plan.placements.map((placement) => [placement.stageId, placement.dwellEnd]));
  return found.productions.map(({ productionId, sorted, ...spread }) => {
    const finish = finishes.get(productionId) ?? 0;
    const own = problem.stages.filter((stage) => stage.productionId === productionId);
    const planned = Math.max(...own.map(({ id }) => ends.get(id) ?? problem.horizon.end));
    // Margins from a twentieth too little to three tenths of what is still to do, so that some are safe and some are not.
    const margin = LEAST_MARGIN + (MOST_MARGIN - LEAST_MARGIN) * chance.share();
    const date = planned + Math.round((planned - problem.horizon.start) * margin);
    const late = sorted.reduce((count, one) => count + (one > date ? 1 : 0), 0);
    return {
      ...spread,
      finish,
      missChance: late / sorted.length,
      missed: finish > date ? 1 : 0,
      planMisses: planned > date ? 1 : 0,
    };
  });
}

/** Studios over which beliefs are averaged: the luck of one says little. */
const BELIEVERS = 40;

/** Per mille that studios with a habit believe to take of their estimates after more and more finished stages, on average. */
function believe(overrun: number, seed: number): readonly number[] {
  const habit: StudioHabit = { overrun, luckSd: 0.08, curingSd: 0, spellChance: 0 };
  return [0, 8, 24, 48].map((stages) => {
    const beliefs = Array.from({ length: BELIEVERS }, (_, k) => believedAfter(stages, seed * 100 + k, habit).meanLog);
    return Math.round(1000 * Math.exp(mean(beliefs) ?? 0));
  });
}

function share(outcomes: readonly Outcome[], holds: (one: Outcome) => boolean): number | null {
  return rounded(mean(outcomes.map((one) => (holds(one) ? 1 : 0))), 4);
}
