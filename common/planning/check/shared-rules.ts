import type { Minute, Span } from '../../time/span';
import type { Placement } from '../problem/plan';
import type { PlaceNeed, Stage } from '../problem/problem';
import type { Unmet } from '../problem/result';
import { type Facts, hasBegun, minutesOutside, plannedWork, unmet, workEnd, workStart } from './facts';

/** Each place is one of its bays. */
export function checkBayChoice(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  if (hasBegun(stage)) return [];
  const wrong = stage.places.some((place, i) => !place.bayIds.includes(placement.bayIds[i]));
  const right = !wrong && placement.bayIds.length === stage.places.length;
  return right ? [] : [unmet('bay-choice', { stageIds: [stage.id], bayIds: placement.bayIds })];
}

/** Work in a bay is done while the bay is open. */
export function checkBayOpen(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const found: Unmet[] = [];
  for (const bayId of placement.bayIds) {
    const open = facts.open(bayId);
    if (!open) continue;
    const by = plannedWork(stage, placement).reduce((sum, span) => sum + minutesOutside(span, open), 0);
    if (by > 0) found.push(unmet('bay-open', { stageIds: [stage.id], bayIds: [bayId], by }));
  }
  return found;
}

interface Use extends Span {
  readonly stageId: string;
  readonly units: number;
}

/** At no minute is more asked of a bay than it holds. What has already begun does not quarrel with its like. */
export function checkBayCapacity(facts: Facts): Unmet[] {
  const usesByBay = new Map<string, Use[]>();
  for (const [stageId, placement] of facts.placed) {
    const stage = facts.stages.get(stageId);
    stage?.places.forEach((place, i) => {
      const bayId = placement.bayIds[i];
      const use = { stageId, units: place.units, start: workStart(placement), end: holdEnd(facts, place, placement) };
      if (use.end > use.start && use.units > 0) file(usesByBay, bayId, use);
    });
  }
  const found: Unmet[] = [];
  for (const [bayId, uses] of usesByBay) {
    const capacity = facts.bays.get(bayId)?.capacity ?? 0;
    for (const crowd of findCrowds(uses, capacity, (id) => isBegun(facts, id))) {
      found.push(unmet('bay-capacity', { ...crowd, bayIds: [bayId] }));
    }
  }
  return found;
}

function holdEnd(facts: Facts, place: PlaceNeed, placement: Placement): Minute {
  if (place.hold.kind === 'work') return workEnd(placement);
  if (place.hold.kind === 'dwell') return placement.dwellEnd;
  const last = facts.placed.get(place.hold.stageId);
  return Math.max(workEnd(placement), last ? workEnd(last) : facts.problem.horizon.end);
}

function isBegun(facts: Facts, stageId: string): boolean {
  const stage = facts.stages.get(stageId);
  return stage !== undefined && hasBegun(stage);
}

/** Nobody works on two stages at once; a maker is a thing with capacity 1. */
export function checkMakers(facts: Facts): Unmet[] {
  const usesByMaker = new Map<string, Use[]>();
  for (const [stageId, placement] of facts.placed) {
    const stage = facts.stages.get(stageId);
    if (!stage) continue;
    for (const makerId of new Set(placement.crew.map((member) => member.makerId))) {
      for (const { start, end } of plannedWork(stage, placement)) {
        if (end > start) file(usesByMaker, makerId, { start, end, stageId, units: 1 });
      }
    }
  }
  const found: Unmet[] = [];
  for (const [makerId, uses] of usesByMaker) {
    for (const crowd of findCrowds(uses, 1, () => false)) {
      found.push(unmet('maker-double-booked', { stageIds: crowd.stageIds, makerIds: [makerId], by: crowd.minutes }));
    }
  }
  return found;
}

interface Crowd {
  readonly stageIds: string[];
  readonly by: number;
  readonly minutes: number;
}

function file(uses: Map<string, Use[]>, id: string, use: Use): void {
  const known = uses.get(id);
  if (known) known.push(use);
  else uses.set(id, [use]);
}

/** Sweeps over the instants at which anything changes and gathers each unbroken stretch of too much at once. */
function findCrowds(uses: readonly Use[], capacity: number, begun: (stageId: string) => boolean): Crowd[] {
  const instants = [...new Set(uses.flatMap((use) => [use.start, use.end]))].sort((a, b) => a - b);
  const starts = [...uses].sort((a, b) => a.start - b.start);
  const crowds: { stageIds: Set<string>; by: number; minutes: number }[] = [];
  const active: Use[] = [];
  let next = 0;
  let crowded = false;
  instants.forEach((instant, i) => {
    for (let k = active.length - 1; k >= 0; k -= 1) if (active[k].end <= instant) active.splice(k, 1);
    while (next < starts.length && starts[next].start <= instant) active.push(starts[next++]);
    const over = active.reduce((sum, use) => sum + use.units, 0) - capacity;
    if (over <= 0 || active.every((use) => begun(use.stageId))) {
      crowded = false;
      return;
    }
    if (!crowded) crowds.push({ stageIds: new Set(), by: 0, minutes: 0 });
    crowded = true;
    const crowd = crowds[crowds.length - 1];
    active.forEach((use) => crowd.stageIds.add(use.stageId));
    crowd.by = Math.max(crowd.by, over);
    crowd.minutes += (instants[i + 1] ?? instant) - instant;
  });
  return crowds.map((crowd) => ({ ...crowd, stageIds: [...crowd.stageIds] }));
}
