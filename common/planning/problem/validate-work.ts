import type { Span } from '../../time/span';
import type { Fault } from './fault';
import { heldPaces, type HeldPaces, leastWorkMinutes } from './least-minutes';
import type { Maker, Problem, Stage } from './problem';

/** Stages that nobody could do: no craft, too few hands, no shift long enough; and makers whose shifts break their own limits. */
export function findWorkFaults(problem: Problem): Fault[] {
  const faults: Fault[] = [];
  const held = heldPaces(problem.makers);
  const orphans = new Map<string, string[]>();
  for (const stage of problem.stages) {
    if (stage.progress.kind === 'finished') continue;
    for (const need of stage.crew) {
      const holders = problem.makers.filter((maker) => holds(maker, need.craftId)).length;
      if (holders === 0) orphans.set(need.craftId, [...(orphans.get(need.craftId) ?? []), stage.id]);
      else if (holders < need.least) {
        faults.push({ kind: 'too-few-hands', stageId: stage.id, craftId: need.craftId, least: need.least, holders });
      }
    }
    if (stage.continuity === 'clock' && stage.crew.length > 0)
      faults.push({ kind: 'crew-on-clock', stageId: stage.id });
    if ((stage.dwell?.attendedMinutes ?? 0) > 0 && stage.crew.length === 0) {
      faults.push({ kind: 'attended-by-nobody', stageId: stage.id });
    }
    faults.push(...sessionFaults(stage, problem.makers, held), ...windowFaults(stage));
  }
  for (const [craftId, stageIds] of orphans) faults.push({ kind: 'craft-nobody-holds', craftId, stageIds });
  for (const link of problem.links) {
    if (link.maxGapMinutes !== null && link.maxGapMinutes < link.minGapMinutes) {
      faults.push({ kind: 'gaps-reversed', fromStageId: link.fromStageId, toStageId: link.toStageId });
    }
  }
  for (const maker of problem.makers) faults.push(...limitFaults(problem, maker));
  return faults;
}

function holds(maker: Maker, craftId: string): boolean {
  return maker.crafts.some((craft) => craft.craftId === craftId);
}

/** A session has to fit a shift of somebody for each of its crafts, even with the quickest crew that could be. */
function sessionFaults(stage: Stage, makers: readonly Maker[], held: HeldPaces): Fault[] {
  if (stage.continuity !== 'session' || stage.crew.length === 0) return [];
  // Whoever stays on while it sets does so in the same shift, which a session does not leave.
  const minutes = leastWorkMinutes(stage, held) + (stage.dwell?.attendedMinutes ?? 0);
  if (!Number.isFinite(minutes)) return [];
  const longest = stage.crew.map((need) => {
    const eligible = makers.filter((maker) => holds(maker, need.craftId));
    return Math.max(0, ...eligible.map((maker) => longestShift([...maker.shifts, ...maker.overtime])));
  });
  const longestMinutes = Math.min(...longest);
  const fits = minutes <= (stage.dwell?.attendedMinutes ? Math.max(...longest) : longestMinutes);
  return !fits ? [{ kind: 'session-too-long', stageId: stage.id, minutes, longestMinutes }] : [];
}

function longestShift(spans: readonly Span[]): number {
  let longest = 0;
  let start = 0;
  let end = -1;
  for (const span of [...spans].sort((a, b) => a.start - b.start)) {
    if (span.start !== end) start = span.start;
    end = span.end;
    longest = Math.max(longest, end - start);
  }
  return longest;
}

function windowFaults(stage: Stage): Fault[] {
  const { dwell } = stage;
  if (!dwell?.window || dwell.window.minutes >= dwell.minutes) return [];
  const { minutes: windowMinutes } = dwell.window;
  return [{ kind: 'window-before-dwell', stageId: stage.id, dwellMinutes: dwell.minutes, windowMinutes }];
}

/** Ordinary shifts must keep a maker's limits by themselves; the first day on which they don't is told. */
function limitFaults(problem: Problem, maker: Maker): Fault[] {
  if (!maker.limits) return [];
  const { dayMinutes, weekMinutes, restBetweenMinutes } = maker.limits;
  let week = 0;
  let endBefore = -Infinity;
  let next = 0;
  for (const day of problem.days) {
    if (new Date(`${day.day}T00:00:00Z`).getUTCDay() === 1) week = 0;
    let minutes = 0;
    let ends = endBefore;
    while (next < maker.shifts.length && maker.shifts[next].start < day.end) {
      const shift = maker.shifts[next++];
      if (minutes === 0 && shift.start - endBefore < restBetweenMinutes) minutes = Infinity;
      minutes += shift.end - shift.start;
      ends = shift.end;
    }
    endBefore = ends;
    week += minutes;
    if (minutes > dayMinutes || week > weekMinutes)
      return [{ kind: 'shifts-break-limits', makerId: maker.id, day: day.day }];
  }
  return [];
}
