import { ARC, WRITTEN, type Trail } from './trail';

/**
 * Differences of two bounds: a side reaches at least another side plus a weight, always or while a condition (a literal) holds.
 * S_j >= S_i + w is two of them, one for the lower and one for the upper bounds.
 */
export class Arcs {
  private readonly from: number[] = [];
  private readonly to: number[] = [];
  private readonly weight: number[] = [];
  /** Side and bound of the condition; side -1 for an arc that always holds. */
  private readonly whenSide: number[] = [];
  private readonly whenBound: number[] = [];
  private readonly leaving: number[][];
  private readonly awaiting: number[][];

  constructor(private readonly trail: Trail) {
    this.leaving = Array.from(trail.value, () => []);
    this.awaiting = Array.from(trail.value, () => []);
  }

  /** start(to) >= start(from) + lag, for two variables, while a literal holds (side -1: always). */
  addLag(from: number, to: number, lag: number, whenSide = -1, whenBound = 0): void {
    this.add(2 * from, 2 * to, lag, whenSide, whenBound);
    this.add(2 * to + 1, 2 * from + 1, lag, whenSide, whenBound);
  }

  /** Follows all arcs for the bounds as they are; to be called once before any search. False at a conflict. */
  start(): boolean {
    for (let arc = 0; arc < this.from.length; arc++) if (!this.follow(arc)) return false;
    return true;
  }

  /** Follows up on a side that rose; false at a conflict. */
  propagate(side: number): boolean {
    const arcs = this.leaving[side];
    for (let k = 0; k < arcs.length; k++) if (!this.follow(arcs[k])) return false;
    const waiting = this.awaiting[side];
    for (let k = 0; k < waiting.length; k++) if (!this.follow(waiting[k])) return false;
    return true;
  }

  /** Writes the premises of a bound that an arc gave into a list of (side, bound) pairs. */
  explain(arc: number, bound: number, into: number[]): void {
    into.push(this.from[arc], bound - this.weight[arc]);
    if (this.whenSide[arc] >= 0) into.push(this.whenSide[arc], this.whenBound[arc]);
  }

  private follow(arc: number): boolean {
    const { trail } = this;
    const { value } = trail;
    const reached = value[this.from[arc]];
    const wanted = reached + this.weight[arc];
    const to = this.to[arc];
    if (value[to] >= wanted) return true;
    const whenSide = this.whenSide[arc];
    if (whenSide < 0) return trail.raise(to, wanted, ARC, arc);
    if (value[whenSide] >= this.whenBound[arc]) return trail.raise(to, wanted, ARC, arc);
    if (value[to ^ 1] < 1 - wanted || value[whenSide ^ 1] >= 1 - this.whenBound[arc]) return true;
    // The arc cannot hold, so its condition cannot. (A falling ceiling is a rise of `from` in the twin arc.)
    const start = trail.beginPremises(2);
    trail.addPremise(start, this.from[arc], reached);
    trail.addPremise(start, to ^ 1, 1 - wanted);
    return trail.raise(whenSide ^ 1, 1 - this.whenBound[arc], WRITTEN, start);
  }

  private add(from: number, to: number, weight: number, whenSide: number, whenBound: number): void {
    const arc = this.from.length;
    this.from.push(from);
    this.to.push(to);
    this.weight.push(weight);
    this.whenSide.push(whenSide);
    this.whenBound.push(whenBound);
    this.leaving[from].push(arc);
    if (whenSide >= 0) this.awaiting[whenSide].push(arc);
  }
}
