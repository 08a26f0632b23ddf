import { type Compiled, type Crew, MOVABLE, SOFT_WINDOW } from '../construct/compiled';
import { type Estimate } from '../construct/estimate';
import { copyGenome, type Genome, genomeOf } from '../construct/genome';
import { Generator } from '../construct/generator';
import type { Layout } from '../construct/layout';
import { orderBy, PRIORITY_RULES } from '../construct/priority-rules';
import type { Budget } from '../stop/budget';
import { Chance } from './chance';
import { findCostly } from './find-costly';
import { findLate } from './find-late';
import { changeCrew } from './operators/change-crew';
import { favourProduction } from './operators/favour-production';
import type { Operator } from './operators/operator';
import { pullLateStage } from './operators/pull-late-stage';
import { shuffleWindow } from './operators/shuffle-window';
import { swapNeighbours } from './operators/swap-neighbours';
import { toggleOvertime } from './operators/toggle-overtime';
import { lateChain } from './parts/late-chain';
import { otherCrew } from './parts/other-crew';
import type { PartChoice } from './parts/part';
import { timeWindow } from './parts/time-window';
import { yieldingProduction } from './parts/yielding-production';
import { ProductionLeads } from './production-leads';
import { compareScores, HARD_LATENESS, type Score, SCORE_PARTS, Scorer, WISHED_LATENESS } from './score';

/** How many trials back a new one is compared with. */
const HISTORY = 40;
/** After so many trials without a better best, the search goes back to the best. */
const PATIENCE = 1500;
/** Of so many stages one whole schedule in two is laid out anew; the more stages, the more parts are tried instead. */
const STAGES_FOR_WHOLES = 30;

/** Changed sequences of productions without a gain, for each production, before parts of the plan are looked at. */
const IDLE_SEQUENCES = 2;

const OPERATORS: readonly Operator[] = [
  pullLateStage,
  pullLateStage,
  pullLateStage,
  favourProduction,
  shuffleWindow,
  swapNeighbours,
  changeCrew,
  changeCrew,
  toggleOvertime,
];

const PARTS: readonly PartChoice[] = [lateChain, lateChain, timeWindow, otherCrew, yieldingProduction];

/**
 * A search over plans of a studio; keeps the best that it has met. A trial lays a whole schedule out by a changed genome, or only
 * a part of the plan beside the rest of it, which in a large studio costs a small share of a schedule.
 */
export class StudioSearch {
  readonly bestScore: Score = new Float64Array(SCORE_PARTS).fill(Infinity);
  /** Lays out what is tried; a trial that is taken changes places with the current one. */
  private trial: Generator;
  private current: Generator;
  private readonly best: Generator;
  private readonly scorer: Scorer;
  private readonly score: Score = new Float64Array(SCORE_PARTS);
  private readonly chance: Chance;
  private readonly bestGenome: Genome;
  private genome: Genome;
  private readonly currentScore: Score = new Float64Array(SCORE_PARTS).fill(Infinity);
  private late: readonly number[] = [];
  private amiss: ArrayLike<number> = [];
  private readonly able: readonly Int32Array[];
  /** Stages laid out by trials since a whole schedule was last spent. */
  private laid = 0;

  constructor(
    private readonly compiled: Compiled,
    private readonly estimate: Estimate,
    private readonly budget: Budget,
    seed: number,
    private readonly onBetter: () => void,
  ) {
    this.trial = new Generator(compiled);
    this.current = new Generator(compiled);
    this.best = new Generator(compiled);
    this.scorer = new Scorer(compiled);
    this.chance = new Chance(seed);
    this.bestGenome = genomeOf(this.movableOrder(estimate.latestStart));
    this.genome = copyGenome(this.bestGenome);
    this.able = ableMakers(compiled);
  }

  /** Lays out one schedule for each priority rule, and for the issued order where there is one. */
  construct(): void {
    const orders = Object.values(PRIORITY_RULES).map((rule) => this.movableOrder(rule(this.compiled, this.estimate)));
    const issued = this.issuedKeys();
    if (issued) orders.unshift(this.movableOrder(issued));
    orders.forEach((order, i) => {
      if (i > 0 && this.budget.isSpent()) return;
      this.tryWhole(genomeOf(order), this.currentScore);
    });
  }

  /** Seeks a sequence of whole productions while dates are late, until many changes in a row have gained nothing. */
  private sequenceProductions(): void {
    const { productionCount } = this.compiled.dates;
    if (productionCount < 2 || this.genome.order.length === 0) return;
    const sequence = new ProductionLeads(this.compiled, this.estimate);
    let best = sequence.none();
    const tryLeads = (leads: Float64Array): boolean => {
      const before = this.bestScore[HARD_LATENESS] + this.bestScore[WISHED_LATENESS];
      if (!this.tryWhole(genomeOf(this.movableOrder(sequence.keys(leads))), this.bestScore)) return false;
      best = leads;
      return this.bestScore[HARD_LATENESS] + this.bestScore[WISHED_LATENESS] < before;
    };
    for (const leads of sequence.byWeight()) if (this.late.length > 0 && !this.budget.isSpent()) tryLeads(leads);
    const patience = IDLE_SEQUENCES * productionCount;
    for (let idle = 0; idle < patience && this.late.length > 0 && !this.budget.isSpent();)
      idle = tryLeads(sequence.change(best, this.chance)) ? 0 : idle + 1;
  }

  /** Lays out a whole schedule; true for a new best. */
  private tryWhole(genome: Genome, yardstick: Score): boolean {
    this.trial.decode(genome);
    if (this.trial.isGivenUp) return false;
    this.budget.spend();
    // One schedule is owed whatever happens; any further one may be given up.
    for (const generator of [this.trial, this.current]) generator.shouldGiveUp = () => this.budget.isStopped();
    return this.judge(genome, yardstick);
  }

  /**
   * Improves by small changes, each accepted where it is no worse than the current plan or than the one some steps ago: late
   * acceptance hill climbing (Burke & Bykov 2017), which needs no temperatures and takes a lexicographic objective as it is.
   */
  improve(): void {
    if (this.genome.order.length === 0) return;
    this.sequenceProductions();
    const history: Score[] = Array.from({ length: HISTORY }, () => this.currentScore.slice());
    let sinceBetter = 0;
    for (let step = 0; !this.budget.isSpent(); step += 1) {
      const slot = step % HISTORY;
      const candidate = copyGenome(this.genome);
      const isBest = this.change(candidate) && this.judge(candidate, history[slot]);
      history[slot].set(this.currentScore);
      sinceBetter = isBest ? 0 : sinceBetter + 1;
      if (sinceBetter < PATIENCE) continue;
      sinceBetter = 0;
      this.trial.copyFrom(this.best);
      this.score.set(this.bestScore);
      this.take(copyGenome(this.bestGenome));
      history.forEach((score) => score.set(this.currentScore));
    }
  }

  /** The best schedule, laid out. */
  get bestLayout(): Layout {
    return this.best.layout;
  }

  /** Lays a changed plan out as the trial; false where there is nothing to judge. */
  private change(genome: Genome): boolean {
    const { trial, chance, compiled, current } = this;
    const before = trial.laid;
    const { order } = this.genome;
    const isWhole = chance.share() * order.length < STAGES_FOR_WHOLES;
    if (isWhole) {
      const scene = { compiled, chance, start: current.layout.start, late: this.late };
      OPERATORS[chance.below(OPERATORS.length)](genome, scene);
      trial.decode(genome);
    } else {
      const scene = { compiled, chance, layout: current.layout, order, amiss: this.amiss, able: this.able };
      const part = PARTS[chance.below(PARTS.length)](genome, scene);
      if (part.length > 0) {
        addPayers(compiled, part);
        putFirst(genome.order, part);
        trial.copyFrom(current);
        trial.relay(part, genome);
      } else trial.isGivenUp = true;
    }
    // Parts are paid for by the stages that they lay out, and no trial is free.
    this.laid += Math.max(1, trial.laid - before);
    for (; this.laid >= order.length; this.laid -= order.length) this.budget.spend();
    return !trial.isGivenUp;
  }

  /** Takes the trial where it is no worse than the current plan or a yardstick; true for a new best. */
  private judge(genome: Genome, yardstick: Score): boolean {
    this.scorer.score(this.trial, this.score);
    const isBest = compareScores(this.score, this.bestScore) < 0;
    const isNoWorse = compareScores(this.score, this.currentScore) <= 0 || compareScores(this.score, yardstick) <= 0;
    if (isNoWorse || isBest) this.take(genome);
    if (!isBest) return false;
    this.bestScore.set(this.score);
    this.best.copyFrom(this.current);
    this.bestGenome.order.set(genome.order);
    this.bestGenome.crewChoice.set(genome.crewChoice);
    this.bestGenome.overtime.set(genome.overtime);
    this.onBetter();
    return true;
  }

  /** Makes the trial the current plan, its order that of the starts it led to, so that a small change stays small. */
  private take(genome: Genome): void {
    [this.trial, this.current] = [this.current, this.trial];
    const { layout } = this.current;
    const { compiled } = this;
    this.currentScore.set(this.score);
    sortByStart(genome.order, layout, compiled.horizonMinutes);
    this.genome = genome;
    this.late = findLate(compiled, layout);
    const costly = this.late.length > 0 ? [] : findCostly(compiled, layout);
    this.amiss = this.late.length > 0 ? this.late : costly.length > 0 ? costly : genome.order;
  }

  private movableOrder(keys: Float64Array): Int32Array {
    return orderBy(keys, this.estimate.topological).filter((stage) => this.compiled.work.fixity[stage] === 0);
  }

  private issuedKeys(): Float64Array | null {
    const { issued } = this.compiled.problem;
    if (!issued) return null;
    const keys = this.estimate.latestStart.slice();
    for (const placement of issued.placements) {
      const stage = this.compiled.stageIndex.get(placement.stageId);
      if (stage !== undefined && placement.work.length > 0)
        keys[stage] = placement.work[0].start - this.compiled.origin;
    }
    return keys;
  }
}

/** For each stage the makers of all its crews, each once. */
function ableMakers(compiled: Compiled): Int32Array[] {
  const known = new Map<readonly Crew[], Int32Array>();
  return compiled.work.crews.map((crews) => {
    const found = known.get(crews) ?? Int32Array.from(new Set(crews.flatMap((crew) => [...crew.makers])));
    known.set(crews, found);
    return found;
  });
}

/** Adds to a part whoever would pay for missing a soft window of one of its stages: what it owes may change. */
function addPayers({ links, work }: Compiled, part: number[]): void {
  const isIn = new Set(part);
  for (const stage of [...part]) {
    if (work.windowKind[stage] !== SOFT_WINDOW) continue;
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const to = links.to[links.outLinks[k]];
      if (isIn.has(to) || work.fixity[to] !== MOVABLE) continue;
      isIn.add(to);
      part.push(to);
    }
  }
}

/** Moves some stages to the front of an order, in their own order; the others keep theirs. */
function putFirst(order: Int32Array, stages: readonly number[]): void {
  const isFirst = new Set(stages);
  let write = order.length;
  for (let read = order.length - 1; read >= 0; read -= 1) {
    if (isFirst.has(order[read])) continue;
    write -= 1;
    order[write] = order[read];
  }
  order.set(stages);
}

/** Sorts an order by starts, stages without a place last; ties stay as they are. Quick where little is out of order. */
function sortByStart(order: Int32Array, layout: Layout, last: number): void {
  const start = (stage: number): number => (layout.isPlaced[stage] === 1 ? layout.start[stage] : last);
  for (let p = 1; p < order.length; p += 1) {
    const stage = order[p];
    const at = start(stage);
    let q = p - 1;
    for (; q >= 0 && start(order[q]) > at; q -= 1) order[q + 1] = order[q];
    order[q + 1] = stage;
  }
}
