import type { Problem, Stage } from '../problem/problem';

/** start(to) >= start(from) + lag, by positions of stages. */
export interface Lag {
  readonly from: number;
  readonly to: number;
  readonly lag: number;
}

/** A bay as a renewable resource: what each stage takes of it while it runs. */
export interface TimedBay {
  readonly capacity: number;
  /** By position of the stage. */
  readonly demands: readonly number[];
}

/** Makers who are always on shift, and what each stage needs of their crafts. */
export interface TimedCrews {
  readonly makerIds: readonly string[];
  readonly craftIds: readonly string[];
  /** `holds[maker][craft]`. */
  readonly holds: readonly (readonly boolean[])[];
  /** `needs[stage][craft]`: how many at once. */
  readonly needs: readonly (readonly number[])[];
}

/**
 * The part of the planning problem that exact search takes on: every stage runs unbroken for a known time, bays are always open,
 * makers always on shift, and all that is sought is an early end of one production. Minutes count from the horizon's start.
 */
export interface TimedModel {
  readonly problem: Problem;
  readonly durations: readonly number[];
  readonly earliest: readonly number[];
  /** Latest starts. */
  readonly latest: readonly number[];
  readonly lags: readonly Lag[];
  readonly bays: readonly TimedBay[];
  readonly crews: TimedCrews | null;
}

/** The problem as a timed model; null where it has anything that exact search does not know. */
export function timedModel(problem: Problem): TimedModel | null {
  const { stages, horizon } = problem;
  if (!isOnlyTimed(problem)) return null;
  const positions = new Map(stages.map((stage, k) => [stage.id, k]));
  const durations = stages.map((stage) => stage.effort.minutes);
  const lags = lagsOf(problem, positions, durations);
  if (lags === null) return null;
  return {
    problem,
    durations,
    earliest: stages.map((stage) => Math.max(0, stage.earliestStart - horizon.start)),
    latest: stages.map((stage, k) => Math.min(horizon.end, stage.latestEnd ?? Infinity) - horizon.start - durations[k]),
    lags,
    bays: problem.bays.map((bay) => ({
      capacity: bay.capacity,
      demands: stages.map((stage) => unitsOf(stage, bay.id)),
    })),
    crews: stages.some((stage) => stage.crew.length > 0) ? crewsOf(problem) : null,
  };
}

function isOnlyTimed(problem: Problem): boolean {
  const { stages, horizon } = problem;
  const productions = new Set(stages.map((stage) => stage.productionId));
  const areMakersAlwaysThere = problem.makers.every(
    ({ shifts, overtime, limits }) =>
      shifts.length === 1 &&
      shifts[0].start <= horizon.start &&
      shifts[0].end >= horizon.end &&
      overtime.length === 0 &&
      limits === null,
  );
  const hasCrews = stages.some((stage) => stage.crew.length > 0);
  return (
    productions.size === 1 &&
    problem.keyDates.length === 0 &&
    problem.issued === null &&
    problem.freezeUntil <= horizon.start &&
    (!hasCrews || (areMakersAlwaysThere && problem.days.length === 0)) &&
    problem.bays.every((bay) => bay.open === null) &&
    stages.every(isTimed)
  );
}

function isTimed(stage: Stage): boolean {
  const isUnbroken = stage.continuity === 'clock' || stage.continuity === 'session' || stage.effort.minutes === 0;
  return (
    isUnbroken &&
    stage.effort.kind === 'duration' &&
    stage.crew.every((need) => need.least === need.most) &&
    stage.places.every((place) => place.bayIds.length === 1 && place.hold.kind === 'work') &&
    stage.dwell === null &&
    stage.fixedStart === null &&
    stage.pin === null &&
    stage.progress.kind === 'to-do'
  );
}

/** Links as lags between starts, both ends of the gap; null for a gap in working time. */
function lagsOf(problem: Problem, positions: ReadonlyMap<string, number>, durations: readonly number[]): Lag[] | null {
  const lags: Lag[] = [];
  for (const link of problem.links) {
    const from = positions.get(link.fromStageId);
    const to = positions.get(link.toStageId);
    if (from === undefined || to === undefined) continue;
    if (link.time === 'working' && (link.minGapMinutes !== 0 || link.maxGapMinutes !== null)) return null;
    const leaves = link.kind === 'finish-start' || link.kind === 'finish-finish' ? durations[from] : 0;
    const enters = link.kind === 'finish-finish' || link.kind === 'start-finish' ? durations[to] : 0;
    const shift = leaves - enters;
    lags.push({ from, to, lag: link.minGapMinutes + shift });
    if (link.maxGapMinutes !== null) lags.push({ from: to, to: from, lag: -(link.maxGapMinutes + shift) });
  }
  return lags;
}

function unitsOf(stage: Stage, bayId: string): number {
  return stage.places.reduce((sum, place) => sum + (place.bayIds[0] === bayId ? place.units : 0), 0);
}

function crewsOf(problem: Problem): TimedCrews {
  const craftIds = [...new Set(problem.stages.flatMap((stage) => stage.crew.map((need) => need.craftId)))].sort();
  return {
    makerIds: problem.makers.map((maker) => maker.id),
    craftIds,
    holds: problem.makers.map((maker) =>
      craftIds.map((craftId) => maker.crafts.some((craft) => craft.craftId === craftId)),
    ),
    needs: problem.stages.map((stage) =>
      craftIds.map((craftId) => stage.crew.reduce((sum, need) => sum + (need.craftId === craftId ? need.least : 0), 0)),
    ),
  };
}
