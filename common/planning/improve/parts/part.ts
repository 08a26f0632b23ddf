import type { Compiled } from '../../construct/compiled';
import type { Genome } from '../../construct/genome';
import type { Layout } from '../../construct/layout';
import type { Chance } from '../chance';

/** What a choice of a part may look at: the current plan, what it is made of, and what is wrong with it. */
export interface PartScene {
  readonly compiled: Compiled;
  readonly layout: Layout;
  readonly chance: Chance;
  /** Movable stages in the order of their starts. */
  readonly order: Int32Array;
  /** Movable stages whose dates are late because of them, most weighty first; those that cost money where none are; else all. */
  readonly amiss: ArrayLike<number>;
  /** For each stage the makers of all crews that it may choose from. */
  readonly able: readonly Int32Array[];
}

/**
 * Chooses a part of the plan to be laid out anew while everything else stays: the stages, in the order in which they are to choose
 * their places. It may change their crews and overtime in the genome. None where nothing comes to mind.
 */
export type PartChoice = (genome: Genome, scene: PartScene) => number[];

/** Stages by keys, the smallest first; ties by index. */
export function sortByKeys(stages: number[], keyOf: (stage: number) => number): number[] {
  const keys = new Map(stages.map((stage) => [stage, keyOf(stage)]));
  return stages.sort((a, b) => (keys.get(a) ?? 0) - (keys.get(b) ?? 0) || a - b);
}

/** A stage and all movable stages that follow it by links, directly or through others; at most so many. */
export function withFollowers({ compiled }: PartScene, stage: number, most: number): number[] {
  const { links, work } = compiled;
  const found = [stage];
  for (let next = 0; next < found.length && found.length < most; next += 1) {
    for (let k = links.outOf[found[next]]; k < links.outOf[found[next] + 1]; k += 1) {
      const to = links.to[links.outLinks[k]];
      if (work.fixity[to] === 0 && !found.includes(to)) found.push(to);
    }
  }
  return found;
}

/** Whether two stages may want the same hands, or the same bay, at any time. */
export function compete({ compiled, able, layout }: PartScene, stage: number, other: number): boolean {
  const crew = layout.crew[other];
  if (crew) for (const maker of crew.makers) if (able[stage].includes(maker)) return true;
  const housing = layout.housing[other];
  if (!housing) return false;
  for (const choice of compiled.work.housings[stage]) for (const bay of choice) if (housing.includes(bay)) return true;
  return false;
}
