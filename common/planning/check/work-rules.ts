import type { Span } from '../../time/span';
import type { Placement } from '../problem/plan';
import type { Stage } from '../problem/problem';
import type { Unmet } from '../problem/result';
import { agePermille, profileOf } from './curing';
import {
  commonSpans,
  type Facts,
  hasBegun,
  mergeSpans,
  minutesOutside,
  plannedWork,
  totalMinutes,
  unmet,
  workEnd,
  workStart,
} from './facts';

/** Every stage has exactly one placement with work in it, and nothing else has one. */
export function checkPlacedOnce(facts: Facts, stageIds: readonly string[]): Unmet[] {
  const times = new Map<string, number>();
  for (const id of stageIds) times.set(id, (times.get(id) ?? 0) + 1);
  const unknown = [...times.keys()].filter((id) => !facts.stages.has(id));
  const wrong = facts.problem.stages.filter((stage) => times.get(stage.id) !== 1 || !facts.placed.has(stage.id));
  return [...unknown, ...wrong.map((stage) => stage.id)].map((id) => unmet('placed-once', { stageIds: [id] }));
}

/** The hands-on minutes are those that the effort asks of this crew, with the extra of each soft window missed. */
export function checkEffort(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  if (stage.progress.kind === 'finished') return [];
  const done = totalMinutes(plannedWork(stage, placement));
  const by = Math.abs(done - minutesWanted(facts, stage, placement));
  const tidy = placement.work.every(
    (span, i) => span.end >= span.start && (i === 0 || span.start >= placement.work[i - 1].end),
  );
  return by === 0 && tidy ? [] : [unmet('effort', { stageIds: [stage.id], by })];
}

function minutesWanted(facts: Facts, stage: Stage, placement: Placement): number {
  const minutes =
    stage.progress.kind === 'started'
      ? stage.progress.remainingMinutes
      : stage.effort.minutes + missedWindowMinutes(facts, stage, placement);
  if (stage.effort.kind === 'duration' || stage.crew.length === 0) return minutes;
  const paces = placement.crew.map(
    (member) =>
      facts.makers.get(member.makerId)?.crafts.find((craft) => craft.craftId === member.craftId)?.pacePermille ?? 0,
  );
  const output = paces.reduce((sum, pace) => sum + pace, 0) - stage.crewLossPermille * (paces.length - 1);
  return output > 0 ? Math.ceil((minutes * 1000) / output) : Number.MAX_SAFE_INTEGER;
}

/** Extra minutes that a stage owes for soft windows that it came too late for. */
function missedWindowMinutes(facts: Facts, stage: Stage, placement: Placement): number {
  let extra = 0;
  for (const stageId of facts.curesBefore(stage.id)) {
    const before = facts.stages.get(stageId);
    const beforePlacement = facts.placed.get(stageId);
    const window = before?.dwell?.window;
    if (!before || !beforePlacement || window?.kind !== 'soft') continue;
    if (windowOverrun(facts, before, beforePlacement, placement) > 0) extra += window.extraMinutes;
  }
  return extra;
}

/** Reference minutes (rounded up) by which a follower starts past a window; 0 when in time. */
export function windowOverrun(facts: Facts, before: Stage, beforePlacement: Placement, follower: Placement): number {
  const window = before.dwell?.window;
  if (!window) return 0;
  const profile = profileOf(facts.problem, before, beforePlacement);
  const age = agePermille(profile, workEnd(beforePlacement), workStart(follower));
  return Math.max(0, Math.ceil(age / 1000 - window.minutes));
}

/** Each need has between its least and most makers, nobody is there twice, and nobody without being asked for. */
export function checkCrewSize(_facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  if (hasBegun(stage)) return [];
  const found: Unmet[] = [];
  for (const need of stage.crew) {
    const there = placement.crew.filter((member) => member.craftId === need.craftId).length;
    const by = Math.max(need.least - there, there - need.most);
    if (by > 0) found.push(unmet('crew-size', { stageIds: [stage.id], craftIds: [need.craftId], by }));
  }
  const idle = placement.crew.filter((member) => !stage.crew.some((need) => need.craftId === member.craftId));
  const twice = placement.crew.filter(
    (member, i) => placement.crew.findIndex((other) => other.makerId === member.makerId) !== i,
  );
  for (const member of [...idle, ...twice]) {
    found.push(
      unmet('crew-size', { stageIds: [stage.id], makerIds: [member.makerId], craftIds: [member.craftId], by: 1 }),
    );
  }
  return found;
}

/** Everyone in the crew holds the craft they are there for. */
export function checkCrewCraft(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  if (hasBegun(stage)) return [];
  return placement.crew
    .filter((member) => !facts.makers.get(member.makerId)?.crafts.some((craft) => craft.craftId === member.craftId))
    .map((member) =>
      unmet('crew-craft', { stageIds: [stage.id], makerIds: [member.makerId], craftIds: [member.craftId] }),
    );
}

/** All the crew are on shift, ordinary or overtime, for every minute of the work. */
export function checkCrewShift(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const found: Unmet[] = [];
  for (const member of placement.crew) {
    const there = facts.presence(member.makerId);
    const by = plannedWork(stage, placement).reduce((sum, span) => sum + minutesOutside(span, there), 0);
    if (by > 0) found.push(unmet('crew-shift', { stageIds: [stage.id], makerIds: [member.makerId], by }));
  }
  return found;
}

/**
 * Sessions and clock stages are one stretch, and a session's lies inside one shift of each of the crew. A `shifts` stage pauses
 * only while someone of the crew is off ordinary shift, or the bay is closed.
 */
export function checkContinuity(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const work = plannedWork(stage, placement).filter((span) => span.end > span.start);
  if (work.length < 2 || stage.continuity === 'free') return [];
  const gaps = work.slice(1).map((span, i) => ({ start: work[i].end, end: span.start }));
  if (stage.continuity !== 'shifts') {
    return [unmet('continuity', { stageIds: [stage.id], by: totalMinutes(gaps) })];
  }
  let together: readonly Span[] = mergeSpans(gaps);
  for (const member of placement.crew) together = commonSpans(together, facts.shifts(member.makerId));
  for (const bayId of placement.bayIds) {
    const open = facts.open(bayId);
    if (open) together = commonSpans(together, open);
  }
  const by = totalMinutes(together);
  return by === 0 ? [] : [unmet('continuity', { stageIds: [stage.id], by })];
}

/** The dwell lasts exactly until its reference minutes are gained, and no minute less or more. */
export function checkDwell(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const end = workEnd(placement);
  if (!stage.dwell || stage.dwell.minutes === 0) {
    return placement.dwellEnd === end
      ? []
      : [unmet('dwell', { stageIds: [stage.id], by: Math.abs(placement.dwellEnd - end) })];
  }
  const profile = profileOf(facts.problem, stage, placement);
  const wanted = stage.dwell.minutes * 1000;
  const gained = agePermille(profile, end, placement.dwellEnd);
  const gainedJustBefore = agePermille(profile, end, placement.dwellEnd - 1);
  if (gained >= wanted && gainedJustBefore < wanted) return [];
  return [unmet('dwell', { stageIds: [stage.id], by: Math.max(1, Math.ceil(Math.abs(wanted - gained) / 1000)) })];
}

/** After the work one of the crew stays on shift for the attended minutes. */
export function checkAttended(facts: Facts, stage: Stage, placement: Placement): Unmet[] {
  const minutes = stage.dwell?.attendedMinutes ?? 0;
  if (minutes === 0 || stage.progress.kind === 'finished') return [];
  const watch = { start: workEnd(placement), end: workEnd(placement) + minutes };
  const away = placement.crew.map((member) => minutesOutside(watch, facts.presence(member.makerId)));
  const by = Math.min(minutes, ...away);
  return by === 0
    ? []
    : [unmet('attended', { stageIds: [stage.id], makerIds: placement.crew.map((member) => member.makerId), by })];
}
