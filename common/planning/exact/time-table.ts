import type { Propagator } from './engine';
import { WRITTEN, type Trail } from './trail';

/** A resource and what its users ask of it; parallel arrays, one place for each user. */
export interface Usage {
  readonly capacity: number;
  readonly variables: readonly number[];
  readonly durations: readonly number[];
  readonly demands: readonly number[];
}

/**
 * The time-table rule for a renewable resource: between its latest start and its earliest end an activity is surely running;
 * where too many surely run, another cannot. Each conclusion is explained at one instant, with bounds no tighter than that
 * instant needs (Schutt, Feydy, Stuckey & Wallace 2011).
 */
export class TimeTable implements Propagator {
  readonly sides: readonly number[];
  private readonly count: number;
  private readonly capacity: number;
  private readonly variable: Int32Array;
  private readonly duration: Int32Array;
  private readonly demand: Int32Array;
  /** Users by latest start and by earliest end; nearly sorted from call to call. */
  private readonly byStart: Int32Array;
  private readonly byEnd: Int32Array;
  private readonly startKey: Int32Array;
  private readonly endKey: Int32Array;
  /** The profile: pieces of constant height, each from its own start to the next one's. */
  private readonly pieceStart: Int32Array;
  private readonly pieceHeight: Int32Array;
  private pieces = 0;
  private highest = 0;

  constructor(
    private readonly trail: Trail,
    usage: Usage,
  ) {
    // By falling demand, so that an explanation takes the fewest users.
    const order = [...usage.variables.keys()]
      .filter((k) => usage.demands[k] > 0 && usage.durations[k] > 0)
      .sort((a, b) => usage.demands[b] - usage.demands[a]);
    this.count = order.length;
    this.capacity = usage.capacity;
    this.variable = Int32Array.from(order, (k) => usage.variables[k]);
    this.duration = Int32Array.from(order, (k) => usage.durations[k]);
    this.demand = Int32Array.from(order, (k) => usage.demands[k]);
    this.byStart = Int32Array.from(order.keys());
    this.byEnd = Int32Array.from(order.keys());
    this.startKey = new Int32Array(this.count);
    this.endKey = new Int32Array(this.count);
    this.pieceStart = new Int32Array(2 * this.count + 1);
    this.pieceHeight = new Int32Array(2 * this.count + 1);
    this.sides = [...this.variable].flatMap((v) => [2 * v, 2 * v + 1]);
  }

  propagate(): boolean {
    this.buildProfile();
    if (this.highest > this.capacity) return this.overload();
    for (let user = 0; user < this.count; user++) {
      // Demands fall along the users: once one fits everywhere, so do all after it.
      if (this.demand[user] + this.highest <= this.capacity) return true;
      const v = this.variable[user];
      if (this.trail.value[2 * v] + this.trail.value[2 * v + 1] === 0) continue;
      if (!this.delay(user) || !this.advance(user)) return false;
    }
    return true;
  }

  private buildProfile(): void {
    const { value } = this.trail;
    const { count, startKey, endKey, byStart, byEnd, duration, variable, demand } = this;
    for (let k = 0; k < count; k++) {
      const v = variable[k];
      startKey[k] = -value[2 * v + 1];
      endKey[k] = value[2 * v] + duration[k];
    }
    insertionSort(byStart, startKey);
    insertionSort(byEnd, endKey);
    let height = 0;
    let pieces = 0;
    let highest = 0;
    let s = 0;
    let e = 0;
    for (;;) {
      while (s < count && startKey[byStart[s]] >= endKey[byStart[s]]) s++;
      while (e < count && startKey[byEnd[e]] >= endKey[byEnd[e]]) e++;
      if (e === count) break;
      const at = s < count ? Math.min(startKey[byStart[s]], endKey[byEnd[e]]) : endKey[byEnd[e]];
      for (; e < count && endKey[byEnd[e]] === at; e++) if (startKey[byEnd[e]] < at) height -= demand[byEnd[e]];
      for (; s < count && startKey[byStart[s]] === at; s++) if (endKey[byStart[s]] > at) height += demand[byStart[s]];
      this.pieceStart[pieces] = at;
      this.pieceHeight[pieces++] = height;
      if (height > highest) highest = height;
    }
    this.pieces = pieces;
    this.highest = highest;
  }

  private overload(): boolean {
    const piece = this.pieceHeight.indexOf(this.highest);
    const start = this.trail.beginPremises(2 * this.count);
    this.explainAt(start, this.pieceStart[piece], -1, this.capacity);
    this.trail.conflictOf(start);
    return false;
  }

  /** Pushes the earliest start of a user past every piece that leaves it no room. */
  private delay(user: number): boolean {
    const { trail, capacity, pieces, pieceStart, pieceHeight } = this;
    const side = 2 * this.variable[user];
    const length = this.duration[user];
    const room = capacity - this.demand[user];
    const ownStart = this.startKey[user];
    const ownEnd = this.endKey[user];
    let start = trail.value[side];
    for (let k = this.pieceAfter(start); k < pieces - 1 && pieceStart[k] < start + length; k++) {
      if (pieceHeight[k] <= room || (pieceStart[k] >= ownStart && pieceStart[k] < ownEnd)) continue;
      const until = pieceStart[k + 1];
      while (start < until) {
        const at = Math.min(start + length, until) - 1;
        const reason = trail.beginPremises(2 * this.count + 1);
        trail.addPremise(reason, side, at + 1 - length);
        this.explainAt(reason, at, user, room);
        if (!trail.raise(side, at + 1, WRITTEN, reason)) return false;
        start = at + 1;
      }
    }
    return true;
  }

  /** Pulls the latest start of a user before every piece that leaves it no room. */
  private advance(user: number): boolean {
    const { trail, capacity, pieceStart, pieceHeight } = this;
    const side = 2 * this.variable[user] + 1;
    const length = this.duration[user];
    const room = capacity - this.demand[user];
    const ownStart = this.startKey[user];
    const ownEnd = this.endKey[user];
    let end = length - trail.value[side];
    for (let k = this.pieceAfter(end - 1); k >= 0 && (k >= this.pieces - 1 || pieceStart[k + 1] > end - length); k--) {
      if (k >= this.pieces - 1 || pieceStart[k] >= end || pieceHeight[k] <= room) continue;
      if (pieceStart[k] >= ownStart && pieceStart[k] < ownEnd) continue;
      const from = pieceStart[k];
      while (end > from) {
        // Running at `at` is impossible, so it ends by then.
        const at = Math.max(end - length, from);
        const reason = trail.beginPremises(2 * this.count + 1);
        trail.addPremise(reason, side, -at);
        this.explainAt(reason, at, user, room);
        if (!trail.raise(side, length - at, WRITTEN, reason)) return false;
        end = at;
      }
    }
    return true;
  }

  /** The last piece that starts at or before an instant, or the first piece. */
  private pieceAfter(at: number): number {
    let low = 0;
    let high = this.pieces - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.pieceStart[middle] <= at) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  /** Adds users that surely run at an instant until their demands pass `room`, each with just the bounds that say so. */
  private explainAt(reason: number, at: number, except: number, room: number): void {
    const { trail, startKey, endKey, demand, duration, variable } = this;
    let sum = 0;
    for (let k = 0; sum <= room && k < this.count; k++) {
      if (k === except || startKey[k] > at || endKey[k] <= at) continue;
      sum += demand[k];
      trail.addPremise(reason, 2 * variable[k], at + 1 - duration[k]);
      trail.addPremise(reason, 2 * variable[k] + 1, -at);
    }
  }
}

function insertionSort(order: Int32Array, key: Int32Array): void {
  for (let i = 1; i < order.length; i++) {
    const item = order[i];
    const itsKey = key[item];
    let j = i - 1;
    for (; j >= 0 && key[order[j]] > itsKey; j--) order[j + 1] = order[j];
    order[j + 1] = item;
  }
}
