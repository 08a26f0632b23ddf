import { forecast, type Forecast, type LogFactor } from '../forecast';
import { bayLoad, craftLoad, level, type LoadRow, type Plan, type Problem } from '../planning';
import { buildProblem, buildUncertainty, type StudioSnapshot, type UsualSpreads } from '../planning-input';
import type { CalendarDay, Minute } from '../time/span';
import { addDays } from '../time/calendar-day';

/** A production that the studio is asked for, and everything that an answer needs. */
export interface PromiseQuestion {
  /** The studio with the production, tentative, in it. */
  readonly snapshot: StudioSnapshot;
  /** The working plan; where it has the production already, that is passed over. */
  readonly plan: Plan;
  readonly now: Minute;
  readonly productionId: string;
  readonly spreads: UsualSpreads;
  readonly overrun: LogFactor;
  readonly draws: number;
  readonly seed: number;
}

/** `behind` leaves all other work where it is; `among` lets everything make way as the dates allow. */
export type PromiseWay = 'behind' | 'among';

/** Another production's date, without the enquiry and with it. */
export interface Pushed {
  readonly keyDateId: string;
  readonly missChanceBefore: number;
  readonly missChance: number;
  /** Minutes by which it is ready later in four of five draws; negative where sooner. */
  readonly laterMinutes: number;
}

/** A week in which a craft or a bay has nearly nothing left. Minutes of the whole studio, `ownMinutes` of the enquiry. */
export interface ShortWeek {
  readonly id: string;
  readonly monday: CalendarDay;
  readonly loadMinutes: number;
  readonly ownMinutes: number;
  readonly capacityMinutes: number;
}

/** What the studio could promise one way. Instants are ready times that the share of draws keeps. */
export interface Promised {
  readonly way: PromiseWay;
  /** As planned with likely times. */
  readonly planned: Minute;
  readonly p50: Minute;
  readonly p80: Minute;
  readonly p90: Minute;
  /** Stages of the enquiry without a place before the horizon's end; a promise is worth nothing where there are any. */
  readonly unplacedStageIds: readonly string[];
  readonly pushed: readonly Pushed[];
  readonly shortCrafts: readonly ShortWeek[];
  readonly shortBays: readonly ShortWeek[];
}

export interface PromiseHooks {
  readonly isCancelled: () => boolean;
  readonly tell: (progress: { readonly weighed: number; readonly of: number }) => void;
}

const WAYS: readonly PromiseWay[] = ['behind', 'among'];
const SCHEDULES = 60;
/** From this share of its capacity on a week is short. */
const SHORT_SHARE = 0.9;
/** A chance that moves by less is the same chance. */
const SAME_CHANCE = 0.02;
const DAYS_A_WEEK = 7;

/**
 * Lays a production into the working plan in two ways and says when it could be ready, what it would push and what is short. The
 * production's own dates are put aside, so that it is laid out as early as the others' dates allow. Nothing is changed by asking.
 * Deterministic by seed; a cancel leaves the ways weighed so far.
 */
export function findPromise(question: PromiseQuestion, hooks: PromiseHooks): readonly Promised[] {
  const promised: Promised[] = [];
  const without = forecastWithout(question);
  for (const way of WAYS) {
    if (hooks.isCancelled()) break;
    promised.push(layIn(question, way, without));
    hooks.tell({ weighed: promised.length, of: WAYS.length });
  }
  return promised;
}

function layIn(question: PromiseQuestion, way: PromiseWay, without: Forecast): Promised {
  const { now, seed, productionId } = question;
  const snapshot = way === 'behind' ? holdOthers(asEarly(question), question) : asEarly(question);
  const problem = buildProblem(snapshot, { now, horizonEnd: null });
  const { plan } = level(problem, { seed, maxSchedules: SCHEDULES, shouldStop: () => false });
  const own = new Set(problem.stages.filter((stage) => stage.productionId === productionId).map((stage) => stage.id));
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  // Pins are for laying out; a forecast lives with what truly ties.
  const free = buildProblem(question.snapshot, { now, horizonEnd: problem.horizon.end });
  const lived = liveThrough(question, free, plan);
  const fan = lived.productions.find((production) => production.productionId === productionId);
  const ends = [...own].flatMap((id) => placed.get(id)?.dwellEnd ?? []);
  const workable = (at: Minute): Minute => handOver(problem, at);
  return {
    way,
    planned: workable(Math.max(now, ...ends)),
    p50: workable(fan?.p50 ?? now),
    p80: workable(fan?.p80 ?? now),
    p90: workable(fan?.p90 ?? now),
    unplacedStageIds: [...own].filter((id) => !placed.has(id)),
    pushed: pushedIn(question, without, lived),
    ...shortIn(free, plan, own),
  };
}

/** The studio with the production's own dates put aside for one wish: as soon as can be. */
function asEarly({ snapshot, productionId, now }: PromiseQuestion): StudioSnapshot {
  const soon = { id: `soon ${productionId}`, at: now, strength: 'wished' as const, weight: 1, pieceIds: [] };
  return {
    ...snapshot,
    productions: snapshot.productions.map((production) =>
      production.id === productionId ? { ...production, keyDates: [soon] } : production,
    ),
  };
}

/** Every other stage pinned to where the plan has it. */
function holdOthers(snapshot: StudioSnapshot, { plan, productionId }: PromiseQuestion): StudioSnapshot {
  const own = piecesOf(snapshot, productionId);
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  return {
    ...snapshot,
    stages: snapshot.stages.map((stage) => {
      const place = placed.get(stage.id);
      if (own.has(stage.pieceId) || !place || place.work.length === 0) return stage;
      const makerIds = place.crew.map(({ makerId }) => makerId);
      const pin = { start: place.work[0].start, makerIds: makerIds.length > 0 ? makerIds : null, bayIds: place.bayIds };
      return { ...stage, pin };
    }),
  };
}

function forecastWithout(question: PromiseQuestion): Forecast {
  const { snapshot, plan, productionId, now } = question;
  const own = piecesOf(snapshot, productionId);
  const without: StudioSnapshot = {
    ...snapshot,
    productions: snapshot.productions.filter(({ id }) => id !== productionId),
    pieces: snapshot.pieces.filter(({ id }) => !own.has(id)),
    stages: snapshot.stages.filter(({ pieceId }) => !own.has(pieceId)),
  };
  const kept = new Set(without.stages.map(({ id }) => id));
  const problem = buildProblem(without, { now, horizonEnd: null });
  return liveThrough(question, problem, {
    placements: plan.placements.filter(({ stageId }) => kept.has(stageId)),
  });
}

function liveThrough(
  { snapshot, spreads, overrun, draws, seed }: PromiseQuestion,
  problem: Problem,
  plan: Plan,
): Forecast {
  return forecast(problem, plan, buildUncertainty(snapshot, spreads, overrun), { draws, seed });
}

function piecesOf({ pieces }: StudioSnapshot, productionId: string): ReadonlySet<string> {
  return new Set(pieces.filter((piece) => piece.productionId === productionId).map(({ id }) => id));
}

/** Dates of others whose chance moves, the most harmed first. */
function pushedIn({ snapshot, productionId }: PromiseQuestion, without: Forecast, lived: Forecast): readonly Pushed[] {
  const own = snapshot.productions.find(({ id }) => id === productionId)?.keyDates.map(({ id }) => id) ?? [];
  const before = new Map(without.keyDates.map((date) => [date.keyDateId, date]));
  return lived.keyDates
    .flatMap(({ keyDateId, missChance, p80 }): Pushed[] => {
      const was = before.get(keyDateId);
      if (!was || own.includes(keyDateId)) return [];
      const isSame = Math.abs(missChance - was.missChance) <= SAME_CHANCE;
      return isSame ? [] : [{ keyDateId, missChanceBefore: was.missChance, missChance, laterMinutes: p80 - was.p80 }];
    })
    .sort((a, b) => b.missChance - b.missChanceBefore - (a.missChance - a.missChanceBefore));
}

function shortIn(problem: Problem, plan: Plan, own: ReadonlySet<string>): Pick<Promised, 'shortCrafts' | 'shortBays'> {
  const ownPart: Plan = { placements: plan.placements.filter(({ stageId }) => own.has(stageId)) };
  return {
    shortCrafts: shortWeeks(craftLoad(problem, plan), craftLoad(problem, ownPart)),
    shortBays: shortWeeks(bayLoad(problem, plan), bayLoad(problem, ownPart)),
  };
}

/** Weeks in which the enquiry asks for something and little is left. */
function shortWeeks(all: readonly LoadRow[], own: readonly LoadRow[]): readonly ShortWeek[] {
  const ownById = new Map(own.map((row) => [row.id, row]));
  return all.flatMap((row) => {
    const weeks = new Map<CalendarDay, { load: number; own: number; capacity: number }>();
    row.cells.forEach((cell, d) => {
      const monday = mondayOf(cell.day);
      const week = weeks.get(monday) ?? { load: 0, own: 0, capacity: 0 };
      week.load += cell.loadMinutes;
      week.own += ownById.get(row.id)?.cells[d].loadMinutes ?? 0;
      week.capacity += cell.capacityMinutes;
      weeks.set(monday, week);
    });
    return [...weeks].flatMap(([monday, week]): ShortWeek[] => {
      if (week.own <= 0 || week.load < SHORT_SHARE * week.capacity) return [];
      const [loadMinutes, ownMinutes, capacityMinutes] = [week.load, week.own, week.capacity].map(Math.round);
      return [{ id: row.id, monday, loadMinutes, ownMinutes, capacityMinutes }];
    });
  });
}

function mondayOf(day: CalendarDay): CalendarDay {
  const weekday = new Date(`${day}T00:00Z`).getUTCDay();
  return addDays(day, -((weekday + DAYS_A_WEEK - 1) % DAYS_A_WEEK));
}

/** Nobody hands over at night: the first instant from then on at which the studio works. */
function handOver({ workingTime }: Problem, at: Minute): Minute {
  const span = workingTime.find(({ end }) => end > at);
  return span ? Math.max(at, span.start) : at;
}
