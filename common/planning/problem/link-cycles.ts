import { fastestRates, heldPaces, leastDwellMinutes, leastWorkMinutes } from './least-minutes';
import type { Problem } from './problem';

/** Stages whose links chase one another round, and the minutes by which a round trip comes out too long. */
export interface LinkCycle {
  /** In the order of the round; the last leads back to the first. */
  readonly stageIds: readonly string[];
  readonly byMinutes: number;
}

interface Edge {
  readonly from: number;
  readonly to: number;
  readonly minutes: number;
}

/** More cycles than this are not looked for at once: mending one often mends others. */
const MOST_CYCLES = 5;

/**
 * Cycles of positive length among starts, ends of work and ends of dwell, tied by links (maximum gaps run backwards) and by the
 * least time that work and dwells take. A problem with one has no plan. Longest paths by Bellman 1958 and Ford 1956.
 */
export function findLinkCycles(problem: Problem): LinkCycle[] {
  let edges = collectEdges(problem);
  const cycles: LinkCycle[] = [];
  while (cycles.length < MOST_CYCLES) {
    const round = findPositiveRound(problem.stages.length * 3, edges);
    if (round === null) break;
    const stageIds = round.map((edge) => problem.stages[Math.floor(edge.from / 3)].id);
    cycles.push({
      stageIds: stageIds.filter(
        (id, i) => id !== stageIds[(i + stageIds.length - 1) % stageIds.length] || stageIds.length === 1,
      ),
      byMinutes: round.reduce((sum, edge) => sum + edge.minutes, 0),
    });
    const cut = round.find((edge) => Math.floor(edge.from / 3) !== Math.floor(edge.to / 3)) ?? round[0];
    edges = edges.filter((edge) => edge !== cut);
  }
  return cycles;
}

function collectEdges(problem: Problem): Edge[] {
  const edges: Edge[] = [];
  const fastest = fastestRates(problem.advances);
  const held = heldPaces(problem.makers);
  const index = new Map(problem.stages.map((stage, i) => [stage.id, i]));
  problem.stages.forEach((stage, i) => {
    const work = leastWorkMinutes(stage, held);
    const dwell = leastDwellMinutes(stage, fastest);
    const finite = Number.isFinite(work) ? work : 0;
    edges.push({ from: 3 * i, to: 3 * i + 1, minutes: finite }, { from: 3 * i + 1, to: 3 * i + 2, minutes: dwell });
    if (stage.continuity === 'clock' && stage.progress.kind === 'to-do') {
      edges.push({ from: 3 * i + 1, to: 3 * i, minutes: -finite });
    }
    if (!stage.dwell || Object.keys(stage.dwell.advance).length === 0) {
      edges.push({ from: 3 * i + 2, to: 3 * i + 1, minutes: -dwell });
    }
  });
  for (const link of problem.links) {
    const a = index.get(link.fromStageId);
    const b = index.get(link.toStageId);
    if (a === undefined || b === undefined) continue;
    const from = 3 * a + (link.kind.startsWith('start') ? 0 : link.after === 'work' ? 1 : 2);
    const to = 3 * b + (link.kind.endsWith('start') ? 0 : 1);
    if (link.time === 'clock' || link.minGapMinutes >= 0) edges.push({ from, to, minutes: link.minGapMinutes });
    if (link.maxGapMinutes !== null && link.time === 'clock')
      edges.push({ from: to, to: from, minutes: -link.maxGapMinutes });
  }
  return edges;
}

/** The edges of one cycle of positive length, in order; null where there is none. */
function findPositiveRound(nodes: number, edges: readonly Edge[]): Edge[] | null {
  const distance = new Float64Array(nodes);
  const last = new Int32Array(nodes).fill(-1);
  for (let pass = 0; pass <= nodes; pass += 1) {
    let raised = -1;
    edges.forEach((edge, i) => {
      if (distance[edge.from] + edge.minutes <= distance[edge.to]) return;
      distance[edge.to] = distance[edge.from] + edge.minutes;
      last[edge.to] = i;
      raised = edge.to;
    });
    if (raised < 0) return null;
    // A cycle among the last raisers is a positive one; looking for it now and then ends the passes early.
    if (pass % 16 === 15 || pass === nodes) {
      const round = traceRound(raised, last, edges);
      if (round) return round;
    }
  }
  return null;
}

function traceRound(node: number, last: Int32Array, edges: readonly Edge[]): Edge[] | null {
  let on = node;
  for (let step = 0; step < last.length; step += 1) {
    if (last[on] < 0) return null;
    on = edges[last[on]].from;
  }
  const round: Edge[] = [];
  for (let at = on; round.length === 0 || at !== on; at = edges[last[at]].from) round.unshift(edges[last[at]]);
  return round;
}
