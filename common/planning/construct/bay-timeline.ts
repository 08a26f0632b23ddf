import { NEVER } from './calendar';

/** How much of a bay is taken over time, as steps: `used[k]` holds from `at[k]` until `at[k + 1]`. */
export class BayTimeline {
  private at = new Int32Array(32);
  private used = new Int32Array(32);
  private count = 1;

  constructor(readonly capacity: number) {
    this.at[0] = -NEVER;
  }

  clear(): void {
    this.count = 1;
    this.at[0] = -NEVER;
    this.used[0] = 0;
  }

  /** Becomes a copy of another timeline of the same capacity. */
  copyFrom(other: BayTimeline): void {
    while (this.at.length < other.count) this.grow();
    for (let k = 0; k < other.count; k += 1) {
      this.at[k] = other.at[k];
      this.used[k] = other.used[k];
    }
    this.count = other.count;
  }

  /**
   * When the last clash ends that units from `start` until `end` would meet; -1 where they fit. Nothing that starts before then
   * and lasts as long can fit either.
   */
  clashEnd(start: number, end: number, units: number): number {
    if (end <= start || units === 0) return -1;
    const room = this.capacity - units;
    if (room < 0) return NEVER;
    for (let k = this.stepAt(end - 1); k >= 0; k -= 1) {
      if (this.used[k] > room) return k + 1 < this.count ? this.at[k + 1] : NEVER;
      if (this.at[k] <= start) return -1;
    }
    return -1;
  }

  /** Adds units (or takes them away where negative) from `start` until `end`. */
  add(start: number, end: number, units: number): void {
    if (end <= start || units === 0) return;
    const from = this.splitAt(start);
    const until = end >= NEVER ? this.count : this.splitAt(end);
    for (let k = from; k < until; k += 1) this.used[k] += units;
    this.melt(until);
    this.melt(from);
  }

  /** The first stretch from `start` on in which more is taken than there is, as its start; NEVER where there is none. */
  firstOver(start: number): number {
    for (let k = this.stepAt(start); k < this.count; k += 1) {
      if (this.used[k] > this.capacity) return this.at[k] > start ? this.at[k] : start;
    }
    return NEVER;
  }

  /** The end of the unbroken stretch of too much that holds at an instant; the instant itself where nothing is amiss. */
  overUntil(instant: number): number {
    let k = this.stepAt(instant);
    if (this.used[k] <= this.capacity) return instant;
    while (k < this.count && this.used[k] > this.capacity) k += 1;
    return k < this.count ? this.at[k] : NEVER;
  }

  /** Units taken for ever after the last step: those of holds that are not yet let go. */
  takenForEver(): number {
    return this.used[this.count - 1];
  }

  private stepAt(instant: number): number {
    let low = 0;
    let high = this.count - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.at[middle] <= instant) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  private splitAt(instant: number): number {
    const k = this.stepAt(instant);
    if (this.at[k] === instant) return k;
    if (this.count === this.at.length) this.grow();
    this.at.copyWithin(k + 2, k + 1, this.count);
    this.used.copyWithin(k + 2, k + 1, this.count);
    this.at[k + 1] = instant;
    this.used[k + 1] = this.used[k];
    this.count += 1;
    return k + 1;
  }

  /** Drops a step that changes nothing. */
  private melt(k: number): void {
    if (k <= 0 || k >= this.count || this.used[k] !== this.used[k - 1]) return;
    this.at.copyWithin(k, k + 1, this.count);
    this.used.copyWithin(k, k + 1, this.count);
    this.count -= 1;
  }

  private grow(): void {
    const at = new Int32Array(this.at.length * 2);
    const used = new Int32Array(this.used.length * 2);
    at.set(this.at);
    used.set(this.used);
    this.at = at;
    this.used = used;
  }
}
