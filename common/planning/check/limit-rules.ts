import type { Span } from '../../time/span';
import type { Maker } from '../problem/problem';
import type { Unmet } from '../problem/result';
import { commonSpans, type Facts, mergeSpans, plannedWork, totalMinutes, unmet } from './facts';

/** Each maker with limits keeps the day's and the week's minutes and the rest between days. */
export function checkLimits(facts: Facts): Unmet[] {
  const found: Unmet[] = [];
  for (const maker of facts.problem.makers) {
    if (!maker.limits) continue;
    const work = workOf(facts, maker.id);
    const by = Math.max(overDay(facts, maker, work), overWeek(facts, maker, work), shortOfRest(facts, maker, work));
    if (by > 0) found.push(unmet('limits', { makerIds: [maker.id], by }));
  }
  return found;
}

function workOf(facts: Facts, makerId: string): Span[] {
  const spans: Span[] = [];
  for (const [stageId, placement] of facts.placed) {
    const stage = facts.stages.get(stageId);
    if (stage && placement.crew.some((member) => member.makerId === makerId))
      spans.push(...plannedWork(stage, placement));
  }
  return mergeSpans(spans);
}

function overDay(facts: Facts, maker: Maker, work: readonly Span[]): number {
  const most = maker.limits?.dayMinutes ?? Infinity;
  return Math.max(0, ...facts.problem.days.map((day) => totalMinutes(commonSpans([day], work)) - most));
}

function overWeek(facts: Facts, maker: Maker, work: readonly Span[]): number {
  const most = maker.limits?.weekMinutes ?? Infinity;
  const byWeek = new Map<number, number>();
  for (const day of facts.problem.days) {
    // 1970-01-05 was a Monday.
    const week = Math.floor((Date.parse(`${day.day}T00:00:00Z`) / 86_400_000 - 4) / 7);
    byWeek.set(week, (byWeek.get(week) ?? 0) + totalMinutes(commonSpans([day], work)));
  }
  return Math.max(0, ...[...byWeek.values()].map((minutes) => minutes - most));
}

function shortOfRest(facts: Facts, maker: Maker, work: readonly Span[]): number {
  const least = maker.limits?.restBetweenMinutes ?? 0;
  let short = 0;
  let dayOfLast = -1;
  let endOfLast = 0;
  for (const span of work) {
    const day = dayIndex(facts, span.start);
    if (dayOfLast >= 0 && day !== dayOfLast) short = Math.max(short, least - (span.start - endOfLast));
    dayOfLast = day;
    endOfLast = span.end;
  }
  return short;
}

function dayIndex(facts: Facts, instant: number): number {
  return facts.problem.days.findIndex((day) => day.start <= instant && instant < day.end);
}
