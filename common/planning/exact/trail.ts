/**
 * Integer variables as pairs of bounds, with a trail that remembers why each bound was moved.
 *
 * A variable v has two sides, 2v for its lower bound and 2v+1 for its negated upper bound, so that every change is a side that
 * rises. A literal is a pair (side, bound) and says that the side has reached the bound; its negation is (side ^ 1, 1 - bound).
 * Learning on such bound literals is lazy clause generation (Ohrimenko, Stuckey & Codish 2009) without a literal per value.
 */
export class Trail {
  /** By side: what it has reached. */
  readonly value: Int32Array;
  /** By side: its latest entry on the trail, -1 for none. */
  readonly latest: Int32Array;

  /** Parallel arrays, one place for each entry: which side, from what to what, its entry before, its level, and why. */
  side = new Int32Array(1024);
  reached = new Int32Array(1024);
  left = new Int32Array(1024);
  previous = new Int32Array(1024);
  levelAt = new Int32Array(1024);
  reasonKind = new Uint8Array(1024);
  reason = new Int32Array(1024);
  length = 0;

  /** Premises of reasons that are written down when they arise: count, then (side, bound) pairs. */
  premises = new Int32Array(4096);
  premisesEnd = 0;

  /** Set when a bound could not be moved: the literal that was wanted and why. */
  conflictSide = -1;
  conflictBound = 0;
  conflictKind: number = WRITTEN;
  conflictReason = 0;

  /** Decisions made so far. */
  level = 0;
  private levelEntry = new Int32Array(256);
  private levelPremises = new Int32Array(256);

  constructor(lower: readonly number[], upper: readonly number[]) {
    this.value = new Int32Array(2 * lower.length);
    this.latest = new Int32Array(2 * lower.length).fill(-1);
    lower.forEach((bound, v) => {
      this.value[2 * v] = bound;
      this.value[2 * v + 1] = -upper[v];
    });
  }

  /** Opens a decision level; what follows is undone together. */
  openLevel(): void {
    if (this.level === this.levelEntry.length) {
      this.levelEntry = grown(this.levelEntry, this.level + 1);
      this.levelPremises = grown(this.levelPremises, this.level + 1);
    }
    this.levelEntry[this.level] = this.length;
    this.levelPremises[this.level++] = this.premisesEnd;
  }

  /**
   * Makes a literal true, or leaves it if it is. False where it cannot be: then the `conflict` fields say what was wanted and
   * why; the opposite side is the other half of the conflict.
   */
  raise(side: number, bound: number, kind: number, reason: number): boolean {
    const { value } = this;
    if (value[side] >= bound) return true;
    if (value[side ^ 1] >= 1 - bound) {
      this.conflictSide = side;
      this.conflictBound = bound;
      this.conflictKind = kind;
      this.conflictReason = reason;
      return false;
    }
    const at = this.length++;
    if (at === this.side.length) this.grow();
    this.side[at] = side;
    this.reached[at] = bound;
    this.left[at] = value[side];
    this.previous[at] = this.latest[side];
    this.levelAt[at] = this.level;
    this.reasonKind[at] = kind;
    this.reason[at] = reason;
    this.latest[side] = at;
    value[side] = bound;
    return true;
  }

  /** Undoes all levels above one. */
  backtrack(level: number): void {
    if (level >= this.level) return;
    const keep = this.levelEntry[level];
    for (let at = this.length - 1; at >= keep; at--) {
      const side = this.side[at];
      this.value[side] = this.left[at];
      this.latest[side] = this.previous[at];
    }
    this.length = keep;
    this.premisesEnd = this.levelPremises[level];
    this.level = level;
  }

  /** At level 0: takes what is true as given, so that it is never explained again. */
  settle(): void {
    for (let at = 0; at < this.length; at++) this.latest[this.side[at]] = -1;
    this.length = 0;
    this.premisesEnd = 0;
  }

  /** The first entry that made a true literal true, searched backwards from an entry of its side; -1 if it is given. */
  entryOf(side: number, bound: number): number {
    let at = this.latest[side];
    while (at >= 0 && this.left[at] >= bound) at = this.previous[at];
    return at;
  }

  /** Starts a written reason with room for `most` premises; returns where it stands. */
  beginPremises(most: number): number {
    const start = this.premisesEnd;
    const needed = start + 1 + 2 * most;
    if (needed > this.premises.length) this.premises = grown(this.premises, needed);
    this.premises[start] = 0;
    this.premisesEnd = start + 1;
    return start;
  }

  /** Adds a premise to the reason that was begun last. */
  addPremise(start: number, side: number, bound: number): void {
    this.premises[this.premisesEnd++] = side;
    this.premises[this.premisesEnd++] = bound;
    this.premises[start]++;
  }

  /** Records a conflict of written premises alone. */
  conflictOf(start: number): void {
    this.conflictSide = -1;
    this.conflictKind = WRITTEN;
    this.conflictReason = start;
  }

  private grow(): void {
    const size = 2 * this.side.length;
    this.side = grown(this.side, size);
    this.reached = grown(this.reached, size);
    this.left = grown(this.left, size);
    this.previous = grown(this.previous, size);
    this.levelAt = grown(this.levelAt, size);
    this.reason = grown(this.reason, size);
    const kinds = new Uint8Array(size);
    kinds.set(this.reasonKind);
    this.reasonKind = kinds;
  }
}

/** Kinds of reasons: none (a decision), a clause, an arc of two bounds, or premises written down when they arose. */
export const DECISION = 0;
export const CLAUSE = 1;
export const ARC = 2;
export const WRITTEN = 3;

/** The same numbers in an array at least twice as long. */
export function grown(array: Int32Array, needed: number): Int32Array<ArrayBuffer> {
  const larger = new Int32Array(Math.max(needed, 2 * array.length));
  larger.set(array);
  return larger;
}
