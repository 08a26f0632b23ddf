import type { Minute, Span } from '../../time/span';
import { firstTrue } from './working-measure';

/** A span during which so much can be done in each minute. */
export interface Supply extends Span {
  readonly rate: number;
}

/** How much can be done over time by many at once: the sum of their supplies. */
export class CapacityCurve {
  private readonly at: Minute[] = [];
  private readonly rate: number[] = [];
  /** What could be done before the instant at the same position. */
  private readonly done: number[] = [];

  constructor(supplies: readonly Supply[]) {
    const changes = new Map<Minute, number>();
    const add = (at: Minute, change: number): void => void changes.set(at, (changes.get(at) ?? 0) + change);
    for (const { start, end, rate } of supplies) {
      if (end <= start) continue;
      add(start, rate);
      add(end, -rate);
    }
    let rate = 0;
    let done = 0;
    for (const [at, change] of [...changes].sort(([a], [b]) => a - b)) {
      const last = this.at.length - 1;
      if (last >= 0) done += rate * (at - this.at[last]);
      rate += change;
      this.at.push(at);
      this.rate.push(rate);
      this.done.push(done);
    }
  }

  /** What could be done before an instant. */
  doneBefore(instant: Minute): number {
    const k = firstTrue(this.at.length, (i) => this.at[i] > instant) - 1;
    return k < 0 ? 0 : this.done[k] + this.rate[k] * (instant - this.at[k]);
  }

  /** The earliest instant by which `amount` can have been done from `from` on; Infinity if that never comes. */
  reach(from: Minute, amount: number): Minute {
    if (amount <= 0) return from;
    const wanted = this.doneBefore(from) + amount;
    const k = firstTrue(this.at.length, (i) => this.done[i] >= wanted) - 1;
    if (k < 0) return from;
    if (this.rate[k] <= 0) return k === this.at.length - 1 ? Infinity : this.at[k + 1];
    return Math.max(from, Math.ceil(this.at[k] + (wanted - this.done[k]) / this.rate[k]));
  }
}
