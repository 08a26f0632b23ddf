import { NEVER } from '../../construct/calendar';
import {
  CLOCK,
  type Compiled,
  FINISH_FINISH,
  FINISH_START,
  HOLD_WORK,
  START_FINISH,
  START_START,
} from '../../construct/compiled';

/** Dense profiles are kept up to so many minutes of horizon; a longer one is a studio's, not an instance's. */
const LONGEST_HORIZON = 200_000;

/**
 * A problem that is nothing but durations, least lags between starts and shared capacities, with one finish to bring forward: the
 * resource-constrained project scheduling problem. Written as seen from one end of time; the other end sees `mirror`.
 */
export interface TimedProblem {
  readonly count: number;
  readonly durations: Int32Array;
  /** No start before; in minutes from this end of time. */
  readonly release: Int32Array;
  /** Lags that lead into each stage: `inFrom[inOf[i]..inOf[i + 1]]` start at least `inLag` before it. */
  readonly inOf: Int32Array;
  readonly inFrom: Int32Array;
  readonly inLag: Int32Array;
  /** Every stage after all that lead into it. */
  readonly topological: Int32Array;
  readonly demands: PackedDemands;
  /** What each stage takes for a minute, as the sum of its shares of the capacities. */
  readonly weight: Float64Array;
  /** Latest start along the lags for the earliest finish that these allow, so that the smallest is 0. */
  readonly latestStart: Int32Array;
  /** Room for any schedule: no pass reaches further. */
  readonly longest: number;
}

/**
 * Demands for all capacities at once, packed side by side in as many 32-bit words as they need, a spare bit above each. What is
 * left of the capacities is kept in the same fields with the spare bits set, so that one subtraction compares all of a word:
 * a spare bit that is gone tells of too little.
 */
export interface PackedDemands {
  readonly words: number;
  /** `words` for each stage. */
  readonly byStage: Int32Array;
  readonly capacity: Int32Array;
  readonly spare: Int32Array;
}

/** The compiled problem as a timed one; null where it asks for more than that. */
export function asTimed(compiled: Compiled): TimedProblem | null {
  const { work, links, dates, bays, stageCount } = compiled;
  if (stageCount === 0 || dates.count > 0 || dates.productionCount !== 1 || compiled.horizonMinutes > LONGEST_HORIZON)
    return null;
  for (let stage = 0; stage < stageCount; stage += 1) {
    const isPlain =
      work.continuity[stage] === CLOCK &&
      work.fixity[stage] === 0 &&
      work.needOf[stage] === work.needOf[stage + 1] &&
      work.housings[stage].length === 1 &&
      work.dwellAge[stage] === 0 &&
      work.windowKind[stage] === 0 &&
      work.latest[stage] === NEVER;
    if (!isPlain) return null;
    for (let place = work.placeOf[stage]; place < work.placeOf[stage + 1]; place += 1) {
      const bay = work.housings[stage][0][place - work.placeOf[stage]];
      if (work.placeHold[place] !== HOLD_WORK || bays.open[bay] !== null || work.placeUnits[place] > bays.capacity[bay])
        return null;
    }
  }
  for (let link = 0; link < links.count; link += 1)
    if (links.maxGap[link] < NEVER || links.isWorking[link] === 1) return null;
  const durations = work.minutes.slice();
  const rows = lagRows(compiled, durations);
  const ordered = sortTopologically(stageCount, rows);
  if (!ordered) return null;
  return {
    count: stageCount,
    durations,
    release: work.earliest.slice(),
    ...groupInto(stageCount, rows),
    topological: ordered,
    demands: packDemands(compiled),
    weight: shareOfCapacities(compiled),
    latestStart: latestStarts(durations, rows, ordered),
    longest: longestSchedule(durations, rows, work.earliest),
  };
}

/** The same problem seen from the other end of time. Releases are deadlines from there, and are not kept. */
export function mirror(problem: TimedProblem): TimedProblem {
  const { durations } = problem;
  const rows: LagRow[] = [];
  for (let to = 0; to < problem.count; to += 1) {
    for (let k = problem.inOf[to]; k < problem.inOf[to + 1]; k += 1) {
      const from = problem.inFrom[k];
      rows.push({ from: to, to: from, lag: problem.inLag[k] + durations[to] - durations[from] });
    }
  }
  return {
    ...problem,
    release: new Int32Array(problem.count),
    ...groupInto(problem.count, rows),
    topological: problem.topological.slice().reverse(),
    latestStart: latestStarts(durations, rows, problem.topological.slice().reverse()),
    longest: Math.max(problem.longest, longestSchedule(durations, rows, problem.release)),
  };
}

interface LagRow {
  readonly from: number;
  readonly to: number;
  readonly lag: number;
}

function lagRows(compiled: Compiled, durations: Int32Array): LagRow[] {
  const { links } = compiled;
  const rows: LagRow[] = [];
  for (let link = 0; link < links.count; link += 1) {
    const from = links.from[link];
    const to = links.to[link];
    const kind = links.kind[link];
    const first = kind === FINISH_START || kind === FINISH_FINISH ? durations[from] : 0;
    const second = kind === FINISH_START || kind === START_START ? 0 : durations[to];
    if (kind <= START_FINISH) rows.push({ from, to, lag: first + links.minGap[link] - second });
  }
  return rows;
}

function groupInto(count: number, rows: readonly LagRow[]): Pick<TimedProblem, 'inOf' | 'inFrom' | 'inLag'> {
  const inOf = new Int32Array(count + 1);
  for (const row of rows) inOf[row.to + 1] += 1;
  for (let i = 0; i < count; i += 1) inOf[i + 1] += inOf[i];
  const next = inOf.slice();
  const inFrom = new Int32Array(rows.length);
  const inLag = new Int32Array(rows.length);
  for (const row of rows) {
    inFrom[next[row.to]] = row.from;
    inLag[next[row.to]] = row.lag;
    next[row.to] += 1;
  }
  return { inOf, inFrom, inLag };
}

function sortTopologically(count: number, rows: readonly LagRow[]): Int32Array | null {
  const after: number[][] = Array.from({ length: count }, () => []);
  const waits = new Int32Array(count);
  for (const row of rows) {
    after[row.from].push(row.to);
    waits[row.to] += 1;
  }
  const order: number[] = [];
  for (let i = 0; i < count; i += 1) if (waits[i] === 0) order.push(i);
  for (let k = 0; k < order.length; k += 1) {
    for (const to of after[order[k]]) {
      waits[to] -= 1;
      if (waits[to] === 0) order.push(to);
    }
  }
  return order.length === count ? Int32Array.from(order) : null;
}

function packDemands(compiled: Compiled): PackedDemands {
  const { work, bays, stageCount } = compiled;
  const used = [...bays.capacity.keys()].filter((bay) => work.housings.some(([housing]) => housing.includes(bay)));
  const fields: { word: number; shift: number; capacity: number }[] = [];
  let word = 0;
  let shift = 0;
  for (const bay of used) {
    const bits = 33 - Math.clz32(bays.capacity[bay]);
    if (shift + bits > 32) {
      word += 1;
      shift = 0;
    }
    fields.push({ word, shift, capacity: bays.capacity[bay] });
    shift += bits;
  }
  const words = used.length === 0 ? 1 : word + 1;
  const capacity = new Int32Array(words);
  const spare = new Int32Array(words);
  for (const field of fields) {
    const spareBit = 1 << (field.shift + 32 - Math.clz32(field.capacity));
    spare[field.word] |= spareBit;
    capacity[field.word] |= spareBit | (field.capacity << field.shift);
  }
  const byStage = new Int32Array(words * stageCount);
  for (let stage = 0; stage < stageCount; stage += 1) {
    work.housings[stage][0].forEach((bay, k) => {
      const field = fields[used.indexOf(bay)];
      byStage[stage * words + field.word] += work.placeUnits[work.placeOf[stage] + k] << field.shift;
    });
  }
  return { words, byStage, capacity, spare };
}

/** Every stage after all others, each after its longest lag: no left-justified schedule is longer. */
function longestSchedule(durations: Int32Array, rows: readonly LagRow[], release: Int32Array): number {
  const longest = durations.slice();
  for (const { to, lag } of rows) longest[to] = Math.max(longest[to], durations[to] + Math.max(0, lag));
  let sum = 1;
  for (const minutes of longest) sum += minutes;
  return sum + release.reduce((latest, at) => Math.max(latest, at), 0);
}

function shareOfCapacities({ work, bays, stageCount }: Compiled): Float64Array {
  const weight = new Float64Array(stageCount);
  for (let stage = 0; stage < stageCount; stage += 1) {
    work.housings[stage][0].forEach((bay, k) => {
      weight[stage] += work.placeUnits[work.placeOf[stage] + k] / Math.max(1, bays.capacity[bay]);
    });
  }
  return weight;
}

function latestStarts(durations: Int32Array, rows: readonly LagRow[], topological: Int32Array): Int32Array {
  const tail = new Int32Array(durations.length);
  const after: LagRow[][] = Array.from(durations, () => []);
  for (const row of rows) after[row.from].push(row);
  let longest = 0;
  for (let k = topological.length - 1; k >= 0; k -= 1) {
    const stage = topological[k];
    tail[stage] = durations[stage];
    for (const row of after[stage]) tail[stage] = Math.max(tail[stage], row.lag + tail[row.to]);
    longest = Math.max(longest, tail[stage]);
  }
  return tail.map((minutes) => longest - minutes);
}
