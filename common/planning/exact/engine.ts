import { Analyst, type Lesson } from './analyse';
import { Arcs } from './arcs';
import { Clauses } from './clauses';
import { CLAUSE, DECISION, Trail } from './trail';

/** A constraint that is followed as a whole when one of its variables moved. */
export interface Propagator {
  /** Sides whose rise it has to hear of. */
  readonly sides: readonly number[];
  /** Draws all conclusions; false at a conflict, which the trail then holds. */
  propagate(): boolean;
}

/** The literal that a variable is at most a bound, as (side, bound). */
export const atMost = (variable: number, bound: number): [number, number] => [2 * variable + 1, -bound];
/** The literal that a variable is at least a bound. */
export const atLeast = (variable: number, bound: number): [number, number] => [2 * variable, bound];

/** Variables, constraints and what was learnt: decides nothing itself. See `Search`. */
export class Engine {
  readonly trail: Trail;
  readonly clauses: Clauses;
  readonly arcs: Arcs;
  readonly analyst: Analyst;
  private readonly propagators: Propagator[] = [];
  private readonly waiting: number[][];
  private readonly queue: number[] = [];
  private queueHead = 0;
  private readonly isQueued: boolean[] = [];
  private head = 0;
  private isBroken = false;

  constructor(lower: readonly number[], upper: readonly number[]) {
    this.trail = new Trail(lower, upper);
    this.clauses = new Clauses(this.trail);
    this.arcs = new Arcs(this.trail);
    this.analyst = new Analyst(this.trail, this.clauses, this.arcs);
    this.waiting = Array.from(this.trail.value, () => []);
  }

  lower(variable: number): number {
    return this.trail.value[2 * variable];
  }

  upper(variable: number): number {
    return -this.trail.value[2 * variable + 1];
  }

  isFixed(variable: number): boolean {
    return this.trail.value[2 * variable] + this.trail.value[2 * variable + 1] === 0;
  }

  /** Adds a constraint; it is followed at the next `propagate`. */
  add(propagator: Propagator): void {
    const index = this.propagators.push(propagator) - 1;
    for (const side of propagator.sides) this.waiting[side].push(index);
    this.isQueued[index] = true;
    this.queue.push(index);
  }

  /** At level 0: adds a clause of (side, bound) pairs. */
  addClause(...literals: readonly (readonly [number, number])[]): void {
    if (literals.some(([side, bound]) => this.trail.value[side] >= bound)) return;
    const open = literals.filter(([side, bound]) => this.trail.value[side ^ 1] < 1 - bound);
    if (open.length === 0) this.isBroken = true;
    else if (open.length === 1) this.assert(open[0][0], open[0][1]);
    else this.clauses.addFixed(open.flat());
  }

  /** At level 0: makes a literal true for good; false if that leaves no solution. */
  assert(side: number, bound: number): boolean {
    if (!this.trail.raise(side, bound, DECISION, 0)) this.isBroken = true;
    return !this.isBroken;
  }

  /** Follows every arc once; to be called after the constraints are in. False if there is no solution. */
  start(): boolean {
    if (this.isBroken || !this.arcs.start() || !this.propagate()) this.isBroken = true;
    return this.settle();
  }

  /** At level 0 after propagation: takes what holds as given. */
  settle(): boolean {
    this.trail.settle();
    this.head = 0;
    return !this.isBroken;
  }

  /** Decides a literal on a new level. */
  decide(side: number, bound: number): void {
    this.trail.openLevel();
    this.trail.raise(side, bound, DECISION, 0);
  }

  /** Draws all conclusions of what has been raised; false at a conflict. */
  propagate(): boolean {
    const { trail, clauses, arcs } = this;
    for (;;) {
      while (this.head < trail.length) {
        const at = this.head++;
        const side = trail.side[at];
        if (!clauses.propagate(side, trail.left[at], trail.reached[at]) || !arcs.propagate(side)) return false;
        const waiting = this.waiting[side];
        for (let k = 0; k < waiting.length; k++) {
          if (this.isQueued[waiting[k]]) continue;
          this.isQueued[waiting[k]] = true;
          this.queue.push(waiting[k]);
        }
      }
      if (this.queueHead === this.queue.length) {
        this.queue.length = this.queueHead = 0;
        return true;
      }
      const next = this.queue[this.queueHead++];
      this.isQueued[next] = false;
      if (!this.propagators[next].propagate()) return false;
    }
  }

  /** Learns from a conflict and goes back as far as the lesson says; null where no solution is left. */
  resolve(): Lesson | null {
    const lesson = this.analyst.learn();
    const { literals } = lesson;
    this.backtrack(lesson.level);
    if (literals.length === 0) {
      this.isBroken = true;
      return null;
    }
    const isUnit = literals.length === 2;
    const reason = isUnit ? 0 : this.clauses.addLearnt(literals, lesson.distinctLevels);
    if (!this.trail.raise(literals[0], literals[1], isUnit ? DECISION : CLAUSE, reason)) {
      this.isBroken = true;
      return null;
    }
    return lesson;
  }

  /** Undoes all levels above one. */
  backtrack(level: number): void {
    this.trail.backtrack(level);
    this.head = this.trail.length;
    for (; this.queueHead < this.queue.length; this.queueHead++) this.isQueued[this.queue[this.queueHead]] = false;
    this.queue.length = this.queueHead = 0;
  }
}
