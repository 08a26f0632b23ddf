import type { Minute, Span } from '../../time/span';
import type { Placement } from '../problem/plan';
import type { Maker, Problem, Stage } from '../problem/problem';
import { ageAt, profileWhere } from '../problem/age';

/**
 * Money that the plan itself costs, in minor units: overtime worked, freelancers' ordinary hours, soft windows missed. Staff are
 * paid anyway and cost nothing here. Part hours are paid to the minute and the sum is rounded up once.
 */
export function planCost(problem: Problem, placed: ReadonlyMap<string, Placement>): number {
  const makers = new Map(problem.makers.map((maker) => [maker.id, maker]));
  let minorTimesSixty = 0;
  for (const stage of problem.stages) {
    const placement = placed.get(stage.id);
    if (!placement || stage.progress.kind === 'finished') continue;
    const work = stage.progress.kind === 'started' ? placement.work.slice(1) : placement.work;
    for (const { makerId } of placement.crew) {
      const maker = makers.get(makerId);
      if (maker) minorTimesSixty += wageTimesSixty(maker, work);
    }
  }
  return Math.ceil(minorTimesSixty / 60) + missedWindowCost(problem, placed);
}

function wageTimesSixty(maker: Maker, work: readonly Span[]): number {
  const ordinary = maker.paidByTheHour === true ? minutesIn(work, maker.shifts) * maker.hourCostMinor : 0;
  return ordinary + minutesIn(work, maker.overtime) * maker.overtimeHourCostMinor;
}

function minutesIn(work: readonly Span[], spans: readonly Span[]): number {
  let minutes = 0;
  for (const span of work) {
    for (let i = firstEndingAfter(spans, span.start); i < spans.length && spans[i].start < span.end; i += 1) {
      minutes += Math.min(span.end, spans[i].end) - Math.max(span.start, spans[i].start);
    }
  }
  return minutes;
}

function firstEndingAfter(spans: readonly Span[], instant: Minute): number {
  let low = 0;
  let high = spans.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (spans[middle].end > instant) high = middle;
    else low = middle + 1;
  }
  return low;
}

function missedWindowCost(problem: Problem, placed: ReadonlyMap<string, Placement>): number {
  const stages = new Map<string, Stage>(problem.stages.map((stage) => [stage.id, stage]));
  const seen = new Set<string>();
  let cost = 0;
  for (const link of problem.links) {
    const key = `${link.fromStageId}\n${link.toStageId}`;
    const before = stages.get(link.fromStageId);
    const window = before?.dwell?.window;
    const follows = link.kind === 'finish-start' && link.after === 'dwell' && !seen.has(key);
    const from = placed.get(link.fromStageId);
    const to = placed.get(link.toStageId);
    // What has begun has paid, or not, already.
    const begun = stages.get(link.toStageId)?.progress.kind !== 'to-do';
    if (!follows || window?.kind !== 'soft' || !before || !from || !to || begun) continue;
    seen.add(key);
    const profile = profileWhere(problem.advances, before, from.bayIds);
    const age = ageAt(profile, from.work[from.work.length - 1].end, to.work[0].start);
    if (age > window.minutes * 1000) cost += window.costMinor;
  }
  return cost;
}
