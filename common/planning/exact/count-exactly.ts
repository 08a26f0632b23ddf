import type { Propagator } from './engine';
import { WRITTEN, type Trail } from './trail';

/** Exactly so many of a number of 0/1 variables are 1. */
export class CountExactly implements Propagator {
  readonly sides: readonly number[];

  constructor(
    private readonly trail: Trail,
    private readonly variables: readonly number[],
    private readonly wanted: number,
  ) {
    this.sides = variables.flatMap((v) => [2 * v, 2 * v + 1]);
  }

  propagate(): boolean {
    const { value } = this.trail;
    let ones = 0;
    let zeros = 0;
    for (const v of this.variables) {
      if (value[2 * v] === 1) ones++;
      else if (value[2 * v + 1] === 0) zeros++;
    }
    const spare = this.variables.length - this.wanted;
    if (ones > this.wanted) return this.refuse(2, 1, this.wanted + 1);
    if (zeros > spare) return this.refuse(1, 0, spare + 1);
    if (ones + zeros === this.variables.length) return true;
    if (ones === this.wanted) return this.settleRest(2, 1, 1, 0);
    if (zeros === spare) return this.settleRest(1, 0, 2, 1);
    return true;
  }

  /** Conflict of the first `count` variables that are decided one way; `way` 2 is 1 and `way` 1 is 0. */
  private refuse(way: 1 | 2, bound: number, count: number): boolean {
    const start = this.trail.beginPremises(count);
    let left = count;
    for (const v of this.variables) {
      const side = 2 * v + 2 - way;
      if (left > 0 && this.trail.value[side] >= bound) {
        this.trail.addPremise(start, side, bound);
        left--;
      }
    }
    this.trail.conflictOf(start);
    return false;
  }

  /** Since all decided one way are enough, the undecided go the other way. */
  private settleRest(way: 1 | 2, bound: number, otherWay: 1 | 2, otherBound: number): boolean {
    const { trail } = this;
    const start = trail.beginPremises(this.variables.length);
    const open: number[] = [];
    for (const v of this.variables) {
      const side = 2 * v + 2 - way;
      if (trail.value[side] >= bound) trail.addPremise(start, side, bound);
      else if (trail.value[side ^ 1] < 1 - bound) open.push(v);
    }
    for (const v of open) if (!trail.raise(2 * v + 2 - otherWay, otherBound, WRITTEN, start)) return false;
    return true;
  }
}
