import type { Placement, Plan, Problem, Stage } from '@common/planning';

/** One unit of a bay taken by a stage for a while. */
export interface Occupancy {
  readonly bayId: string;
  readonly stageId: string;
  readonly slot: number;
  readonly capacity: number;
  readonly start: number;
  readonly end: number;
}

type Want = Omit<Occupancy, 'slot'>;

/**
 * Every stretch for which the plan takes a unit of a bay from the problem's start on, each in a slot of its own: the lowest that
 * is free, in the order of starts, which needs no more slots than are taken at once. A stretch that finds none gets the first
 * beyond the capacity, which the database then refuses.
 */
export function occupanciesOf(problem: Problem, plan: Plan): Occupancy[] {
  const wants = wantsOf(problem, plan).sort(
    (a, b) => a.start - b.start || a.end - b.end || compare(a.stageId, b.stageId),
  );
  const freeFrom = new Map<string, number[]>();
  return wants.map((want) => {
    const slots = freeFrom.get(want.bayId) ?? [];
    freeFrom.set(want.bayId, slots);
    const free = slots.findIndex((until) => until <= want.start);
    const slot = free === -1 ? slots.length : free;
    slots[slot] = want.end;
    return { ...want, slot };
  });
}

function wantsOf(problem: Problem, plan: Plan): Want[] {
  const stages = new Map(problem.stages.map((stage) => [stage.id, stage]));
  const capacities = new Map(problem.bays.map((bay) => [bay.id, bay.capacity]));
  const ends = new Map(plan.placements.map((placement) => [placement.stageId, endOf(placement)]));
  return plan.placements.flatMap((placement) => {
    const stage = stages.get(placement.stageId);
    return (stage?.places ?? []).flatMap((place, i) => {
      const bayId = placement.bayIds.at(i);
      const start = Math.max(placement.work[0].start, problem.horizon.start);
      const end = holdEnd(place.hold, placement, ends);
      if (bayId === undefined || end <= start) return [];
      const want = { bayId, stageId: placement.stageId, capacity: capacities.get(bayId) ?? 1, start, end };
      return Array.from({ length: place.units }, () => want);
    });
  });
}

function holdEnd(
  hold: Stage['places'][number]['hold'],
  placement: Placement,
  ends: ReadonlyMap<string, number>,
): number {
  switch (hold.kind) {
    case 'work':
      return endOf(placement);
    case 'dwell':
      return placement.dwellEnd;
    case 'until-stage':
      // As long as the later stage has no place, the dwell is all that is known.
      return Math.max(endOf(placement), ends.get(hold.stageId) ?? placement.dwellEnd);
  }
}

function endOf(placement: Placement): number {
  return placement.work[placement.work.length - 1].end;
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
