import type { Span } from '../../time/span';
import type { LoadCell } from '../problem/explanation';
import type { Placement, Plan } from '../problem/plan';
import type { Maker, Problem, Stage } from '../problem/problem';

/** Load against capacity of one craft, maker or bay, a cell for each studio day of the problem in order. */
export interface LoadRow {
  readonly id: string;
  readonly cells: readonly LoadCell[];
}

/**
 * Person-minutes asked of each craft by day, against those there: the ordinary minutes of all who hold it. A maker with several
 * crafts counts in full for each, so the capacities of crafts do not add up to the studio's.
 */
export function craftLoad(problem: Problem, plan: Plan): LoadRow[] {
  const asked = new Map<string, Float64Array>();
  const ids = new Set(problem.stages.flatMap((stage) => stage.crew.map((need) => need.craftId)));
  for (const maker of problem.makers) for (const craft of maker.crafts) ids.add(craft.craftId);
  for (const id of ids) asked.set(id, new Float64Array(problem.days.length));
  forEachPlaced(problem, plan, (stage, placement) => {
    for (const { craftId } of placement.crew) {
      const load = asked.get(craftId);
      if (load) for (const span of workLeft(stage, placement)) spread(problem, load, span, 1);
    }
  });
  return [...ids].sort().map((id) => {
    const holders = problem.makers.filter((maker) => maker.crafts.some((craft) => craft.craftId === id));
    return toRow(problem, id, asked.get(id), shiftMinutes(problem, holders));
  });
}

/** Minutes of work of each maker by day, overtime included, against the ordinary minutes of their shifts. */
export function makerLoad(problem: Problem, plan: Plan): LoadRow[] {
  const asked = new Map(problem.makers.map((maker) => [maker.id, new Float64Array(problem.days.length)]));
  forEachPlaced(problem, plan, (stage, placement) => {
    for (const makerId of new Set(placement.crew.map((member) => member.makerId))) {
      const load = asked.get(makerId);
      if (load) for (const span of workLeft(stage, placement)) spread(problem, load, span, 1);
    }
  });
  return byId(problem.makers).map((maker) =>
    toRow(problem, maker.id, asked.get(maker.id), shiftMinutes(problem, [maker])),
  );
}

/**
 * Minutes for which units of each bay are taken by day, holds through dwells included, against the minutes there: its capacity
 * times the day's length, closed hours included, because a cure sits there through them.
 */
export function bayLoad(problem: Problem, plan: Plan): LoadRow[] {
  const asked = new Map(problem.bays.map((bay) => [bay.id, new Float64Array(problem.days.length)]));
  const ends = new Map(
    plan.placements.map((placement) => [placement.stageId, placement.work[placement.work.length - 1]?.end]),
  );
  forEachPlaced(problem, plan, (stage, placement) => {
    stage.places.forEach((place, i) => {
      const load = asked.get(placement.bayIds[i]);
      const workEnd = placement.work[placement.work.length - 1].end;
      let end = place.hold.kind === 'dwell' ? placement.dwellEnd : workEnd;
      if (place.hold.kind === 'until-stage') end = Math.max(end, ends.get(place.hold.stageId) ?? problem.horizon.end);
      if (load) spread(problem, load, { start: placement.work[0].start, end }, place.units);
    });
  });
  return byId(problem.bays).map((bay) => {
    const capacity = Float64Array.from(problem.days, (day) => (day.end - day.start) * bay.capacity);
    return toRow(problem, bay.id, asked.get(bay.id), capacity);
  });
}

function forEachPlaced(problem: Problem, plan: Plan, see: (stage: Stage, placement: Placement) => void): void {
  const stages = new Map(problem.stages.map((stage) => [stage.id, stage]));
  for (const placement of plan.placements) {
    const stage = stages.get(placement.stageId);
    if (stage && placement.work.length > 0) see(stage, placement);
  }
}

/** Finished work counts on the days when it was done; begun work from now on only. */
function workLeft(stage: Stage, placement: Placement): readonly Span[] {
  return stage.progress.kind === 'started' ? placement.work.slice(1) : placement.work;
}

function shiftMinutes(problem: Problem, makers: readonly Maker[]): Float64Array {
  const capacity = new Float64Array(problem.days.length);
  for (const maker of makers) for (const shift of maker.shifts) spread(problem, capacity, shift, 1);
  return capacity;
}

/** Adds a span's minutes, times units, to the days that it touches. */
function spread(problem: Problem, minutes: Float64Array, span: Span, units: number): void {
  const { days } = problem;
  let low = 0;
  let high = days.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (days[middle].end > span.start) high = middle;
    else low = middle + 1;
  }
  for (let day = low; day < days.length && days[day].start < span.end; day += 1) {
    const shared = Math.min(span.end, days[day].end) - Math.max(span.start, days[day].start);
    if (shared > 0) minutes[day] += shared * units;
  }
}

function toRow(problem: Problem, id: string, load: Float64Array | undefined, capacity: Float64Array): LoadRow {
  const cells = problem.days.map((day, d) => ({
    day: day.day,
    loadMinutes: load?.[d] ?? 0,
    capacityMinutes: capacity[d],
  }));
  return { id, cells };
}

function byId<T extends { readonly id: string }>(items: readonly T[]): T[] {
  return [...items].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
}
