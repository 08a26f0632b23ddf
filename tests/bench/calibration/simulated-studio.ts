import {
  learnOverrun,
  type LogFactor,
  type PastStage,
  type StageUncertainty,
  type Uncertainty,
} from '@common/forecast';
import { Chance, level, Replay, type Plan, type Problem } from '@common/planning';
import type { Span } from '@common/time/span';
import { randomStudio } from '../../engine/support/random-studio';
import { drawZ, DWELL_LAWS, statedPoints, WORK_LAWS, type TruthLaw } from './truth-laws';

/** A studio whose work is still ahead, what its forecaster is told, and how it truly went. */
export interface SimulatedStudio {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly told: Uncertainty;
  /** When each production was truly finished, in minutes UTC, by id. */
  readonly finishes: ReadonlyMap<string, number>;
}

/** How a studio truly runs. The forecaster is told none of it. */
export interface StudioHabit {
  /** Its work takes so many times what is estimated. */
  readonly overrun: number;
  /** How much productions differ in their luck: standard deviation of the logarithm. */
  readonly luckSd: number;
  readonly curingSd: number;
  /** Chance a day that a maker falls away, for one to three days. */
  readonly spellChance: number;
}

const PAST_PRODUCTIONS = 6;
const PAST_STAGES_EACH = 8;
const SCHEDULES = 20;
/** What every studio is told of absence: the share of days that spells come to on average. */
const USUAL_ABSENCE = 0.02;
const USUAL_CURING_SD = 0.06;

/** Makes a studio with its past, plans it on what is estimated, and lives it once through as it truly goes. */
export function simulateStudio(seed: number, habit: StudioHabit): SimulatedStudio {
  const chance = new Chance(seed);
  const base = randomStudio({ seed, productions: 4, piecesPerProduction: 1, makers: 5, weeks: 24, tricky: false });
  const laws = new Map(base.stages.map((stage) => [stage.id, lawsOf(chance)]));
  const known = base.stages.map((stage): StageUncertainty => {
    const { work, dwell } = laws.get(stage.id) ?? lawsOf(chance);
    return {
      stageId: stage.id,
      // The plan is made with the likeliest; the median lies above it.
      effortMinutes: statedPoints(work, stage.effort.minutes / work.mode),
      dwellMinutes: stage.dwell && statedPoints(dwell, stage.dwell.minutes / dwell.mode),
      delayMinutes: { low: 0, likely: 0, high: 0 },
    };
  });
  const { plan } = level(base, { seed: 1, maxSchedules: SCHEDULES, shouldStop: () => false });
  const told: Uncertainty = {
    stages: known,
    overrun: learnOverrun(pastOf(chance, habit)),
    curing: { meanLog: 0, sdLog: USUAL_CURING_SD },
    absence: base.makers.map(({ id }) => ({ makerId: id, perDay: USUAL_ABSENCE })),
  };
  return { problem: base, plan, told, finishes: liveOnce(base, plan, laws, habit, chance) };
}

/** What a studio's finished work teaches it, after so many stages. */
export function believedAfter(stages: number, seed: number, habit: StudioHabit): LogFactor {
  return learnOverrun(pastOf(new Chance(seed), habit).slice(0, stages));
}

interface Laws {
  readonly work: TruthLaw;
  readonly dwell: TruthLaw;
}

function lawsOf(chance: Chance): Laws {
  return { work: WORK_LAWS[chance.below(WORK_LAWS.length)], dwell: DWELL_LAWS[chance.below(DWELL_LAWS.length)] };
}

function pastOf(chance: Chance, habit: StudioHabit): PastStage[] {
  return Array.from({ length: PAST_PRODUCTIONS }, (_, p) => {
    const luck = Math.exp(habit.luckSd * drawZ(chance));
    return Array.from({ length: PAST_STAGES_EACH }, (): PastStage => {
      const { work } = lawsOf(chance);
      const median = 120 + 60 * chance.below(14);
      const actualMinutes = Math.round(median * work.at(drawZ(chance)) * habit.overrun * luck);
      return { productionId: `past-${p}`, estimate: statedPoints(work, median), actualMinutes };
    });
  }).flat();
}

function liveOnce(
  problem: Problem,
  plan: Plan,
  laws: ReadonlyMap<string, Laws>,
  habit: StudioHabit,
  chance: Chance,
): ReadonlyMap<string, number> {
  const replay = new Replay(problem, plan);
  const curing = Math.exp(habit.curingSd * drawZ(chance));
  const lucks = new Map(
    [...new Set(problem.stages.map((stage) => stage.productionId))].map((id) => [
      id,
      Math.exp(habit.luckSd * drawZ(chance)),
    ]),
  );
  const productions = new Map(problem.stages.map((stage) => [stage.id, stage.productionId]));
  replay.stageIds.forEach((id, k) => {
    const { work, dwell } = laws.get(id) ?? lawsOf(chance);
    const luck = lucks.get(productions.get(id) ?? '') ?? 1;
    const [workZ, dwellZ] = [drawZ(chance), drawZ(chance)];
    if (replay.effortMinutes[k] > 0) {
      const minutes = (replay.effortMinutes[k] / work.mode) * work.at(workZ) * habit.overrun * luck;
      replay.effortMinutes[k] = Math.max(1, Math.round(minutes));
    }
    replay.dwellAge[k] = Math.round((replay.dwellAge[k] / dwell.mode) * dwell.at(dwellZ) * curing);
  });
  replay.makerIds.forEach((_, maker) => replay.setAbsence(maker, spells(problem, habit, chance)));
  replay.run();
  const finishes = new Map<string, number>();
  replay.stageIds.forEach((id, k) => {
    const production = productions.get(id) ?? '';
    const finish = replay.finishOf(k) + problem.horizon.start;
    finishes.set(production, Math.max(finishes.get(production) ?? 0, finish));
  });
  return finishes;
}

/** Days away come in spells, not one by one as the forecaster takes them to. */
function spells({ days }: Problem, { spellChance }: StudioHabit, chance: Chance): Span[] {
  const away: Span[] = [];
  for (let day = 0; day < days.length; day += 1) {
    if (chance.share() >= spellChance) continue;
    const last = Math.min(days.length, day + 1 + chance.below(3));
    for (; day < last; day += 1) away.push(days[day]);
  }
  return away;
}
