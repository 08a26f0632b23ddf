import type { Problem, Stage } from '../problem/problem';
import { CapacityCurve, type Supply } from './capacity-curve';
import { leastWorkMinutes } from './work-reach';

/** A craft, a bay or a set of them as a supply of capacity, and the least that each stage takes of it. */
export interface EnergySource {
  readonly kind: 'craft' | 'bay';
  readonly ids: readonly string[];
  readonly curve: CapacityCurve;
  /** By position of the stage: least maker-minutes times pace in permille, or unit-minutes of a bay. */
  readonly demands: readonly number[];
}

/** Every craft alone, all crafts together, and every choice of bays that stages ask for. */
export function energySources(problem: Problem): EnergySource[] {
  const crafts = [...new Set(problem.stages.flatMap((stage) => stage.crew.map((need) => need.craftId)))].sort();
  const sets = crafts.length > 1 ? [...crafts.map((craft) => [craft]), crafts] : crafts.map((craft) => [craft]);
  const choices = new Map<string, readonly string[]>();
  for (const stage of problem.stages)
    for (const place of stage.places) choices.set([...place.bayIds].sort().join('\n'), place.bayIds);
  return [
    ...sets.map((ids) => craftSource(problem, ids)),
    ...[...choices.values()].map((ids) => baySource(problem, ids)),
  ];
}

function craftSource(problem: Problem, ids: readonly string[]): EnergySource {
  const supplies: Supply[] = [];
  let slowest = Infinity;
  for (const maker of problem.makers) {
    const paces = maker.crafts.filter((craft) => ids.includes(craft.craftId)).map((craft) => craft.pacePermille);
    if (paces.length === 0) continue;
    const rate = Math.max(...paces);
    slowest = Math.min(slowest, ...paces);
    for (const { start, end } of [...maker.shifts, ...maker.overtime]) supplies.push({ start, end, rate });
  }
  const demands = problem.stages.map((stage) =>
    craftDemand(problem, stage, ids, Number.isFinite(slowest) ? slowest : 0),
  );
  return { kind: 'craft', ids, curve: new CapacityCurve(supplies), demands };
}

/** Shared-out work by one set of crafts takes all its minutes at the usual pace; else the least crew for the least time. */
function craftDemand(problem: Problem, stage: Stage, ids: readonly string[], slowest: number): number {
  if (stage.progress.kind === 'finished' || stage.continuity === 'clock') return 0;
  const needs = stage.crew.filter((need) => ids.includes(need.craftId));
  if (needs.length === 0) return 0;
  if (stage.effort.kind === 'person-minutes' && needs.length === stage.crew.length) {
    const minutes = stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes;
    return minutes * 1000;
  }
  const least = needs.reduce((sum, need) => sum + need.least, 0);
  const minutes = leastWorkMinutes(problem, stage);
  return Number.isFinite(minutes) ? least * minutes * slowest : 0;
}

function baySource(problem: Problem, ids: readonly string[]): EnergySource {
  const bays = problem.bays.filter((bay) => ids.includes(bay.id));
  const rate = bays.reduce((sum, bay) => sum + bay.capacity, 0);
  const forEver: Supply = { start: problem.horizon.start, end: problem.horizon.end + 10_000_000, rate };
  return {
    kind: 'bay',
    ids,
    curve: new CapacityCurve([forEver]),
    demands: problem.stages.map((stage) => bayDemand(problem, stage, ids)),
  };
}

/** A place that must be in one of these bays is occupied for the work at least. */
function bayDemand(problem: Problem, stage: Stage, ids: readonly string[]): number {
  if (stage.progress.kind === 'finished') return 0;
  const units = stage.places.reduce(
    (sum, place) => sum + (place.bayIds.every((id) => ids.includes(id)) ? place.units : 0),
    0,
  );
  const minutes = leastWorkMinutes(problem, stage);
  return units > 0 && Number.isFinite(minutes) ? units * minutes : 0;
}
