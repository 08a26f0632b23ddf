import type { Placement, Plan } from '../problem/plan';
import type { PlanChange } from './plan-change';

/** Every way in which stages stand otherwise in one plan than in another, in the order of their times; several for one stage. */
export function comparePlans(before: Plan, after: Plan): PlanChange[] {
  const was = new Map(before.placements.map((placement) => [placement.stageId, placement]));
  const is = new Map(after.placements.map((placement) => [placement.stageId, placement]));
  const changes: PlanChange[] = [];
  const inOrder = (placements: Iterable<Placement>): Placement[] =>
    [...placements].sort((a, b) => startOf(a) - startOf(b) || (a.stageId < b.stageId ? -1 : 1));
  for (const placement of inOrder(was.values())) {
    if (!is.has(placement.stageId))
      changes.push({ kind: 'removed', stageId: placement.stageId, start: startOf(placement) });
  }
  for (const placement of inOrder(is.values())) {
    const old = was.get(placement.stageId);
    if (old) changes.push(...compareStage(old, placement));
    else changes.push({ kind: 'added', stageId: placement.stageId, start: startOf(placement) });
  }
  return changes;
}

function compareStage(before: Placement, after: Placement): PlanChange[] {
  const { stageId } = after;
  const changes: PlanChange[] = [];
  if (startOf(before) !== startOf(after)) {
    changes.push({ kind: 'moved', stageId, from: startOf(before), to: startOf(after) });
  } else if (endOf(before) !== endOf(after)) {
    changes.push({ kind: 'reshaped', stageId, fromEnd: endOf(before), toEnd: endOf(after) });
  }
  const had = before.crew.map((member) => member.makerId);
  const has = after.crew.map((member) => member.makerId);
  const left = had.filter((id) => !has.includes(id)).sort();
  const joined = has.filter((id) => !had.includes(id)).sort();
  if (left.length + joined.length > 0) changes.push({ kind: 'crew', stageId, left, joined });
  if (before.bayIds.join('\n') !== after.bayIds.join('\n')) {
    changes.push({ kind: 'bay', stageId, from: before.bayIds, to: after.bayIds });
  }
  return changes;
}

function startOf(placement: Placement): number {
  return placement.work[0]?.start ?? 0;
}

function endOf(placement: Placement): number {
  return placement.work[placement.work.length - 1]?.end ?? 0;
}
