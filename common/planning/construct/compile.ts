import { SENSELESS } from '../problem/fault';
import type { Problem, Stage } from '../problem/problem';
import { findAmountFaults } from '../problem/validate-amounts';
import { findIdFaults } from '../problem/validate-ids';
import { Calendar, NEVER } from './calendar';
import { compileLinks } from './compile-links';
import { compileMakers } from './compile-makers';
import { compileWork } from './compile-work';
import type { Compiled, CompiledBays, CompiledDates } from './compiled';
import { WorkingClock } from './working-clock';

/** Turns a problem into numbers. Throws on one that makes no sense (see `SENSELESS`); what merely cannot be met is left to the search. */
export function compile(problem: Problem): Compiled {
  const senseless = [...findIdFaults(problem), ...findAmountFaults(problem)].filter((fault) =>
    SENSELESS.has(fault.kind),
  );
  if (senseless.length > 0) throw new Error(`The problem makes no sense: ${JSON.stringify(senseless[0])}`);
  const origin = problem.horizon.start;
  const horizonMinutes = problem.horizon.end - origin;
  const stages = sortById(problem.stages);
  const makers = sortById(problem.makers);
  const bays = sortById(problem.bays);
  const craftIds = [...new Set(stages.flatMap((stage) => stage.crew.map((need) => need.craftId)))].sort();
  const stageIndex = indexOf(stages);
  const compiledMakers = compileMakers(problem, makers);
  return {
    problem,
    origin,
    horizonMinutes,
    stageCount: stages.length,
    stages,
    stageIndex,
    makerIds: makers.map((maker) => maker.id),
    bayIds: bays.map((bay) => bay.id),
    craftIds,
    work: compileWork(problem, stages, stageIndex, makers, compiledMakers, indexOf(bays), craftIds),
    links: compileLinks(problem, stages.length, stageIndex),
    makers: compiledMakers,
    bays: {
      capacity: Int32Array.from(bays, (bay) => bay.capacity),
      open: bays.map((bay) => bay.open && Calendar.of(bay.open, origin, horizonMinutes)),
      frees: findFreed(stages, stageIndex),
    },
    dates: compileDates(problem, stages, stageIndex),
    workingClock: new WorkingClock(Calendar.of(problem.workingTime, origin, horizonMinutes)),
  };
}

/** Items in the order of their ids. */
export function sortById<T extends { readonly id: string }>(items: readonly T[]): T[] {
  return [...items].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
}

function indexOf(items: readonly { readonly id: string }[]): Map<string, number> {
  return new Map(items.map((item, i) => [item.id, i]));
}

function findFreed(stages: readonly Stage[], index: ReadonlyMap<string, number>): CompiledBays['frees'] {
  const frees: number[][] = stages.map(() => []);
  stages.forEach((stage, i) => {
    for (const place of stage.places) {
      if (place.hold.kind === 'until-stage') frees[index.get(place.hold.stageId) ?? i].push(i);
    }
  });
  return frees.map((holders) => [...new Set(holders)]);
}

function compileDates(problem: Problem, stages: readonly Stage[], index: ReadonlyMap<string, number>): CompiledDates {
  const dates = sortById(problem.keyDates);
  const productions = [...new Set(stages.map((stage) => stage.productionId))].sort();
  const productionIndex = new Map(productions.map((id, i) => [id, i]));
  return {
    count: dates.length,
    at: Int32Array.from(dates, (date) => Math.max(-NEVER, Math.min(NEVER, date.at - problem.horizon.start))),
    weight: Float64Array.from(dates, (date) => date.weight),
    isHard: Uint8Array.from(dates, (date) => (date.strength === 'hard' ? 1 : 0)),
    stages: dates.map((date) => Int32Array.from(date.stageIds, (id) => index.get(id) ?? -1)),
    productionOf: Int32Array.from(stages, (stage) => productionIndex.get(stage.productionId) ?? 0),
    productionCount: productions.length,
  };
}
