const CONTINUITIES = 3;
const SIZES = 16;

/**
 * What is known of when crews are free, so that it is not found out again for every stage: from an instant on, a crew has no room
 * for so many minutes before another. While bookings only grow that stays true, for more minutes and from later on as well.
 */
export class ReadyTimes {
  private from = new Int32Array(0);
  private minutes = new Int32Array(0);
  private start = new Int32Array(0);
  private stamp = new Int32Array(0);

  /** The earliest start that is not known to be hopeless; `from` where nothing is known. */
  startFor(crew: number, continuity: number, minutes: number, from: number, stamp: number): number {
    let best = from;
    const size = 31 - Math.clz32(minutes);
    for (let s = size; s >= 0 && s >= size - 1; s -= 1) {
      const cell = this.cellOf(crew, continuity, s);
      const holds =
        cell < this.stamp.length &&
        this.stamp[cell] === stamp &&
        this.from[cell] <= from &&
        this.minutes[cell] <= minutes;
      if (holds && this.start[cell] > best) best = this.start[cell];
    }
    return best;
  }

  /** Notes that from an instant on there is no room before `start`; keeps what says more. */
  note(crew: number, continuity: number, minutes: number, from: number, start: number, stamp: number): void {
    const cell = this.cellOf(crew, continuity, 31 - Math.clz32(minutes));
    if (cell >= this.stamp.length) this.grow(cell);
    const isKept =
      this.stamp[cell] === stamp && this.start[cell] > from && (this.from[cell] < from || this.minutes[cell] < minutes);
    if (isKept) return;
    this.stamp[cell] = stamp;
    this.from[cell] = from;
    this.minutes[cell] = minutes;
    this.start[cell] = start;
  }

  private cellOf(crew: number, continuity: number, size: number): number {
    return (crew * CONTINUITIES + continuity) * SIZES + Math.min(size, SIZES - 1);
  }

  private grow(cell: number): void {
    const length = Math.max(1024, 2 * (cell + 1));
    const larger = (from: Int32Array): Int32Array<ArrayBuffer> => {
      const to = new Int32Array(length);
      to.set(from);
      return to;
    };
    this.from = larger(this.from);
    this.minutes = larger(this.minutes);
    this.start = larger(this.start);
    this.stamp = larger(this.stamp);
  }
}
