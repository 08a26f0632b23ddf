import type { Fault } from './fault';
import type { PlaceNeed, Problem, Stage } from './problem';

/** Places that no bay can give, and holds that would never be let go. */
export function findPlaceFaults(problem: Problem): Fault[] {
  const faults: Fault[] = [];
  const capacity = new Map(problem.bays.map((bay) => [bay.id, bay.capacity]));
  const stages = new Map(problem.stages.map((stage) => [stage.id, stage]));
  const followers = new Map<string, string[]>();
  for (const link of problem.links)
    followers.set(link.fromStageId, [...(followers.get(link.fromStageId) ?? []), link.toStageId]);
  for (const stage of problem.stages) {
    stage.places.forEach((need, place) => {
      const largest = Math.max(0, ...need.bayIds.map((id) => capacity.get(id) ?? 0));
      if (need.bayIds.length === 0) faults.push({ kind: 'no-bay', stageId: stage.id, place });
      else if (largest < need.units) {
        faults.push({ kind: 'bay-too-small', stageId: stage.id, place, units: need.units, largest });
      }
      if (need.hold.kind !== 'until-stage') return;
      const last = stages.get(need.hold.stageId);
      if (last) faults.push(...holdFaults(stage, need, last, reaches(followers, stage.id, last.id), capacity));
    });
  }
  return faults;
}

function holdFaults(
  stage: Stage,
  need: PlaceNeed,
  last: Stage,
  follows: boolean,
  capacity: ReadonlyMap<string, number>,
): Fault[] {
  const faults: Fault[] = [];
  if (!follows) faults.push({ kind: 'hold-not-let-go', stageId: stage.id, untilStageId: last.id });
  if (need.bayIds.length !== 1) return faults;
  const [bayId] = need.bayIds;
  const again = last.places.find((other) => other.bayIds.length === 1 && other.bayIds[0] === bayId);
  if (again && again.units + need.units > (capacity.get(bayId) ?? 0)) {
    faults.push({ kind: 'hold-asked-again', stageId: stage.id, untilStageId: last.id, bayId });
  }
  return faults;
}

function reaches(followers: ReadonlyMap<string, readonly string[]>, from: string, to: string): boolean {
  const seen = new Set([from]);
  const open = [from];
  for (let id = open.pop(); id !== undefined; id = open.pop()) {
    for (const next of followers.get(id) ?? []) {
      if (next === to) return true;
      if (!seen.has(next)) {
        seen.add(next);
        open.push(next);
      }
    }
  }
  return false;
}
