import type { Minute } from '../../time/span';
import type { Link } from '../problem/link';
import type { Placement } from '../problem/plan';
import type { Unmet } from '../problem/result';
import { commonSpans, type Facts, hasBegun, totalMinutes, unmet, workEnd, workStart } from './facts';
import { windowOverrun } from './work-rules';

/** Every link keeps its least and its greatest gap. What both stages have behind them is not judged. */
export function checkLinks(facts: Facts): Unmet[] {
  const found: Unmet[] = [];
  for (const link of facts.problem.links) {
    const from = facts.placed.get(link.fromStageId);
    const to = facts.placed.get(link.toStageId);
    if (!from || !to || isHistory(facts, link)) continue;
    const stageIds = [link.fromStageId, link.toStageId];
    const start = firstEnd(link, from);
    const end = link.kind.endsWith('start') ? workStart(to) : workEnd(to);
    const gap = gapBetween(facts, link, start, end);
    const short = link.minGapMinutes - gap;
    if (short > 0) found.push(unmet('link-min', { stageIds, by: short }));
    else if (link.minGapMinutes >= 0 && end < start) found.push(unmet('link-min', { stageIds, by: start - end }));
    const long = link.maxGapMinutes === null ? 0 : gap - link.maxGapMinutes;
    if (long > 0) found.push(unmet('link-max', { stageIds, by: long }));
  }
  return found;
}

function isHistory(facts: Facts, link: Link): boolean {
  const to = facts.stages.get(link.toStageId);
  if (!to) return true;
  // The start of what has begun, and the end of what has finished, is no longer the plan's to choose.
  return link.kind.endsWith('start') ? hasBegun(to) : to.progress.kind === 'finished';
}

function firstEnd(link: Link, from: Placement): Minute {
  if (link.kind.startsWith('start')) return workStart(from);
  return link.after === 'work' ? workEnd(from) : from.dwellEnd;
}

function gapBetween(facts: Facts, link: Link, start: Minute, end: Minute): number {
  if (link.time === 'clock') return end - start;
  const between = (a: Minute, b: Minute): number => totalMinutes(commonSpans([{ start: a, end: b }], facts.working));
  return end >= start ? between(start, end) : -between(end, start);
}

/** Followers of a dwell with a hard window start before it closes. A soft window is paid for instead: see the effort rule. */
export function checkWindows(facts: Facts): Unmet[] {
  const found: Unmet[] = [];
  for (const [stageId, placement] of facts.placed) {
    const stage = facts.stages.get(stageId);
    if (!stage || hasBegun(stage)) continue;
    for (const beforeId of facts.curesBefore(stageId)) {
      const before = facts.stages.get(beforeId);
      const beforePlacement = facts.placed.get(beforeId);
      if (!before || !beforePlacement || before.dwell?.window?.kind !== 'hard') continue;
      const by = windowOverrun(facts, before, beforePlacement, placement);
      if (by > 0) found.push(unmet('window', { stageIds: [beforeId, stageId], by }));
    }
  }
  return found;
}

/** No hard key date is passed by a stage that it waits for, and none waits for a stage that has no place. */
export function checkKeyDates(facts: Facts): Unmet[] {
  const found: Unmet[] = [];
  for (const date of facts.problem.keyDates) {
    if (date.strength !== 'hard') continue;
    const late = date.stageIds.filter((id) => (facts.placed.get(id)?.dwellEnd ?? Infinity) > date.at);
    if (late.length === 0) continue;
    const ends = late.map((id) => facts.placed.get(id)?.dwellEnd ?? facts.problem.horizon.end);
    found.push(unmet('key-date', { stageIds: late, keyDateId: date.id, by: Math.max(1, Math.max(...ends) - date.at) }));
  }
  return found;
}
