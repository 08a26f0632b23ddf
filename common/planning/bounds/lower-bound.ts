import type { Minute } from '../../time/span';
import type { Problem } from '../problem/problem';
import type { LevelResult } from '../problem/result';
import { energySources, type EnergySource } from './energy';
import { earliestInstants } from './longest-paths';
import { endNode, readyNode, startNode, timeNetwork, type TimeArc, type TimeNetwork } from './time-network';

/** Heads and tails that are tried as limits of a set of stages; more would take longer and seldom say more. */
const MOST_LIMITS = 24;

/**
 * Lower bounds of the objective's parts for every plan that lays out all stages and breaks no requirement. Each finish is
 * bounded by the longest path to it through calendars and dwells, and by the work that has to be done on the way: all stages
 * that cannot begin before one instant and have at least so much after them share the craft or bay (heads and tails, Carlier
 * 1982; by energy over calendars). Costs and changes are bounded by 0; evenness is not bounded.
 */
export function lowerBound(problem: Problem): LevelResult['bound'] {
  const network = timeNetwork(problem);
  const forward = earliestInstants(network);
  if (forward.cycle !== null) return { ...nothingKnown, unplaced: 1 };
  const heads = forward.instants;
  const isTooLate = problem.stages.some((_, k) => heads[endNode(k)] > problem.horizon.end);
  if (isTooLate || asksTooMuch(problem)) return { ...nothingKnown, unplaced: 1 };
  const finishes = new FinishBounds(problem, network, heads);
  let hardLateness = 0;
  let wishedLateness = 0;
  for (const date of problem.keyDates) {
    const finish = finishes.of(new Set(date.stageIds));
    const late = date.weight * Math.max(0, finish - date.at);
    if (date.strength === 'hard') hardLateness += late;
    else wishedLateness += late;
  }
  const byProduction = new Map<string, Set<string>>();
  for (const stage of problem.stages) {
    const ids = byProduction.get(stage.productionId) ?? new Set();
    byProduction.set(stage.productionId, ids.add(stage.id));
  }
  let finishSum = 0;
  for (const ids of byProduction.values()) finishSum += finishes.of(ids) - problem.horizon.start;
  return { ...nothingKnown, hardLateness, wishedLateness, finishSum };
}

/** Whether some stage that takes time wants more of a bay than any that it may be in has. */
function asksTooMuch(problem: Problem): boolean {
  const capacities = new Map(problem.bays.map((bay) => [bay.id, bay.capacity]));
  return problem.stages.some(
    (stage) =>
      stage.progress.kind !== 'finished' &&
      stage.effort.minutes > 0 &&
      stage.places.some((place) => place.bayIds.every((id) => place.units > (capacities.get(id) ?? 0))),
  );
}

const nothingKnown: LevelResult['bound'] = {
  unplaced: 0,
  hardLateness: 0,
  wishedLateness: 0,
  costMinor: 0,
  unevenness: null,
  changes: 0,
  finishSum: null,
};

/** Bounds of when all of some stages can be ready. */
class FinishBounds {
  private readonly sources: readonly EnergySource[];
  private readonly entering: TimeArc[][];

  constructor(
    private readonly problem: Problem,
    private readonly network: TimeNetwork,
    private readonly heads: Float64Array,
  ) {
    this.sources = energySources(
      problem,
      network.works.map((work) => work.minutes),
    );
    this.entering = network.notBefore.map(() => []);
    for (const arc of network.arcs) if (arc.lag !== null) this.entering[arc.to].push(arc);
  }

  /** The earliest instant by which all these stages can be ready. */
  of(stageIds: ReadonlySet<string>): Minute {
    const goals = this.network.stages.flatMap((stage, k) => (stageIds.has(stage.id) ? [readyNode(k)] : []));
    let bound = goals.reduce((latest, node) => Math.max(latest, this.heads[node]), this.problem.horizon.start);
    const tails = this.tailsTo(goals);
    for (const source of this.sources) bound = Math.max(bound, this.byEnergy(source, tails));
    return bound;
  }

  /** By stage: least minutes from its end of work until all goals are ready; -Infinity where none waits for it. */
  private tailsTo(goals: readonly number[]): Float64Array {
    const after = new Float64Array(this.heads.length).fill(-Infinity);
    for (const node of goals) after[node] = 0;
    const queue = [...goals];
    // There is no positive cycle, so labels settle; the limit only guards the order of visits.
    for (let visits = 0; queue.length > 0 && visits < 50 * after.length; visits++) {
      const node = queue.shift() as number;
      for (const arc of this.entering[node]) {
        const through = after[node] + (arc.lag ?? 0);
        if (through <= after[arc.from]) continue;
        after[arc.from] = through;
        queue.push(arc.from);
      }
    }
    return Float64Array.from(this.network.stages, (_, k) => after[endNode(k)]);
  }

  private byEnergy(source: EnergySource, tails: Float64Array): Minute {
    const users = source.uses
      .filter((use) => tails[use.stage] > -Infinity)
      .map(({ stage, amount }) => ({ amount, tail: tails[stage], head: this.headOf(stage) }))
      .sort((a, b) => b.tail - a.tail);
    let best = -Infinity;
    for (const from of limits(users.map((user) => user.head))) {
      let amount = 0;
      users.forEach((user, position) => {
        if (user.head >= from) amount += user.amount;
        const isLastOfItsTail = users[position + 1]?.tail !== user.tail;
        if (amount > 0 && isLastOfItsTail) best = Math.max(best, source.curve.reach(from, amount) + user.tail);
      });
    }
    return best;
  }

  private headOf(stage: number): Minute {
    return Math.max(this.heads[startNode(stage)], this.problem.horizon.start);
  }
}

/** Distinct values, at most `MOST_LIMITS` of them, the smallest included. */
function limits(values: readonly number[]): number[] {
  const distinct = [...new Set(values)].sort((a, b) => a - b);
  if (distinct.length <= MOST_LIMITS) return distinct;
  return Array.from({ length: MOST_LIMITS }, (_, k) => distinct[Math.floor((k * distinct.length) / MOST_LIMITS)]);
}
