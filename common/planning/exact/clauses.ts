import { CLAUSE, grown, type Trail } from './trail';

/** A clause that was learnt: where it stands and how many levels its literals came from when it was. */
interface Learnt {
  readonly offset: number;
  readonly distinctLevels: number;
}

/** Words before a clause's literals: their number, and how often the clause helped to explain a conflict lately. */
export const CLAUSE_HEAD = 2;

/**
 * Clauses over bound literals with two watched literals each (Moskewicz et al. 2001). A watch lies on the side whose rise makes
 * its literal false, with the value at which it does. No clause has two literals of one side.
 */
export class Clauses {
  /** Clauses one after another: head, then (side, bound) pairs; the first two pairs are watched. */
  data = new Int32Array(1 << 14);
  private end = 0;
  private readonly watchClause: number[][];
  private readonly watchAt: number[][];
  private learnt: Learnt[] = [];
  private fixed: number[] = [];
  private hasFailed = false;

  constructor(private readonly trail: Trail) {
    this.watchClause = Array.from(trail.value, () => []);
    this.watchAt = Array.from(trail.value, () => []);
  }

  get learntCount(): number {
    return this.learnt.length;
  }

  /** Adds a clause of two literals or more that holds for ever. Literals are (side, bound) pairs in one flat list. */
  addFixed(literals: readonly number[]): void {
    this.fixed.push(this.store(literals, 0));
  }

  /** Adds a learnt clause of two literals or more; the first is the one it implies, the second of the level to return to. */
  addLearnt(literals: readonly number[], distinctLevels: number): number {
    const offset = this.store(literals, 1);
    this.learnt.push({ offset, distinctLevels });
    return offset;
  }

  /** Follows up on a side that rose from one value to another; false at a conflict. */
  propagate(side: number, from: number, to: number): boolean {
    const clauses = this.watchClause[side];
    const thresholds = this.watchAt[side];
    const count = clauses.length;
    let kept = 0;
    for (let i = 0; i < count; i++) {
      const threshold = thresholds[i];
      const offset = clauses[i];
      if (!this.hasFailed && threshold <= to && threshold > from && this.moveWatch(offset, side, threshold)) continue;
      clauses[kept] = offset;
      thresholds[kept++] = threshold;
    }
    if (kept < count) {
      clauses.length = kept;
      thresholds.length = kept;
    }
    const { hasFailed } = this;
    this.hasFailed = false;
    return !hasFailed;
  }

  /** Deals with a watched literal that became false; true if its watch goes elsewhere. Sets `hasFailed` at a conflict. */
  private moveWatch(offset: number, side: number, threshold: number): boolean {
    const { data } = this;
    const { value } = this.trail;
    const first = offset + CLAUSE_HEAD;
    const ownSide = side ^ 1;
    if (data[first] === ownSide) {
      data[first] = data[first + 2];
      data[first + 1] = data[first + 3];
      data[first + 2] = ownSide;
      data[first + 3] = 1 - threshold;
    }
    const firstSide = data[first];
    const firstBound = data[first + 1];
    if (value[firstSide] >= firstBound) return false;
    const stop = first + 2 * data[offset];
    for (let k = first + 4; k < stop; k += 2) {
      const opposite = data[k] ^ 1;
      const falseAt = 1 - data[k + 1];
      if (value[opposite] >= falseAt) continue;
      data[first + 2] = data[k];
      data[first + 3] = data[k + 1];
      data[k] = ownSide;
      data[k + 1] = 1 - threshold;
      this.watchClause[opposite].push(offset);
      this.watchAt[opposite].push(falseAt);
      return true;
    }
    if (!this.trail.raise(firstSide, firstBound, CLAUSE, offset)) this.hasFailed = true;
    return false;
  }

  /**
   * At level 0 with all consequences drawn: forgets the worse half of the learnt clauses, by the levels they span (Audemard &
   * Simon 2009) and their use, and all that are true for good.
   */
  reduce(): void {
    const { data } = this;
    const rank = (clause: Learnt): number =>
      Math.min(clause.distinctLevels, 6) * 1000 - Math.min(999, data[clause.offset + 1]);
    const ranked = [...this.learnt].sort((a, b) => rank(a) - rank(b) || b.offset - a.offset);
    const kept = new Set(ranked.slice(0, ranked.length >> 1));
    const literalsAt = (offset: number): number[] => {
      const start = offset + CLAUSE_HEAD;
      return this.unsettledFirst(data.subarray(start, start + 2 * data[offset]));
    };
    const fixed = this.fixed.map(literalsAt);
    const learnt = this.learnt
      .filter((clause) => kept.has(clause))
      .map(({ offset, distinctLevels }) => ({
        distinctLevels,
        used: data[offset + 1] >> 1,
        literals: literalsAt(offset),
      }));
    this.clear();
    for (const literals of fixed) if (!this.isTrueForGood(literals)) this.addFixed(literals);
    for (const { literals, distinctLevels, used } of learnt)
      if (!this.isTrueForGood(literals)) this.learnt.push({ offset: this.store(literals, used), distinctLevels });
  }

  private clear(): void {
    this.end = 0;
    this.fixed = [];
    this.learnt = [];
    for (const list of this.watchClause) list.length = 0;
    for (const list of this.watchAt) list.length = 0;
  }

  private isTrueForGood(literals: readonly number[]): boolean {
    for (let k = 0; k < literals.length; k += 2) if (this.trail.value[literals[k]] >= literals[k + 1]) return true;
    return false;
  }

  /** Literals that may still be true, first; a clause that is not true for good has two of them at least. */
  private unsettledFirst(literals: Int32Array): number[] {
    const open: number[] = [];
    const closed: number[] = [];
    for (let k = 0; k < literals.length; k += 2) {
      const isFalse = this.trail.value[literals[k] ^ 1] >= 1 - literals[k + 1];
      (isFalse ? closed : open).push(literals[k], literals[k + 1]);
    }
    return open.length >= 4 ? open : [...open, ...closed];
  }

  private store(literals: readonly number[], used: number): number {
    const offset = this.end;
    const needed = offset + CLAUSE_HEAD + literals.length;
    if (needed > this.data.length) this.data = grown(this.data, needed);
    this.data[offset] = literals.length >> 1;
    this.data[offset + 1] = used;
    for (let k = 0; k < literals.length; k++) this.data[offset + CLAUSE_HEAD + k] = literals[k];
    this.end = needed;
    for (let k = 0; k < 4; k += 2) {
      this.watchClause[literals[k] ^ 1].push(offset);
      this.watchAt[literals[k] ^ 1].push(1 - literals[k + 1]);
    }
    return offset;
  }
}
