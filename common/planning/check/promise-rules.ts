import type { Minute } from '../../time/span';
import type { Placement } from '../problem/plan';
import type { Stage } from '../problem/problem';
import type { Unmet } from '../problem/result';
import { type Facts, hasBegun, plannedWork, unmet, workEnd, workStart } from './facts';

/** Work lies inside the horizon; what has begun may have done so before it. */
export function checkHorizon(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const { start, end } = facts.problem.horizon;
  const work = plannedWork(stage, placement);
  const by = work.length === 0 ? 0 : Math.max(start - work[0].start, work[work.length - 1].end - end);
  return by > 0 ? [unmet('horizon', { stageIds: [stage.id], by })] : [];
}

/** Work does not begin before the stage's earliest start. */
export function checkEarliest(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const by = stage.earliestStart - workStart(placement);
  return by > 0 && !hasBegun(stage) ? [unmet('earliest', { stageIds: [stage.id], by })] : [];
}

/** Work has ended by the stage's latest end. */
export function checkLatest(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const by = stage.latestEnd === null ? 0 : workEnd(placement) - stage.latestEnd;
  return by > 0 && stage.progress.kind !== 'finished' ? [unmet('latest', { stageIds: [stage.id], by })] : [];
}

/** A visit starts when it was agreed to. */
export function checkFixed(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  if (stage.fixedStart === null || hasBegun(stage)) return [];
  const by = Math.abs(workStart(placement) - stage.fixedStart);
  return by > 0 ? [unmet('fixed', { stageIds: [stage.id], by })] : [];
}

/** A pinned stage starts, is crewed and is housed as its pin says. */
export function checkPin(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const pin = stage.pin;
  if (!pin || hasBegun(stage)) return [];
  const by = pin.start === null ? 0 : Math.abs(workStart(placement) - pin.start);
  const makersKept = pin.makerIds === null || sameMembers(pin.makerIds, crewIds(placement));
  const baysKept = pin.bayIds === null || sameList(pin.bayIds, placement.bayIds);
  return by === 0 && makersKept && baysKept ? [] : [unmet('pin', { stageIds: [stage.id], by })];
}

/** What has begun stands as it happened, with its own crew and bays. */
export function checkProgress(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const progress = stage.progress;
  if (progress.kind === 'to-do') return [];
  const sameCrew = sameMembers(progress.makerIds, crewIds(placement)) && sameList(progress.bayIds, placement.bayIds);
  const first = placement.work[0];
  const by = Math.abs(first.start - progress.start);
  const told =
    progress.kind === 'finished'
      ? placement.work.length === 1 && first.end === progress.end
      : first.end === first.start && (placement.work.length > 1 || progress.remainingMinutes === 0);
  return by === 0 && sameCrew && told ? [] : [unmet('progress', { stageIds: [stage.id], by })];
}

/** Stages issued to begin inside the freeze stand exactly as issued. */
export function checkFreeze(facts: Facts, frozenFrom: Minute): Unmet[] {
  const found: Unmet[] = [];
  for (const issued of facts.problem.issued?.placements ?? []) {
    const stage = facts.stages.get(issued.stageId);
    const placement = facts.placed.get(issued.stageId);
    if (!stage || !placement || hasBegun(stage) || issued.work.length === 0) continue;
    if (stage.fixedStart !== null || (stage.pin !== null && stage.pin.start !== null)) continue;
    const start = workStart(issued);
    if (start < frozenFrom || start >= facts.problem.freezeUntil) continue;
    const sameWork =
      issued.work.length === placement.work.length &&
      issued.work.every((span, i) => span.start === placement.work[i].start && span.end === placement.work[i].end);
    const same =
      sameWork && sameMembers(crewIds(issued), crewIds(placement)) && sameList(issued.bayIds, placement.bayIds);
    if (!same) found.push(unmet('freeze', { stageIds: [stage.id], by: Math.abs(workStart(placement) - start) }));
  }
  return found;
}

function crewIds(placement: Placement): string[] {
  return placement.crew.map((member) => member.makerId);
}

function sameMembers(a: readonly string[], b: readonly string[]): boolean {
  return sameList([...a].sort(), [...b].sort());
}

function sameList(a: readonly string[], b: readonly string[]): boolean {
  return a.length === b.length && a.every((item, i) => item === b[i]);
}
