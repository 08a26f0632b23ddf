import type { Compiled } from './compiled';
import type { Estimate } from './estimate';

/**
 * Priority rules: a key for each stage, the smallest first. From the survey of Kolisch & Hartmann 1999; the due-date rule follows
 * Kurtulus & Davis 1982 for several projects at once.
 */
export type PriorityRule = (compiled: Compiled, estimate: Estimate) => Float64Array;

/** Latest start time. */
export const latestStartFirst: PriorityRule = (_, estimate) => estimate.latestStart;

/** Latest finish time. */
export const latestFinishFirst: PriorityRule = (_, estimate) =>
  estimate.latestStart.map((start, stage) => start + estimate.whole[stage]);

/** Least slack between earliest and latest start. */
export const leastSlackFirst: PriorityRule = (_, estimate) =>
  estimate.latestStart.map((start, stage) => start - estimate.earliestStart[stage]);

/** Most total successors. */
export const mostSuccessorsFirst: PriorityRule = (compiled, estimate) => {
  const { links, stageCount } = compiled;
  const words = (stageCount + 31) >> 5;
  const reach = new Int32Array(stageCount * words);
  const keys = new Float64Array(stageCount);
  for (let p = stageCount - 1; p >= 0; p -= 1) {
    const stage = estimate.topological[p];
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const to = links.to[links.outLinks[k]];
      for (let w = 0; w < words; w += 1) reach[stage * words + w] |= reach[to * words + w];
      reach[stage * words + (to >> 5)] |= 1 << (to & 31);
    }
    for (let w = 0; w < words; w += 1) keys[stage] -= countBits(reach[stage * words + w]);
  }
  return keys;
};

/** Greatest rank positional weight: own work and that of direct successors. */
export const greatestRankFirst: PriorityRule = (compiled, estimate) => {
  const { links } = compiled;
  return estimate.whole.map((minutes, stage) => {
    let weight = minutes;
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1)
      weight += estimate.whole[links.to[links.outLinks[k]]];
    return -weight;
  });
};

/** Latest start, pulled forward for stages that heavy dates wait for. */
export const weightedDatesFirst: PriorityRule = (compiled, estimate) => {
  const { dates } = compiled;
  const weight = new Float64Array(compiled.stageCount);
  for (let date = 0; date < dates.count; date += 1) {
    for (const stage of dates.stages[date])
      weight[stage] = Math.max(weight[stage], dates.weight[date] * (dates.isHard[date] === 1 ? 8 : 1));
  }
  const { links } = compiled;
  for (let p = compiled.stageCount - 1; p >= 0; p -= 1) {
    const stage = estimate.topological[p];
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      weight[stage] = Math.max(weight[stage], weight[links.to[links.outLinks[k]]]);
    }
  }
  return estimate.latestStart.map((start, stage) => start - 1440 * Math.log2(1 + weight[stage]));
};

/** Every rule by its name, the one that does best on the whole first. */
export const PRIORITY_RULES = {
  latestStart: latestStartFirst,
  latestFinish: latestFinishFirst,
  weightedDates: weightedDatesFirst,
  leastSlack: leastSlackFirst,
  mostSuccessors: mostSuccessorsFirst,
  greatestRank: greatestRankFirst,
} as const satisfies Readonly<Record<string, PriorityRule>>;

/** Stages by a rule's keys; ties by the order in which they come topologically. */
export function orderBy(keys: Float64Array, topological: Int32Array): Int32Array {
  const rank = new Int32Array(topological.length);
  topological.forEach((stage, p) => (rank[stage] = p));
  return Int32Array.from(topological).sort((a, b) => keys[a] - keys[b] || rank[a] - rank[b]);
}

function countBits(word: number): number {
  let bits = word - ((word >>> 1) & 0x55555555);
  bits = (bits & 0x33333333) + ((bits >>> 2) & 0x33333333);
  return Math.imul((bits + (bits >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
