import type { Compiled } from '../construct/compiled';
import { type Estimate } from '../construct/estimate';
import { copyGenome, type Genome, genomeOf } from '../construct/genome';
import { Generator } from '../construct/generator';
import type { Layout } from '../construct/layout';
import { orderBy, PRIORITY_RULES } from '../construct/priority-rules';
import type { Budget } from '../stop/budget';
import { Chance } from './chance';
import { findLate } from './find-late';
import { changeCrew } from './operators/change-crew';
import { favourProduction } from './operators/favour-production';
import type { Operator } from './operators/operator';
import { pullLateStage } from './operators/pull-late-stage';
import { shuffleWindow } from './operators/shuffle-window';
import { swapNeighbours } from './operators/swap-neighbours';
import { toggleOvertime } from './operators/toggle-overtime';
import { compareScores, type Score, SCORE_PARTS, Scorer } from './score';

/** How many schedules back a new one is compared with. */
const HISTORY = 40;
/** After so many schedules without a better best, the search goes back to the best. */
const PATIENCE = 1500;

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

/** A search over genomes of a studio; keeps the best that it has met. */
export class StudioSearch {
  readonly best: Genome;
  /** Lays out what is tried; once something is the best it changes places with the other, which then keeps it. */
  private generator: Generator;
  private keeper: Generator;
  readonly bestScore: Score = new Float64Array(SCORE_PARTS).fill(Infinity);
  private readonly scorer: Scorer;
  private readonly score: Score = new Float64Array(SCORE_PARTS);
  private readonly chance: Chance;
  private current: Genome;
  private currentScore: Score = new Float64Array(SCORE_PARTS).fill(Infinity);
  private readonly currentStart: Int32Array;
  private currentLate: number[] = [];

  constructor(
    private readonly compiled: Compiled,
    private readonly estimate: Estimate,
    private readonly budget: Budget,
    seed: number,
    private readonly onBetter: () => void,
  ) {
    this.generator = new Generator(compiled);
    this.keeper = new Generator(compiled);
    this.scorer = new Scorer(compiled);
    this.chance = new Chance(seed);
    this.currentStart = new Int32Array(compiled.stageCount);
    this.best = genomeOf(this.movableOrder(estimate.latestStart));
    this.current = copyGenome(this.best);
  }

  /** Decodes one genome for each priority rule, and the issued order where there is one. */
  construct(): void {
    const orders = PRIORITY_RULES.map((rule) => this.movableOrder(rule(this.compiled, this.estimate)));
    const issued = this.issuedKeys();
    if (issued) orders.unshift(this.movableOrder(issued));
    orders.forEach((order, i) => {
      if (i > 0 && this.budget.isSpent()) return;
      this.tryGenome(genomeOf(order), 'if-no-worse');
    });
  }

  /**
   * Improves by small changes, each accepted where it is no worse than the current schedule or than the one some steps ago: late
   * acceptance hill climbing (Burke & Bykov 2017), which needs no temperatures and takes a lexicographic objective as it is.
   */
  improve(): void {
    if (this.best.order.length === 0) return;
    const history: Score[] = Array.from({ length: HISTORY }, () => this.currentScore.slice());
    let sinceBetter = 0;
    for (let step = 0; !this.budget.isSpent(); step += 1) {
      const candidate = copyGenome(this.current);
      const operator = OPERATORS[this.chance.below(OPERATORS.length)];
      operator(candidate, {
        compiled: this.compiled,
        chance: this.chance,
        start: this.currentStart,
        late: this.currentLate,
      });
      const slot = step % HISTORY;
      const isBest = this.tryGenome(candidate, 'if-no-worse', history[slot]);
      history[slot].set(this.currentScore);
      sinceBetter = isBest ? 0 : sinceBetter + 1;
      if (sinceBetter < PATIENCE) continue;
      sinceBetter = 0;
      this.tryGenome(copyGenome(this.best), 'always');
      history.forEach((score) => score.set(this.currentScore));
    }
  }

  /** The best schedule, laid out. */
  get bestLayout(): Layout {
    return this.keeper.layout;
  }

  /** Decodes; takes the genome as current always, or where it is no worse than the current or a yardstick; true for a new best. */
  private tryGenome(genome: Genome, take: 'always' | 'if-no-worse', yardstick: Score = this.currentScore): boolean {
    this.generator.decode(genome);
    if (this.generator.isGivenUp) return false;
    this.budget.spend();
    // One schedule is owed whatever happens; any further one may be given up.
    const giveUp = (): boolean => this.budget.isStopped();
    this.generator.shouldGiveUp = giveUp;
    this.keeper.shouldGiveUp = giveUp;
    this.scorer.score(this.generator, this.score);
    const isBest = compareScores(this.score, this.bestScore) < 0;
    const isNoWorse = compareScores(this.score, this.currentScore) <= 0 || compareScores(this.score, yardstick) <= 0;
    if (isBest) {
      this.bestScore.set(this.score);
      this.best.order.set(genome.order);
      this.best.crewChoice.set(genome.crewChoice);
      this.best.overtime.set(genome.overtime);
    }
    // Only now: taking a genome reorders it.
    if (take === 'always' || isNoWorse) this.take(genome);
    if (isBest) {
      [this.generator, this.keeper] = [this.keeper, this.generator];
      this.onBetter();
    }
    return isBest;
  }

  /** Makes a decoded genome the current one, its order that of the starts it led to, so that a small change stays small. */
  private take(genome: Genome): void {
    const { layout } = this.generator;
    this.currentScore.set(this.score);
    this.currentStart.set(layout.start);
    this.currentLate = findLate(this.compiled, layout);
    const rank = new Int32Array(this.compiled.stageCount);
    genome.order.forEach((stage, p) => (rank[stage] = p));
    const start = (stage: number): number =>
      layout.isPlaced[stage] === 1 ? layout.start[stage] : this.compiled.horizonMinutes;
    genome.order.sort((a, b) => start(a) - start(b) || rank[a] - rank[b]);
    this.current = genome;
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
