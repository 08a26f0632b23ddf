import type { Link, Maker, Plan, Problem, Stage } from '@common/planning';

/** Monday 2026-01-05, 00:00 UTC. */
export const MON = 29_459_520;
export const H = 60;
export const D = 1440;

/** An instant by day (0 is Monday) and hour, in minutes since 1970. */
export function at(day: number, hour: number, minute = 0): number {
  return MON + day * D + hour * H + minute;
}

/** A stage that takes an hour of nobody's time, but for the changes. */
export function stage(id: string, changes: Partial<Stage> = {}): Stage {
  return {
    id,
    pieceId: 'piece',
    productionId: 'production',
    effort: { kind: 'duration', minutes: 60 },
    crew: [],
    crewLossPermille: 0,
    continuity: 'clock',
    places: [],
    dwell: null,
    earliestStart: MON,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
    ...changes,
  };
}

/** A finish-start link without a gap, but for the changes. */
export function link(fromStageId: string, toStageId: string, changes: Partial<Link> = {}): Link {
  return {
    fromStageId,
    toStageId,
    kind: 'finish-start',
    after: 'dwell',
    minGapMinutes: 0,
    maxGapMinutes: null,
    time: 'clock',
    ...changes,
  };
}

/** A maker who works Monday to Friday, 8 to 12 and 13 to 17, for two weeks. */
export function maker(id: string, crafts: Readonly<Record<string, number>>, changes: Partial<Maker> = {}): Maker {
  return {
    id,
    crafts: Object.entries(crafts).map(([craftId, pacePermille]) => ({ craftId, pacePermille })),
    shifts: workdays().flatMap((day) => [
      { start: at(day, 8), end: at(day, 12) },
      { start: at(day, 13), end: at(day, 17) },
    ]),
    overtime: [],
    hourCostMinor: 2000,
    overtimeHourCostMinor: 3000,
    limits: null,
    ...changes,
  };
}

/** The working days of two weeks, counted from the first Monday. */
export function workdays(): number[] {
  return [0, 1, 2, 3, 4, 7, 8, 9, 10, 11];
}

/** Two weeks of an empty studio, but for the changes. */
export function studio(changes: Partial<Problem>): Problem {
  return {
    horizon: { start: MON, end: MON + 14 * D },
    makers: [],
    bays: [],
    stages: [],
    links: [],
    keyDates: [],
    advances: [],
    days: Array.from({ length: 14 }, (_, d) => ({
      day: new Date((MON + d * D) * 60_000).toISOString().slice(0, 10),
      start: MON + d * D,
      end: MON + (d + 1) * D,
    })),
    workingTime: workdays().map((day) => ({ start: at(day, 8), end: at(day, 17) })),
    freezeUntil: MON,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 1, earliness: 1 },
    ...changes,
  };
}

/** When a stage of a plan starts; NaN where it has no place. */
export function startOf(plan: Plan, stageId: string): number {
  return plan.placements.find((placement) => placement.stageId === stageId)?.work[0].start ?? NaN;
}
