import type { AdvanceProfile } from '../problem/dwell';
import { NEVER } from './calendar';

/**
 * A rate of curing with its running integral, so that the end of a dwell is one search away. Instants count from the horizon's
 * start; ages are thousandths of a reference minute, whole numbers below 2^53.
 */
export class CuringCurve {
  private readonly from: Float64Array;
  private readonly rate: Float64Array;
  private readonly fastest: number;
  /** Age gained from the first piece's start until each piece's. */
  private readonly gained: Float64Array;

  constructor(profile: AdvanceProfile, origin: number) {
    this.from = Float64Array.from(profile.from, (at) => at - origin);
    this.rate = Float64Array.from(profile.permille);
    this.fastest = Math.max(...this.rate);
    this.gained = new Float64Array(this.from.length);
    for (let k = 1; k < this.from.length; k += 1) {
      this.gained[k] = this.gained[k - 1] + (this.from[k] - this.from[k - 1]) * this.rate[k - 1];
    }
  }

  /** Fewer minutes than this never gain an age, whenever they begin. */
  leastMinutes(age: number): number {
    return this.fastest > 0 ? Math.min(NEVER, Math.ceil(age / this.fastest)) : NEVER;
  }

  /** The first whole minute by which `age` is gained after `start`; NEVER where it never is. */
  endOf(start: number, age: number): number {
    if (age <= 0) return start;
    const target = this.ageAt(start) + age;
    const { gained, from, rate } = this;
    let low = 0;
    let high = gained.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (gained[middle] < target) low = middle;
      else high = middle - 1;
    }
    if (rate[low] === 0) return NEVER;
    return Math.min(NEVER, from[low] + Math.ceil((target - gained[low]) / rate[low]));
  }

  private ageAt(instant: number): number {
    let low = 0;
    let high = this.from.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.from[middle] <= instant) low = middle;
      else high = middle - 1;
    }
    return this.gained[low] + (instant - this.from[low]) * this.rate[low];
  }
}

/** The end of `age` thousandths after `start` where no curve is known: the reference temperature throughout. */
export function endAtReference(start: number, age: number): number {
  return Math.min(NEVER, start + Math.ceil(age / 1000));
}
