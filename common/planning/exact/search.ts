import { ActivityOrder } from './activity-order';
import type { Engine } from './engine';

/** What a search may spend: conflicts, and the caller's own wish to end it. */
export interface SearchBudget {
  readonly maxConflicts: number;
  readonly shouldStop: () => boolean;
}

/** How a search ended: the best solution is proved best, there is none, or the budget is spent. */
export type SearchEnd = 'proved' | 'infeasible' | 'budget';

/** What to seek: the least value of one variable, deciding on these variables in this order of preference. */
export interface Goal {
  readonly objective: number;
  /** Decided earliest-first where no conflict says otherwise. */
  readonly starts: readonly number[];
  /** Decided after the starts, each towards its upper bound first. */
  readonly choices: readonly number[];
  /** The choices that belong to each start, at its place in `starts`; in some restarts they are decided right after it. */
  readonly choicesOf: readonly (readonly number[])[];
}

const FIRST_RESTART = 100;
const LEARNT_AT_FIRST = 4000;

/**
 * Branch and bound with learning and restarts. Decisions follow conflict activity, towards the best solution so far; every other
 * restart builds earliest starts first, as the authors of the RCPSP/max method do at the beginning (Schutt et al. 2013), and
 * now and then one asks for the least objective not yet excluded, which raises the lower bound.
 */
export class Search {
  /** Values of the best solution by variable; null before one is found. */
  best: Int32Array | null = null;
  conflicts = 0;
  private readonly order: ActivityOrder;
  private readonly starts: Int32Array;
  private readonly taker = { variable: 0, bound: 0 };
  private readonly phase: Int32Array;
  private restarts = 0;
  private maxLearnt = LEARNT_AT_FIRST;
  private polls = 0;

  constructor(
    private readonly engine: Engine,
    private readonly goal: Goal,
    private readonly onBetter: (values: Int32Array) => void = () => undefined,
  ) {
    this.order = new ActivityOrder(engine.trail);
    this.starts = Int32Array.from(goal.starts);
    this.phase = Int32Array.from({ length: engine.trail.value.length >> 1 }, (_, v) => engine.lower(v));
    engine.analyst.onInvolved = (side, bound) => this.order.bump(side, bound);
  }

  /** The least objective that is not excluded yet. */
  get lowerBound(): number {
    return this.engine.trail.level === 0 ? this.engine.lower(this.goal.objective) : this.provedBound;
  }
  private provedBound = -Infinity;

  /** Leads decisions towards known values, by variable; those of -1 stay as they are. */
  lean(values: Int32Array): void {
    for (let v = 0; v < values.length; v++) if (values[v] >= 0) this.phase[v] = values[v];
  }

  /** Searches until the best is proved or the budget is spent. May be called again to go on. */
  run(budget: SearchBudget): SearchEnd {
    const { engine } = this;
    if (!engine.propagate() || !engine.settle()) return this.exhausted();
    while (this.conflicts < budget.maxConflicts) {
      const allowance = Math.min(FIRST_RESTART * luby(++this.restarts), budget.maxConflicts - this.conflicts);
      const end = this.descend(allowance, budget.shouldStop);
      this.backtrack(0);
      if (end === 'exhausted') return this.exhausted();
      if (!engine.propagate() || !engine.settle()) return this.exhausted();
      this.provedBound = engine.lower(this.goal.objective);
      if (end === 'stopped') return 'budget';
      if (engine.clauses.learntCount > this.maxLearnt) {
        engine.clauses.reduce();
        this.maxLearnt += 300;
      }
    }
    return 'budget';
  }

  private exhausted(): SearchEnd {
    if (this.best === null) return 'infeasible';
    this.provedBound = this.best[this.goal.objective];
    return 'proved';
  }

  private descend(allowance: number, shouldStop: () => boolean): 'exhausted' | 'stopped' | 'restart' {
    const { engine, goal } = this;
    const isByActivity = this.restarts % 2 === 0;
    const isStageByStage = this.restarts % 4 === 1;
    const asksLeast = this.restarts % 4 === 0;
    let left = allowance;
    for (;;) {
      if (!engine.propagate()) {
        this.conflicts++;
        left--;
        const lesson = engine.resolve();
        if (lesson === null) return 'exhausted';
        this.order.backtrack(lesson.level);
        this.order.decay();
        if (shouldStop()) return 'stopped';
        continue;
      }
      if (left <= 0) return 'restart';
      if ((++this.polls & 255) === 0 && shouldStop()) return 'stopped';
      if (asksLeast && engine.trail.level === 0 && !engine.isFixed(goal.objective)) {
        engine.decide(2 * goal.objective + 1, -engine.lower(goal.objective));
        continue;
      }
      if (isByActivity && this.decideByActivity()) continue;
      if (isStageByStage && this.decideOwnChoice()) continue;
      if (this.decideEarliest() || this.decideChoice()) continue;
      if (!this.accept()) return 'exhausted';
    }
  }

  private decideByActivity(): boolean {
    const { taker, engine } = this;
    if (!this.order.take(taker)) return false;
    if (this.phase[taker.variable] >= taker.bound) engine.decide(2 * taker.variable, taker.bound);
    else engine.decide(2 * taker.variable + 1, 1 - taker.bound);
    return true;
  }

  /** The start that can be earliest, and of those the one that must be earliest: now. */
  private decideEarliest(): boolean {
    const { engine, starts } = this;
    const { value } = engine.trail;
    let chosen = -1;
    let least = 0;
    let latest = 0;
    for (let k = 0; k < starts.length; k++) {
      const v = starts[k];
      const lower = value[2 * v];
      const upper = -value[2 * v + 1];
      if (lower === upper) continue;
      if (chosen >= 0 && (lower > least || (lower === least && upper >= latest))) continue;
      chosen = v;
      least = lower;
      latest = upper;
    }
    if (chosen < 0) return false;
    engine.decide(2 * chosen + 1, -least);
    return true;
  }

  /** A choice of a stage whose start is settled. */
  private decideOwnChoice(): boolean {
    const { choicesOf } = this.goal;
    for (let k = 0; k < choicesOf.length; k++)
      if (this.engine.isFixed(this.starts[k]) && this.decideOneOf(choicesOf[k])) return true;
    return false;
  }

  private decideChoice(): boolean {
    return this.decideOneOf(this.goal.choices);
  }

  private decideOneOf(choices: readonly number[]): boolean {
    const { engine } = this;
    for (const v of choices) {
      if (engine.isFixed(v)) continue;
      engine.decide(2 * v, engine.upper(v));
      return true;
    }
    return false;
  }

  /** Takes a solution and asks for a better one; false where that is impossible. */
  private accept(): boolean {
    const { engine, goal } = this;
    const values = Int32Array.from(this.phase, (_, v) => engine.lower(v));
    this.best = values;
    this.phase.set(values);
    this.onBetter(values);
    this.backtrack(0);
    return engine.assert(2 * goal.objective + 1, -(values[goal.objective] - 1));
  }

  private backtrack(level: number): void {
    this.engine.backtrack(level);
    this.order.backtrack(level);
  }
}

/** The reluctant doubling sequence 1 1 2 1 1 2 4 … (Luby, Sinclair & Zuckerman 1993), from its first term. */
export function luby(term: number): number {
  let size = 1;
  let power = 1;
  while (size < term) {
    size = 2 * size + 1;
    power *= 2;
  }
  let at = term;
  while (size !== at) {
    size = (size - 1) / 2;
    power /= 2;
    if (at > size) at -= size;
  }
  return power;
}
