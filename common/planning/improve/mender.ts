import { StageBounds } from '../construct/bounds-of-stage';
import { NEVER } from '../construct/calendar';
import { type Compiled, type Crew, HOLD_DWELL, HOLD_UNTIL, MOVABLE } from '../construct/compiled';
import type { Ask } from '../construct/ask';
import { Fitter } from '../construct/fitter';
import { owedFor, placeAt } from '../construct/fixed-stages';
import { copyFit, type Fit, type Layout, newFit } from '../construct/layout';
import { workMinutes } from '../construct/work-minutes';

/** A stage gives way at most so often in one move, which ends chases between maximum gaps. */
const MOST_TURNS_OF_STAGE = 12;

/** A stage taken out, with all that is needed to lay it back. */
interface Lifted {
  readonly stage: number;
  readonly fit: Fit;
  readonly crew: Crew | null;
  readonly housing: Int32Array | null;
}

/** Mends a laid-out plan around one stage that has been put somewhere by hand. */
export class Mender {
  private readonly compiled: Compiled;
  private readonly fitter: Fitter;
  private readonly bounds: StageBounds;
  private readonly trial: Fit = newFit();
  private readonly best: Fit = newFit();
  private readonly turns: Uint8Array;
  /** Where each stage stood before the move: nothing gives way to an earlier time. */
  private readonly stood: Int32Array;
  private readonly floor: Int32Array;
  private held = -1;
  /** Stages that the held one has pushed out of their places and that have no other yet. */
  private readonly displaced = new Map<number, Lifted>();

  constructor(private readonly layout: Layout) {
    this.compiled = layout.compiled;
    this.fitter = new Fitter(layout);
    this.bounds = new StageBounds(layout, this.fitter);
    this.turns = new Uint8Array(this.compiled.stageCount);
    this.stood = layout.start.slice();
    this.floor = new Int32Array(this.compiled.stageCount).fill(-NEVER);
  }

  /** Puts a stage at a start (or as early as its old one allows, where none is given), with chosen crews and bays or its own. */
  put(
    stage: number,
    start: number | null,
    crews: readonly Crew[] | null,
    housings: readonly Int32Array[] | null,
  ): void {
    const { layout } = this;
    this.held = stage;
    const wasPlaced = layout.isPlaced[stage] === 1;
    const oldCrew = wasPlaced ? layout.crew[stage] : null;
    const oldHousing = wasPlaced ? layout.housing[stage] : null;
    const at = start ?? (wasPlaced ? this.stood[stage] : 0);
    const stays =
      wasPlaced &&
      at === this.stood[stage] &&
      isAmong(crews, oldCrew, sameMakers) &&
      isAmong(housings, oldHousing, sameBays);
    if (stays) return;
    if (wasPlaced) layout.unplace(stage);
    this.bounds.gather(stage, 0);
    const owed = owedFor(this.bounds, at);
    const lifted = this.liftMovables();
    placeAt(layout, this.fitter, stage, at, owed, {
      crews: crews ?? (oldCrew ? [oldCrew] : null),
      housings: housings ?? (oldHousing ? [oldHousing] : null),
    });
    for (const other of lifted) {
      if (this.isFreeFor(other)) layout.place(other.stage, other.fit, other.crew, other.housing);
      else this.displaced.set(other.stage, other);
    }
  }

  /** Lets everything that the held stage runs into, and what follows from that, give way; in the order of their old starts. */
  giveWay(stage: number): void {
    const queue = new Set<number>(this.displaced.keys());
    this.queueAround(stage, queue);
    for (let rounds = 0; queue.size > 0 && rounds < 8 * this.compiled.stageCount + 64; rounds += 1) {
      const next = this.firstOf(queue);
      queue.delete(next);
      if (this.turns[next] >= MOST_TURNS_OF_STAGE || !this.mayMove(next) || !this.isAmiss(next)) continue;
      this.turns[next] += 1;
      this.moveOn(next, queue);
    }
  }

  private mayMove(stage: number): boolean {
    return stage !== this.held && this.compiled.work.fixity[stage] === MOVABLE;
  }

  private firstOf(queue: ReadonlySet<number>): number {
    let first = -1;
    for (const stage of queue) {
      if (
        first < 0 ||
        this.stood[stage] < this.stood[first] ||
        (this.stood[stage] === this.stood[first] && stage < first)
      )
        first = stage;
    }
    return first;
  }

  /**
   * Movable work is lifted off while the held stage is put down, so that the hand's choice is read strictly wherever only such
   * work stands against it.
   */
  private liftMovables(): Lifted[] {
    const { layout } = this;
    const lifted: Lifted[] = [];
    for (let other = 0; other < this.compiled.stageCount; other += 1) {
      if (layout.isPlaced[other] === 0 || !this.mayMove(other)) continue;
      lifted.push({ stage: other, fit: this.fitOf(other), crew: layout.crew[other], housing: layout.housing[other] });
    }
    for (const { stage } of lifted) layout.unplace(stage);
    return lifted;
  }

  /** Whether nobody of the stage's crew is booked meanwhile. Bays are looked at when holds are complete again. */
  private isFreeFor({ fit, crew }: Lifted): boolean {
    for (const maker of crew?.makers ?? []) {
      const bookings = this.layout.bookings[maker];
      for (let s = 0; s < fit.spanCount; s += 1)
        if (bookings.nextStart(fit.spans[2 * s]) < fit.spans[2 * s + 1]) return false;
    }
    return true;
  }

  private fitOf(stage: number): Fit {
    const { layout } = this;
    const fit = newFit();
    fit.start = layout.start[stage];
    fit.end = layout.end[stage];
    fit.finish = layout.finish[stage];
    fit.spanCount = layout.spanCount[stage];
    fit.spans = layout.spanPool.slice(layout.spanAt[stage], layout.spanAt[stage] + 2 * fit.spanCount);
    return fit;
  }

  /** Whether a stage has lost its place, or, as it stands, overfills a bay or breaks a bound. */
  private isAmiss(stage: number): boolean {
    const { layout, bounds } = this;
    if (layout.isPlaced[stage] === 0) return true;
    const fit = this.fitOf(stage);
    const crew = layout.crew[stage];
    const housing = layout.housing[stage];
    layout.unplace(stage);
    bounds.gather(stage, 0);
    let amiss =
      fit.start < Math.max(bounds.lowStart, this.floor[stage]) ||
      fit.end < bounds.lowEnd ||
      fit.finish < bounds.lowFinish ||
      this.minutesOwed(stage, crew, fit.start) !== minutesOf(fit) ||
      fit.finish !== this.fitter.dwellEnd({ stage, housing }, fit.end);
    for (let k = 0; housing && k < housing.length && !amiss; k += 1) {
      const place = this.compiled.work.placeOf[stage] + k;
      if (housing[k] < 0) continue;
      const until = this.holdEnd(stage, place, fit);
      amiss = layout.bays[housing[k]].clashEnd(fit.start, until, this.compiled.work.placeUnits[place]) >= 0;
    }
    layout.place(stage, fit, crew, housing);
    return amiss;
  }

  private holdEnd(stage: number, place: number, fit: Fit): number {
    const { placeHold, placeUntil } = this.compiled.work;
    if (placeHold[place] === HOLD_DWELL) return fit.finish;
    if (placeHold[place] !== HOLD_UNTIL || placeUntil[place] === stage) return fit.end;
    const last = placeUntil[place];
    return last >= 0 && this.layout.isPlaced[last] === 1 ? Math.max(fit.end, this.layout.end[last]) : fit.finish;
  }

  private minutesOwed(stage: number, crew: Crew | null, start: number): number {
    return workMinutes(this.compiled, stage, this.compiled.work.minutes[stage] + owedFor(this.bounds, start), crew);
  }

  /** Lays a stage out again, no earlier than it stood, beside everything else; then looks at what that touches. */
  private moveOn(stage: number, queue: Set<number>): void {
    const { layout, bounds } = this;
    const displaced = this.displaced.get(stage);
    const oldCrew = displaced?.crew ?? layout.crew[stage];
    const oldHousing = displaced?.housing ?? layout.housing[stage];
    const old = displaced?.fit ?? this.fitOf(stage);
    if (!displaced) layout.unplace(stage);
    this.displaced.delete(stage);
    bounds.gather(stage, Math.max(this.stood[stage], this.floor[stage]));
    const found = this.fitNear(stage, oldCrew, oldHousing);
    if (!found) {
      // There is no room for it at all: it stays where it was, and the checker says what is wrong with that.
      layout.place(stage, old, oldCrew, oldHousing);
      this.turns[stage] = MOST_TURNS_OF_STAGE;
      return;
    }
    layout.place(stage, this.best, found.crew, found.housing);
    this.pullCause(stage, queue);
    this.queueAround(stage, queue);
  }

  /** Its own crew and bays first; others where they are sooner by more than an hour. */
  private fitNear(
    stage: number,
    oldCrew: Crew | null,
    oldHousing: Int32Array | null,
  ): { crew: Crew | null; housing: Int32Array | null } | null {
    const { crews, housings } = this.compiled.work;
    let found: { crew: Crew | null; housing: Int32Array | null } | null = null;
    let bestScore = NEVER;
    const weigh = (crew: Crew | null, housing: Int32Array | null, handicap: number): void => {
      if (!this.fitWith(stage, crew, housing)) return;
      const score = this.trial.finish + handicap;
      if (score >= bestScore) return;
      bestScore = score;
      found = { crew, housing };
      copyFit(this.trial, this.best);
    };
    weigh(oldCrew, oldHousing, 0);
    for (const housing of housings[stage].length > 0 ? housings[stage] : [oldHousing]) {
      for (const crew of crews[stage].length > 0 ? crews[stage] : [null]) weigh(crew, housing, 60);
    }
    return found;
  }

  private fitWith(stage: number, crew: Crew | null, housing: Int32Array | null): boolean {
    const { bounds } = this;
    const ask: Ask = {
      stage,
      crew,
      housing,
      minutes: 0,
      overtime: false,
      lowStart: bounds.lowStart,
      lowEnd: bounds.lowEnd,
      lowFinish: bounds.lowFinish,
      lastStart: NEVER,
      lastEnd: NEVER,
    };
    for (let owed = -1; ;) {
      const minutes = this.minutesOwed(stage, crew, ask.lowStart);
      if (minutes === owed) return true;
      owed = minutes;
      ask.minutes = minutes;
      if (!this.fitter.fit(ask, this.trial)) return false;
      ask.lowStart = this.trial.start;
    }
  }

  /** Where a stage now comes too late after another, that other is asked to begin later too. */
  private pullCause(stage: number, queue: Set<number>): void {
    const { bounds, layout } = this;
    const ask = (over: number, cause: number): void => {
      if (over <= 0 || cause < 0 || !this.mayMove(cause)) return;
      this.floor[cause] = Math.max(this.floor[cause], layout.start[cause] + over);
      queue.add(cause);
    };
    ask(layout.start[stage] - bounds.highStart, bounds.highStartCause);
    ask(layout.end[stage] - bounds.highEnd, bounds.highEndCause);
    ask(layout.finish[stage] - bounds.highFinish, bounds.highFinishCause);
  }

  /** Everything that a stage may now push: what is linked to it, and what shares its hands or bays. */
  private queueAround(stage: number, queue: Set<number>): void {
    const { links, bays } = this.compiled;
    const { layout } = this;
    const add = (other: number): void => {
      if (layout.isPlaced[other] === 1 && other !== stage && this.mayMove(other)) queue.add(other);
    };
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) add(links.to[links.outLinks[k]]);
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) add(links.from[links.inLinks[k]]);
    bays.frees[stage].forEach(add);
    const until = this.reach(stage);
    for (let other = 0; other < this.compiled.stageCount; other += 1) {
      if (layout.start[other] < until && this.reach(other) > layout.start[stage] && this.shares(stage, other))
        add(other);
    }
    // What lets a hold of this stage's bay go may have to hurry: its holder's neighbours are looked at with it.
    for (const holder of bays.frees[stage]) {
      for (let other = 0; other < this.compiled.stageCount; other += 1) if (this.shares(holder, other)) add(other);
    }
  }

  private reach(stage: number): number {
    let until = Math.max(this.layout.end[stage], this.layout.finish[stage]);
    const { placeOf, placeUntil } = this.compiled.work;
    for (let place = placeOf[stage]; place < placeOf[stage + 1]; place += 1) {
      const last = placeUntil[place];
      if (last >= 0) until = this.layout.isPlaced[last] === 1 ? Math.max(until, this.layout.end[last]) : NEVER;
    }
    return until;
  }

  private shares(a: number, b: number): boolean {
    const { crew, housing } = this.layout;
    const makers = crew[b]?.makers;
    const bays = housing[b];
    return (
      (makers !== undefined && crew[a] !== null && crew[a].makers.some((maker) => makers.includes(maker))) ||
      (bays !== null && housing[a] !== null && housing[a].some((bay) => bays.includes(bay)))
    );
  }
}

function minutesOf(fit: Fit): number {
  let minutes = 0;
  for (let s = 0; s < fit.spanCount; s += 1) minutes += fit.spans[2 * s + 1] - fit.spans[2 * s];
  return minutes;
}

/** Whether what a stage has is among what it may have; anything is where nothing is said. */
function isAmong<T>(wanted: readonly T[] | null, has: T | null, isSame: (a: T, b: T) => boolean): boolean {
  return (
    wanted === null || wanted.some((one) => has !== null && isSame(one, has)) || (has === null && wanted.length === 0)
  );
}

function sameMakers(a: Crew, b: Crew): boolean {
  return sameBays(a.makers.slice().sort(), b.makers.slice().sort());
}

function sameBays(a: Int32Array, b: Int32Array): boolean {
  return a.length === b.length && a.every((item, k) => item === b[k]);
}
