import type { Arcs } from './arcs';
import { CLAUSE_HEAD, type Clauses } from './clauses';
import { ARC, CLAUSE, DECISION, type Trail } from './trail';

/** What a conflict taught: a clause to keep, the level to return to, and where its literals came from. */
export interface Lesson {
  /** (side, bound) pairs; the first is implied after the return. Empty: there is no solution at all. */
  readonly literals: number[];
  readonly level: number;
  readonly distinctLevels: number;
}

/**
 * Learns from conflicts at the first unique implication point (Marques-Silva & Sakallah 1999), over bound literals: of several
 * literals of one side only the furthest counts, and a bound that moved further than needed is explained only as far as needed.
 */
export class Analyst {
  /** By side: the bound that the conflict needs and the entry that gave it; -1 for none. */
  private readonly needed: Int32Array;
  private readonly entry: Int32Array;
  private readonly marked: number[] = [];
  private readonly premises: number[] = [];
  private openHere = 0;
  /** Called with each literal that took part; for activities. */
  onInvolved: (side: number, bound: number) => void = () => undefined;

  constructor(
    private readonly trail: Trail,
    private readonly clauses: Clauses,
    private readonly arcs: Arcs,
  ) {
    this.needed = new Int32Array(trail.value.length);
    this.entry = new Int32Array(trail.value.length).fill(-1);
  }

  /** Learns from the conflict that the trail holds. */
  learn(): Lesson {
    const { trail } = this;
    this.openHere = 0;
    this.takeConflict();
    if (this.openHere === 0 && !this.descend()) {
      this.forget();
      return { literals: [], level: 0, distinctLevels: 0 };
    }
    let at = trail.length - 1;
    for (;;) {
      while (this.entry[trail.side[at]] !== at) at--;
      if (this.openHere === 1) break;
      const side = trail.side[at];
      const bound = this.needed[side];
      this.entry[side] = -1;
      this.openHere--;
      this.explain(trail.reasonKind[at], trail.reason[at], side, bound);
      this.takePremises();
      at--;
    }
    return this.lesson(trail.side[at]);
  }

  /** Where all that a conflict needs lies on earlier levels: goes back to the highest of them; false where that is 0. */
  private descend(): boolean {
    const { trail, entry } = this;
    const levels = this.marked.map((side) => trail.levelAt[entry[side]]);
    const highest = Math.max(0, ...levels);
    trail.backtrack(highest);
    this.openHere = levels.filter((level) => level === highest).length;
    return highest > 0;
  }

  private takeConflict(): void {
    const { trail } = this;
    const side = trail.conflictSide;
    this.explain(trail.conflictKind, trail.conflictReason, side, trail.conflictBound);
    if (side >= 0) this.premises.push(side ^ 1, 1 - trail.conflictBound);
    this.takePremises();
  }

  private explain(kind: number, reason: number, side: number, bound: number): void {
    const { premises } = this;
    if (kind === ARC) this.arcs.explain(reason, bound, premises);
    else if (kind === CLAUSE) {
      const { data } = this.clauses;
      data[reason + 1]++;
      const start = reason + CLAUSE_HEAD;
      const stop = start + 2 * data[reason];
      for (let k = start; k < stop; k += 2) if (data[k] !== side) premises.push(data[k] ^ 1, 1 - data[k + 1]);
    } else if (kind !== DECISION) {
      const { premises: written } = this.trail;
      const stop = reason + 1 + 2 * written[reason];
      for (let k = reason + 1; k < stop; k++) premises.push(written[k]);
    }
  }

  private takePremises(): void {
    const { premises, trail, needed, entry } = this;
    for (let k = 0; k < premises.length; k += 2) {
      const side = premises[k];
      const bound = premises[k + 1];
      if (entry[side] >= 0 && needed[side] >= bound) continue;
      const at = trail.entryOf(side, bound);
      if (at < 0) continue;
      if (entry[side] < 0) {
        this.marked.push(side);
        if (trail.levelAt[at] === trail.level) this.openHere++;
      } else if (trail.levelAt[entry[side]] !== trail.level && trail.levelAt[at] === trail.level) this.openHere++;
      needed[side] = bound;
      entry[side] = at;
      this.onInvolved(side, bound);
    }
    premises.length = 0;
  }

  private lesson(pointSide: number): Lesson {
    const { trail, needed, entry } = this;
    const literals: number[] = [pointSide ^ 1, 1 - needed[pointSide]];
    const levels = new Set<number>([trail.level]);
    let level = 0;
    let levelAt = 0;
    const sides = new Set(this.marked.filter((side) => entry[side] >= 0 && side !== pointSide));
    for (const side of sides) {
      if (this.isImpliedByOthers(side)) continue;
      const itsLevel = trail.levelAt[entry[side]];
      levels.add(itsLevel);
      if (itsLevel > level) {
        level = itsLevel;
        levelAt = literals.length;
      }
      literals.push(side ^ 1, 1 - needed[side]);
    }
    if (levelAt > 2) {
      swap(literals, 2, levelAt);
      swap(literals, 3, levelAt + 1);
    }
    this.forget();
    return { literals, level, distinctLevels: levels.size };
  }

  /** Whether the other literals imply this one in one step, so that it may be left out (Sörensson & Biere 2009, local form). */
  private isImpliedByOthers(side: number): boolean {
    const { trail, premises, needed, entry } = this;
    const at = entry[side];
    if (trail.reasonKind[at] === DECISION) return false;
    this.explain(trail.reasonKind[at], trail.reason[at], side, needed[side]);
    let isImplied = true;
    for (let k = 0; k < premises.length && isImplied; k += 2) {
      const other = premises[k];
      const isNeeded = other !== side && entry[other] >= 0 && needed[other] >= premises[k + 1];
      if (!isNeeded && trail.entryOf(other, premises[k + 1]) >= 0) isImplied = false;
    }
    premises.length = 0;
    return isImplied;
  }

  private forget(): void {
    for (const side of this.marked) this.entry[side] = -1;
    this.marked.length = 0;
  }
}

function swap(list: number[], i: number, j: number): void {
  const held = list[i];
  list[i] = list[j];
  list[j] = held;
}
