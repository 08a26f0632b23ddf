import type { Compiled } from '../../construct/compiled';
import type { Genome } from '../../construct/genome';
import type { Chance } from '../chance';

/** What an operator may look at: the problem, where the stages of the genome stand, and which of them make a date late. */
export interface Scene {
  readonly compiled: Compiled;
  readonly chance: Chance;
  /** Starts that the genome led to, by stage. */
  readonly start: Int32Array;
  /** Stages that late dates wait for, directly or through links, most weighty date first; empty when nothing is late. */
  readonly late: readonly number[];
}

/** Changes a genome in place a little; the search keeps what turns out no worse. */
export type Operator = (genome: Genome, scene: Scene) => void;

/** Moves the entry at one position of an order to another, the ones between make room. */
export function moveEntry(order: Int32Array, from: number, to: number): void {
  const stage = order[from];
  if (from < to) order.copyWithin(from, from + 1, to + 1);
  else order.copyWithin(to + 1, to, from);
  order[to] = stage;
}
