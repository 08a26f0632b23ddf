import { NEVER } from './calendar';

/** What one maker is booked for: disjoint stretches in order, each with its stage. Grows, never shrinks; holes are closed up. */
export class Bookings {
  starts = new Int32Array(16);
  ends = new Int32Array(16);
  stages = new Int32Array(16);
  count = 0;

  /** The first booking that ends after an instant; `count` where none does. */
  indexAt(instant: number): number {
    let low = 0;
    let high = this.count;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.ends[middle] > instant) high = middle;
      else low = middle + 1;
    }
    return low;
  }

  /** The last booking that begins before an instant; -1 where none does. */
  lastBefore(instant: number): number {
    let low = 0;
    let high = this.count;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.starts[middle] < instant) low = middle + 1;
      else high = middle;
    }
    return low - 1;
  }

  /** Start of the first booking that ends after an instant, NEVER where there is none. */
  nextStart(instant: number): number {
    const i = this.indexAt(instant);
    return i < this.count ? this.starts[i] : NEVER;
  }

  /**
   * Adds a stretch. Where it overlaps others (which only fixed stages, never removed again, may do) they melt into one booking.
   */
  add(start: number, end: number, stage: number): void {
    if (end <= start) return;
    const i = this.indexAt(start);
    let after = i;
    while (after < this.count && this.starts[after] < end) after += 1;
    const melts = after > i;
    const from = melts ? Math.min(start, this.starts[i]) : start;
    const until = melts ? Math.max(end, this.ends[after - 1]) : end;
    this.makeRoom(i, after);
    this.starts[i] = from;
    this.ends[i] = until;
    this.stages[i] = stage;
  }

  /** Takes a stretch away that was added for a stage and has not melted with another. */
  remove(start: number, end: number, stage: number): void {
    if (end <= start) return;
    const i = this.indexAt(start);
    if (i >= this.count || this.starts[i] !== start || this.stages[i] !== stage) return;
    this.starts.copyWithin(i, i + 1, this.count);
    this.ends.copyWithin(i, i + 1, this.count);
    this.stages.copyWithin(i, i + 1, this.count);
    this.count -= 1;
  }

  /** Becomes a copy of another maker's or layout's bookings. */
  copyFrom(other: Bookings): void {
    while (this.starts.length < other.count) this.grow();
    for (let i = 0; i < other.count; i += 1) {
      this.starts[i] = other.starts[i];
      this.ends[i] = other.ends[i];
      this.stages[i] = other.stages[i];
    }
    this.count = other.count;
  }

  clear(): void {
    this.count = 0;
  }

  /** Makes entries `i..after` into exactly one, at `i`. */
  private makeRoom(i: number, after: number): void {
    if (this.count + 1 > this.starts.length) this.grow();
    if (after !== i + 1) {
      this.starts.copyWithin(i + 1, after, this.count);
      this.ends.copyWithin(i + 1, after, this.count);
      this.stages.copyWithin(i + 1, after, this.count);
      this.count += i + 1 - after;
    }
  }

  private grow(): void {
    const larger = (from: Int32Array): Int32Array<ArrayBuffer> => {
      const to = new Int32Array(from.length * 2);
      to.set(from);
      return to;
    };
    this.starts = larger(this.starts);
    this.ends = larger(this.ends);
    this.stages = larger(this.stages);
  }
}
