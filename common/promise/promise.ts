import { forecast, type Forecast, type Uncertainty } from '../forecast';
import {
  check,
  isBetter,
  layOutBeside,
  level,
  measure,
  type KeyDate,
  type Plan,
  type Problem,
  type Stage,
} from '../planning';
import type { Minute } from '../time/span';
import { handOverFrom } from './hand-over';
import { shortagesOf, type Shortages } from './shortages';

/** `behind`: the plan stands and the enquiry fits into what is left. `among`: everything is levelled with it. */
export type WayOfLaying = 'behind' | 'among';

/** What becomes of a key date of another production; margins by the clock, negative when missed, chances from 0 to 1. */
export interface PushedDate {
  readonly keyDateId: string;
  readonly marginBefore: number;
  readonly marginAfter: number;
  readonly missChanceBefore: number;
  readonly missChanceAfter: number;
}

/** What one way of laying the enquiry comes to. Instants are null where the enquiry finds no place before the horizon's end. */
export interface PromiseWay {
  /** The earliest hand-over that holds in so large a share of the draws. */
  readonly p50: Minute | null;
  readonly p80: Minute | null;
  readonly p90: Minute | null;
  /** When it is ready by the plan itself, without chance. */
  readonly plannedReady: Minute | null;
  /** Stages of any production by the share of draws in which they are on the chain that leads to the delivery, most often first. */
  readonly drivers: readonly { readonly stageId: string; readonly share: number }[];
  /** The enquiry's own key dates. */
  readonly asked: readonly { readonly keyDateId: string; readonly missChance: number }[];
  /** Key dates of all other productions, in the problem's order. */
  readonly others: readonly PushedDate[];
}

/** The answer to “can we?”. Nothing in it has been stored, and the plan that was asked about is untouched. */
export interface Promised {
  readonly draws: number;
  readonly seed: number;
  readonly behind: PromiseWay;
  readonly among: PromiseWay;
  readonly shortages: Shortages;
}

/** What is being worked on, in this order. */
export type PromiseStep = 'behind' | 'among' | 'simulating';

export interface PromiseOptions {
  readonly productionId: string;
  /** The enquiry is not begun before; null for as soon as can be. */
  readonly earliestStart: Minute | null;
  readonly draws: number;
  /** Any integer; the same question and seed give the same answer. */
  readonly seed: number;
  /** Most passes of the generation scheme when everything is levelled. */
  readonly maxSchedules: number;
  readonly shouldStop?: () => boolean;
  readonly onProgress?: (step: PromiseStep, share: number) => void;
}

const ORDERS_TRIED_BEHIND = 48;
const WHEN_DELIVERED = 'when it can be delivered';

/**
 * Lays a production into a plan without touching the plan, behind everything and among everything, and lives through both many
 * times with common random numbers, so that what differs is the enquiry's doing. Behind, the enquiry gives way in every draw too,
 * so that nothing is pushed there. Null where it was stopped before there was anything to say. Throws on a production without stages.
 */
export function promise(
  problem: Problem,
  plan: Plan,
  uncertainty: Uncertainty,
  options: PromiseOptions,
): Promised | null {
  const shouldStop = options.shouldStop ?? (() => false);
  const tell = options.onProgress ?? (() => undefined);
  const own = new Set(problem.stages.filter(isOf(options.productionId)).map(({ id }) => id));
  if (own.size === 0) throw new RangeError('An enquiry without stages can not be promised.');
  const asked = withQuestion(problem, plan, options, own);
  const fitIn = { stageIds: own, seed: options.seed, tries: ORDERS_TRIED_BEHIND, shouldStop };
  tell('behind', 0);
  const behindPlan = layOutBeside(asked, plan, fitIn);
  const others = { placements: behindPlan.placements.filter(({ stageId }) => !own.has(stageId)) };
  const alone = { placements: layOutBeside(onlyOwn(asked, own), { placements: [] }, fitIn).placements };
  tell('among', 0);
  const amongPlan = levelled(asked, behindPlan, { ...options, shouldStop, tell });
  const live = (laid: Plan, step: number, givesWay?: ReadonlySet<string>): Forecast => {
    let made = 0;
    const look = (): boolean => {
      tell('simulating', (step + made / options.draws) / 2);
      made += 1;
      return shouldStop();
    };
    return forecast(asked, laid, uncertainty, { draws: options.draws, seed: options.seed, shouldStop: look, givesWay });
  };
  if (shouldStop()) return null;
  const behind = live(behindPlan, 0, own);
  const among = live(amongPlan, 1);
  if (shouldStop()) return null;
  const before = { plan: behindPlan, forecast: behind };
  return {
    draws: behind.draws,
    seed: options.seed,
    behind: wayOf(asked, own, before, before),
    among: wayOf(asked, own, { plan: amongPlan, forecast: among }, before),
    shortages: shortagesOf(asked, others, alone),
  };
}

/** The problem with the enquiry's earliest start, its delivery as a date that nothing hangs on, and only dates that can be told. */
function withQuestion(
  problem: Problem,
  plan: Plan,
  { productionId, earliestStart }: PromiseOptions,
  own: ReadonlySet<string>,
): Problem {
  const placed = new Set([...plan.placements.map(({ stageId }) => stageId), ...own]);
  const delivered: KeyDate = {
    id: WHEN_DELIVERED,
    productionId,
    at: problem.horizon.end,
    strength: 'wished',
    weight: 1,
    stageIds: [...own],
  };
  const told = problem.keyDates.filter(({ stageIds }) => stageIds.length > 0 && stageIds.every((id) => placed.has(id)));
  const notBefore = (stage: Stage): Stage =>
    own.has(stage.id) ? { ...stage, earliestStart: Math.max(stage.earliestStart, earliestStart ?? 0) } : stage;
  return { ...problem, stages: problem.stages.map(notBefore), keyDates: [...told, delivered] };
}

/** Everything levelled with the enquiry; where that comes out no better by the studio's own wishes, as it stands behind. */
function levelled(
  problem: Problem,
  behind: Plan,
  given: PromiseOptions & {
    readonly shouldStop: () => boolean;
    readonly tell: (step: PromiseStep, share: number) => void;
  },
): Plan {
  const { seed, maxSchedules, shouldStop, tell } = given;
  const found = level(problem, {
    seed,
    maxSchedules,
    shouldStop,
    onProgress: ({ schedules }) => tell('among', Math.min(1, schedules / maxSchedules)),
  });
  const standing = measure(problem, behind, check(problem, behind));
  return isBetter(standing, found.objective, problem.weights) ? behind : found.plan;
}

/** The enquiry with the studio to itself. */
function onlyOwn(problem: Problem, own: ReadonlySet<string>): Problem {
  return {
    ...problem,
    stages: problem.stages.filter(({ id }) => own.has(id)),
    links: problem.links.filter(({ fromStageId, toStageId }) => own.has(fromStageId) && own.has(toStageId)),
    keyDates: [],
    issued: null,
    freezeUntil: problem.horizon.start,
  };
}

interface Lived {
  readonly plan: Plan;
  readonly forecast: Forecast;
}

function wayOf(problem: Problem, own: ReadonlySet<string>, lived: Lived, before: Lived): PromiseWay {
  const dates = new Map(lived.forecast.keyDates.map((date) => [date.keyDateId, date]));
  const datesBefore = new Map(before.forecast.keyDates.map((date) => [date.keyDateId, date]));
  const delivery = dates.get(WHEN_DELIVERED);
  const promised = (finish: Minute | undefined): Minute | null =>
    finish === undefined || finish >= problem.horizon.end ? null : handOverFrom(finish, problem.workingTime);
  const isOwn = ({ stageIds }: KeyDate): boolean => stageIds.every((id) => own.has(id));
  const known = problem.keyDates.filter(({ id }) => id !== WHEN_DELIVERED);
  return {
    p50: promised(delivery?.p50),
    p80: promised(delivery?.p80),
    p90: promised(delivery?.p90),
    plannedReady: readyBy(lived.plan, [...own]),
    drivers: delivery?.drivers ?? [],
    asked: known.filter(isOwn).map(({ id }) => ({ keyDateId: id, missChance: dates.get(id)?.missChance ?? 1 })),
    others: known
      .filter((date) => !isOwn(date))
      .map((date) => ({
        keyDateId: date.id,
        marginBefore: date.at - (readyBy(before.plan, date.stageIds) ?? problem.horizon.end),
        marginAfter: date.at - (readyBy(lived.plan, date.stageIds) ?? problem.horizon.end),
        missChanceBefore: datesBefore.get(date.id)?.missChance ?? 1,
        missChanceAfter: dates.get(date.id)?.missChance ?? 1,
      })),
  };
}

/** When the last of some stages is over, dwell included; null where one has no place. */
function readyBy(plan: Plan, stageIds: readonly string[]): Minute | null {
  const ends = new Map(plan.placements.map(({ stageId, dwellEnd }) => [stageId, dwellEnd]));
  return stageIds.reduce<Minute | null>((last, id) => {
    const end = ends.get(id);
    return last === null || end === undefined ? null : Math.max(last, end);
  }, -Infinity);
}

function isOf(productionId: string): (stage: Stage) => boolean {
  return (stage) => stage.productionId === productionId;
}
