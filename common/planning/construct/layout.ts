import { BayTimeline } from './bay-timeline';
import { Bookings } from './bookings';
import { NEVER } from './calendar';
import { type Compiled, type Crew, HOLD_DWELL, HOLD_UNTIL, HOLD_WORK, SHIFTS } from './compiled';
import { curedBy } from './cured-by';

/** One way to place one stage, as found by a fit; reused from fit to fit. */
export interface Fit {
  start: number;
  end: number;
  /** The end of the dwell. */
  finish: number;
  /** Hands-on spans as pairs of start and end; only the first `spanCount` count. */
  spans: Int32Array;
  spanCount: number;
}

/** An empty fit with room for a few spans; it grows as needed. */
export function newFit(): Fit {
  return { start: NEVER, end: NEVER, finish: NEVER, spans: new Int32Array(16), spanCount: 0 };
}

/** Adds a span to a fit, melting it with the one before where they meet. */
export function pushSpan(fit: Fit, start: number, end: number): void {
  const at = 2 * fit.spanCount;
  if (at > 0 && fit.spans[at - 1] === start) {
    fit.spans[at - 1] = end;
    return;
  }
  if (at + 2 > fit.spans.length) {
    const larger = new Int32Array(fit.spans.length * 2);
    larger.set(fit.spans);
    fit.spans = larger;
  }
  fit.spans[at] = start;
  fit.spans[at + 1] = end;
  fit.spanCount += 1;
}

/** Copies one fit into another. */
export function copyFit(from: Fit, to: Fit): void {
  to.start = from.start;
  to.end = from.end;
  to.finish = from.finish;
  if (to.spans.length < 2 * from.spanCount) to.spans = new Int32Array(from.spans.length);
  for (let k = 0; k < 2 * from.spanCount; k += 1) to.spans[k] = from.spans[k];
  to.spanCount = from.spanCount;
}

/**
 * A partial plan that grows and shrinks stage by stage: who is booked when, what is taken of each bay, where each stage stands.
 * It records; it does not judge. Nothing is allocated in it once its arrays have grown to size.
 */
export class Layout {
  readonly isPlaced: Uint8Array;
  readonly start: Int32Array;
  readonly end: Int32Array;
  readonly finish: Int32Array;
  readonly crew: (Crew | null)[];
  readonly housing: (Int32Array | null)[];
  readonly bookings: readonly Bookings[];
  readonly bays: readonly BayTimeline[];
  /** Stages whose hold of a bay has not been let go, for each bay. */
  readonly openHolds: readonly number[][];
  /** Where each stage's spans lie in `spanPool`, in pairs. */
  readonly spanAt: Int32Array;
  readonly spanCount: Int32Array;
  spanPool = new Int32Array(1024);
  private poolUsed = 0;
  /** How many spans each stage's part of the pool has room for since it was last cleared. */
  private readonly spanRoom: Int32Array;
  /** The instant until which each place is held, so that exactly that is taken back. */
  private readonly heldUntil: Int32Array;

  constructor(readonly compiled: Compiled) {
    const n = compiled.stageCount;
    this.isPlaced = new Uint8Array(n);
    this.start = new Int32Array(n);
    this.end = new Int32Array(n);
    this.finish = new Int32Array(n);
    this.crew = new Array<Crew | null>(n).fill(null);
    this.housing = new Array<Int32Array | null>(n).fill(null);
    this.bookings = compiled.makerIds.map(() => new Bookings());
    this.bays = compiled.bayIds.map((_, bay) => new BayTimeline(compiled.bays.capacity[bay]));
    this.openHolds = compiled.bayIds.map(() => []);
    this.spanAt = new Int32Array(n);
    this.spanCount = new Int32Array(n);
    this.spanRoom = new Int32Array(n);
    this.heldUntil = new Int32Array(compiled.work.placeUnits.length);
  }

  /** Forgets every placement. */
  clear(): void {
    this.isPlaced.fill(0);
    // What a stage last had is still asked for after it is taken out; it must not outlive the plan.
    this.crew.fill(null);
    this.housing.fill(null);
    for (const booking of this.bookings) booking.clear();
    for (const bay of this.bays) bay.clear();
    for (const holds of this.openHolds) if (holds.length > 0) holds.length = 0;
    this.poolUsed = 0;
    this.spanRoom.fill(0);
  }

  /** Becomes a copy of another layout of the same compiled problem. */
  copyFrom(other: Layout): void {
    this.isPlaced.set(other.isPlaced);
    this.start.set(other.start);
    this.end.set(other.end);
    this.finish.set(other.finish);
    this.heldUntil.set(other.heldUntil);
    this.copySpans(other);
    for (let stage = 0; stage < this.crew.length; stage += 1) {
      this.crew[stage] = other.crew[stage];
      this.housing[stage] = other.housing[stage];
    }
    this.bookings.forEach((bookings, maker) => bookings.copyFrom(other.bookings[maker]));
    this.bays.forEach((bay, k) => bay.copyFrom(other.bays[k]));
    this.openHolds.forEach((holds, bay) => {
      holds.length = 0;
      holds.push(...other.openHolds[bay]);
    });
  }

  /** Copies spans close together, so that room lost to stages that have moved on is not carried along. */
  private copySpans(other: Layout): void {
    if (this.spanPool.length < other.poolUsed) this.spanPool = new Int32Array(other.spanPool.length);
    let used = 0;
    for (let stage = 0; stage < this.spanAt.length; stage += 1) {
      const count = other.isPlaced[stage] === 1 ? other.spanCount[stage] : 0;
      const from = other.spanAt[stage];
      for (let k = 0; k < 2 * count; k += 1) this.spanPool[used + k] = other.spanPool[from + k];
      this.spanAt[stage] = used;
      this.spanCount[stage] = count;
      this.spanRoom[stage] = count;
      used += 2 * count;
    }
    this.poolUsed = used;
  }

  /** Lays a stage where a fit says, books its crew and takes its bays. */
  place(stage: number, fit: Fit, crew: Crew | null, housing: Int32Array | null): void {
    this.isPlaced[stage] = 1;
    this.start[stage] = fit.start;
    this.end[stage] = fit.end;
    this.finish[stage] = fit.finish;
    this.crew[stage] = crew;
    this.housing[stage] = housing;
    this.keepSpans(stage, fit);
    if (crew) this.book(stage, crew);
    if (housing) this.takeBays(stage, housing);
    for (const holder of this.compiled.bays.frees[stage])
      if (this.isPlaced[holder]) this.setHold(holder, stage, fit.end);
  }

  /** Takes a stage out again; what it had let go is held once more. */
  unplace(stage: number): void {
    const crew = this.crew[stage];
    const housing = this.housing[stage];
    if (crew) this.unbook(stage, crew);
    if (housing) this.releaseBays(stage, housing);
    this.isPlaced[stage] = 0;
    for (const holder of this.compiled.bays.frees[stage]) if (this.isPlaced[holder]) this.setHold(holder, stage, NEVER);
  }

  /** The last start in time for a placed stage's window: the minute before the first with more than its age. */
  windowEnd(stage: number): number {
    const age = this.compiled.work.windowAge[stage] + 1;
    return curedBy(this.compiled, stage, this.housing[stage], this.end[stage], age) - 1;
  }

  private keepSpans(stage: number, fit: Fit): void {
    const size = 2 * fit.spanCount;
    if (fit.spanCount > this.spanRoom[stage]) {
      if (this.poolUsed + size > this.spanPool.length) {
        const larger = new Int32Array(Math.max(this.spanPool.length * 2, this.poolUsed + size));
        larger.set(this.spanPool);
        this.spanPool = larger;
      }
      this.spanAt[stage] = this.poolUsed;
      this.spanRoom[stage] = fit.spanCount;
      this.poolUsed += size;
    }
    this.spanCount[stage] = fit.spanCount;
    const at = this.spanAt[stage];
    for (let k = 0; k < size; k += 1) this.spanPool[at + k] = fit.spans[k];
  }

  private book(stage: number, crew: Crew): void {
    if (this.isBookedWhole(stage, crew)) {
      this.bookings[crew.makers[0]].add(this.spanPool[this.spanAt[stage]], this.end[stage], stage);
      return;
    }
    for (const maker of crew.makers) {
      const bookings = this.bookings[maker];
      for (let k = this.spanAt[stage], left = this.spanCount[stage]; left > 0; k += 2, left -= 1) {
        bookings.add(this.spanPool[k], this.spanPool[k + 1], stage);
      }
    }
  }

  private unbook(stage: number, crew: Crew): void {
    if (this.isBookedWhole(stage, crew)) {
      this.bookings[crew.makers[0]].remove(this.spanPool[this.spanAt[stage]], this.end[stage], stage);
      return;
    }
    for (const maker of crew.makers) {
      const bookings = this.bookings[maker];
      for (let k = this.spanAt[stage], left = this.spanCount[stage]; left > 0; k += 2, left -= 1) {
        bookings.remove(this.spanPool[k], this.spanPool[k + 1], stage);
      }
    }
  }

  /**
   * Whether the nights between a stage's spans are booked with them: one maker alone, who does nothing else while on shift. One
   * long booking is found faster than many short ones.
   */
  private isBookedWhole(stage: number, crew: Crew): boolean {
    const { work, bays } = this.compiled;
    if (work.continuity[stage] !== SHIFTS || crew.makers.length !== 1 || this.spanCount[stage] < 2) return false;
    const housing = this.housing[stage];
    if (housing) for (const bay of housing) if (bay >= 0 && bays.open[bay] !== null) return false;
    return true;
  }

  private takeBays(stage: number, housing: Int32Array): void {
    const { placeOf, placeUnits, placeHold, placeUntil } = this.compiled.work;
    for (let k = 0; k < housing.length; k += 1) {
      const place = placeOf[stage] + k;
      const bay = housing[k];
      if (bay < 0 || place >= placeOf[stage + 1]) continue;
      let until = this.end[stage];
      if (placeHold[place] === HOLD_DWELL) until = this.finish[stage];
      if (placeHold[place] === HOLD_UNTIL) {
        const last = placeUntil[place];
        const isFreed = last >= 0 && this.isPlaced[last] === 1;
        until = isFreed ? Math.max(until, this.end[last]) : NEVER;
        if (!isFreed) this.openHolds[bay].push(stage);
      }
      this.heldUntil[place] = until;
      this.bays[bay].add(this.start[stage], until, placeUnits[place]);
    }
  }

  private releaseBays(stage: number, housing: Int32Array): void {
    const { placeOf, placeUnits, placeHold } = this.compiled.work;
    for (let k = 0; k < housing.length; k += 1) {
      const place = placeOf[stage] + k;
      const bay = housing[k];
      if (bay < 0 || place >= placeOf[stage + 1]) continue;
      this.bays[bay].add(this.start[stage], this.heldUntil[place], -placeUnits[place]);
      if (placeHold[place] !== HOLD_WORK) dropFrom(this.openHolds[bay], stage);
    }
  }

  /** Moves the end of what a holder holds until a stage. */
  private setHold(holder: number, lastStage: number, until: number): void {
    const { placeOf, placeUnits, placeUntil } = this.compiled.work;
    const housing = this.housing[holder];
    if (!housing) return;
    for (let k = 0; k < housing.length; k += 1) {
      const place = placeOf[holder] + k;
      if (place >= placeOf[holder + 1] || placeUntil[place] !== lastStage || housing[k] < 0) continue;
      const bay = this.bays[housing[k]];
      const held = until >= NEVER ? NEVER : Math.max(this.end[holder], until);
      bay.add(this.start[holder], this.heldUntil[place], -placeUnits[place]);
      bay.add(this.start[holder], held, placeUnits[place]);
      this.heldUntil[place] = held;
      dropFrom(this.openHolds[housing[k]], holder);
      if (held >= NEVER) this.openHolds[housing[k]].push(holder);
    }
  }
}

function dropFrom(list: number[], item: number): void {
  const i = list.indexOf(item);
  if (i >= 0) list.splice(i, 1);
}
