import type { Compiled } from './compiled';
import { CLOCK, FINISH_FINISH, FINISH_START, SESSION, START_START } from './compiled';
import { NEVER } from './calendar';
import { workMinutes } from './work-minutes';

/**
 * What each stage is likely to take by the clock, before anything is placed: nights and weekends included where its work goes
 * over several shifts. Only for priorities; nothing is proved from it. In minutes.
 */
export interface Estimate {
  readonly work: Float64Array;
  /** Work and dwell. */
  readonly whole: Float64Array;
  /** Stages with every one after all that it waits for, as far as links allow. */
  readonly topological: Int32Array;
  /** Earliest and latest starts along the links, from the horizon's start and from dates and horizon back. */
  readonly earliestStart: Float64Array;
  readonly latestStart: Float64Array;
}

/** Estimates elapsed times and the critical path of a compiled problem (Kelley & Walker 1959, forward and backward pass). */
export function estimate(compiled: Compiled): Estimate {
  const work = Float64Array.from({ length: compiled.stageCount }, (_, stage) => elapsedWork(compiled, stage));
  const whole = work.map((minutes, stage) => minutes + compiled.work.dwellAge[stage] / 1000);
  const topological = sortTopologically(compiled);
  const earliestStart = forwardPass(compiled, topological, work, whole);
  const latestStart = backwardPass(compiled, topological, work, whole);
  return { work, whole, topological, earliestStart, latestStart };
}

function elapsedWork(compiled: Compiled, stage: number): number {
  const crew = compiled.work.crews[stage][0] ?? null;
  const minutes = workMinutes(compiled, stage, compiled.work.minutes[stage], crew);
  const continuity = compiled.work.continuity[stage];
  if (!crew || crew.makers.length === 0 || continuity === CLOCK || continuity === SESSION || minutes >= NEVER) {
    return Math.min(minutes, compiled.horizonMinutes);
  }
  const calendar = compiled.makers.ordinary[crew.makers[0]];
  if (calendar.count === 0) return minutes;
  let there = 0;
  for (let i = 0; i < calendar.count; i += 1) there += calendar.ends[i] - calendar.starts[i];
  const span = calendar.ends[calendar.count - 1] - calendar.starts[0];
  const shift = there / calendar.count;
  return minutes <= shift ? minutes : (minutes * span) / there;
}

/** Kahn 1962; what is caught in a cycle comes last, in order. */
export function sortTopologically(compiled: Compiled): Int32Array {
  const { links, stageCount } = compiled;
  const waits = new Int32Array(stageCount);
  for (let link = 0; link < links.count; link += 1) waits[links.to[link]] += 1;
  const order: number[] = [];
  const isDone = new Uint8Array(stageCount);
  for (let stage = 0; stage < stageCount; stage += 1) if (waits[stage] === 0) order.push(stage);
  for (let next = 0; next < order.length; next += 1) {
    isDone[order[next]] = 1;
    for (let k = links.outOf[order[next]]; k < links.outOf[order[next] + 1]; k += 1) {
      const to = links.to[links.outLinks[k]];
      waits[to] -= 1;
      if (waits[to] === 0) order.push(to);
    }
  }
  for (let stage = 0; stage < stageCount; stage += 1) if (isDone[stage] === 0) order.push(stage);
  return Int32Array.from(order);
}

function forwardPass(compiled: Compiled, order: Int32Array, work: Float64Array, whole: Float64Array): Float64Array {
  const { links } = compiled;
  const start = Float64Array.from(compiled.work.earliest);
  for (const stage of order) {
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const link = links.outLinks[k];
      const to = links.to[link];
      start[to] = Math.max(start[to], start[stage] + startToStart(compiled, link, work, whole));
    }
  }
  return start;
}

function backwardPass(compiled: Compiled, order: Int32Array, work: Float64Array, whole: Float64Array): Float64Array {
  const { links, dates } = compiled;
  const latestFinish = new Float64Array(compiled.stageCount).fill(compiled.horizonMinutes);
  for (let date = 0; date < dates.count; date += 1) {
    // A wished date pulls less than a hard one: its slack counts as if it were a little later.
    const slackOf = dates.isHard[date] === 1 ? 0 : 1;
    for (const stage of dates.stages[date])
      latestFinish[stage] = Math.min(latestFinish[stage], dates.at[date] + slackOf);
  }
  const start = latestFinish.map((finish, stage) =>
    Math.min(finish - whole[stage], compiled.work.latest[stage] - work[stage]),
  );
  for (let p = order.length - 1; p >= 0; p -= 1) {
    const stage = order[p];
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const link = links.outLinks[k];
      start[stage] = Math.min(start[stage], start[links.to[link]] - startToStart(compiled, link, work, whole));
    }
  }
  return start;
}

/** The least minutes from one start to the other that a link's minimum gap asks for, by estimated times. */
export function startToStart(compiled: Compiled, link: number, work: Float64Array, whole: Float64Array): number {
  const { links } = compiled;
  const from = links.from[link];
  const to = links.to[link];
  const kind = links.kind[link];
  const gap = links.minGap[link];
  const firstPart =
    kind === FINISH_START || kind === FINISH_FINISH ? (links.afterWork[link] === 1 ? work[from] : whole[from]) : 0;
  const secondPart = kind === FINISH_START || kind === START_START ? 0 : work[to];
  return firstPart + gap - secondPart;
}
