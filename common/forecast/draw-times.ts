import type { Span } from '../time/span';
import { Chance, type Problem, type Replay } from '../planning';
import { normalQuantile } from './normal';
import { pertQuantiles } from './pert-quantile';
import { mixName, shareOfRank, stratifiedRanks } from './stratified';
import type { ThreePoint } from './three-point';
import type { StageUncertainty, Uncertainty } from './uncertainty';

/** One quantity of a stage over all draws. */
interface Drawn {
  /** The stratum of each draw; all 0 where it is certain. */
  readonly ranks: Int32Array;
  /** Its value in each draw, in minutes. */
  readonly minutes: Float64Array;
  readonly likely: number;
}

/** What is drawn of one stage; null for what it has not, or no longer ahead of it. */
interface StageDraws {
  readonly index: number;
  readonly plannedEffort: number;
  readonly plannedAge: number;
  readonly plannedEarliest: number;
  readonly effort: Drawn | null;
  readonly dwell: Drawn | null;
  readonly delay: Drawn | null;
}

/** Writes the times of one draw after another into a replay. */
export class TimeDrawer {
  private readonly stages: readonly StageDraws[];
  private readonly byIndex: ReadonlyMap<number, StageDraws>;
  private readonly overrun: Int32Array;
  private readonly curing: Int32Array;
  private readonly certain: Int32Array;

  constructor(
    private readonly problem: Problem,
    private readonly uncertainty: Uncertainty,
    private readonly replay: Replay,
    private readonly draws: number,
    private readonly seed: number,
  ) {
    const indexOf = new Map(replay.stageIds.map((id, index) => [id, index]));
    const finished = new Set(
      problem.stages.filter((stage) => stage.progress.kind === 'finished').map((stage) => stage.id),
    );
    this.certain = new Int32Array(draws);
    this.stages = uncertainty.stages.flatMap((known) => {
      const index = indexOf.get(known.stageId);
      return index === undefined ? [] : [this.drawStage(known, index, finished.has(known.stageId))];
    });
    this.byIndex = new Map(this.stages.map((stage) => [stage.index, stage]));
    this.overrun = stratifiedRanks(seed, 'overrun', draws);
    this.curing = stratifiedRanks(seed, 'curing', draws);
  }

  /** The strata of a stage's effort and dwell, for rank correlations; null where nothing is drawn for it. */
  ranksOf(stage: number): { readonly effort: Int32Array; readonly dwell: Int32Array } | null {
    const drawn = this.byIndex.get(stage);
    if (!drawn) return null;
    return { effort: drawn.effort?.ranks ?? this.certain, dwell: drawn.dwell?.ranks ?? this.certain };
  }

  /** Writes draw number `draw`, from 0. */
  write(draw: number): void {
    const overrun = this.factor(this.uncertainty.overrun, this.overrun[draw]);
    const curing = this.factor(this.uncertainty.curing, this.curing[draw]);
    for (const stage of this.stages) this.writeStage(stage, draw, overrun, curing);
    this.writeAbsences(draw);
  }

  private drawStage(known: StageUncertainty, index: number, isFinished: boolean): StageDraws {
    const { replay } = this;
    const { stageId, effortMinutes, dwellMinutes, delayMinutes } = known;
    const { stretchSdLog = 0 } = this.uncertainty.overrun;
    const plannedEffort = isFinished ? 0 : replay.effortMinutes[index];
    const plannedAge = replay.dwellAge[index];
    const hasEffort = plannedEffort > 0 && effortMinutes.likely > 0;
    const hasDwell = plannedAge > 0 && dwellMinutes !== null && dwellMinutes.likely > 0;
    return {
      index,
      plannedEffort,
      plannedAge,
      plannedEarliest: replay.earliest[index],
      effort: hasEffort ? this.drawQuantity(`effort ${stageId}`, effortMinutes, stretchSdLog) : null,
      dwell: hasDwell ? this.drawQuantity(`dwell ${stageId}`, dwellMinutes) : null,
      delay: delayMinutes.high > 0 ? this.drawQuantity(`delay ${stageId}`, delayMinutes) : null,
    };
  }

  private drawQuantity(name: string, estimate: ThreePoint, stretchSdLog = 0): Drawn {
    const { draws } = this;
    const minutes = new Float64Array(draws).fill(estimate.likely);
    const { likely } = estimate;
    if (estimate.high <= estimate.low) return { ranks: this.certain, minutes, likely };
    const ranks = stratifiedRanks(this.seed, name, draws);
    const quantile = pertQuantiles(estimate);
    for (let draw = 0; draw < draws; draw += 1) {
      const share = shareOfRank(ranks[draw], draws);
      minutes[draw] = quantile(share) * (stretchSdLog === 0 ? 1 : Math.exp(stretchSdLog * normalQuantile(share)));
    }
    return { ranks, minutes, likely };
  }

  private writeStage(stage: StageDraws, draw: number, overrun: number, curing: number): void {
    const { index, effort, dwell, delay } = stage;
    if (effort) {
      // A stage begun has only a part left: the same share of what was drawn as of what was planned.
      const left = (effort.minutes[draw] * overrun * stage.plannedEffort) / effort.likely;
      this.replay.effortMinutes[index] = Math.max(1, Math.round(left));
    }
    if (dwell) {
      this.replay.dwellAge[index] = Math.round((stage.plannedAge * dwell.minutes[draw] * curing) / dwell.likely);
    }
    if (delay) this.replay.earliest[index] = stage.plannedEarliest + Math.round(delay.minutes[draw]);
  }

  private factor({ meanLog, sdLog }: Uncertainty['overrun'], rank: number): number {
    if (meanLog === 0 && sdLog === 0) return 1;
    return Math.exp(meanLog + sdLog * normalQuantile(shareOfRank(rank, this.draws)));
  }

  /** Whole days away, met by stepping from one to the next with geometric gaps. */
  private writeAbsences(draw: number): void {
    const { days } = this.problem;
    for (const { makerId, perDay } of this.uncertainty.absence) {
      const maker = this.replay.makerIds.indexOf(makerId);
      if (maker < 0 || perDay <= 0) continue;
      const chance = new Chance(mixName(this.seed, `absence ${makerId} ${draw}`));
      const away: Span[] = [];
      const step = (): number =>
        perDay >= 1 ? 1 : 1 + Math.floor(Math.log(1 - chance.share()) / Math.log(1 - perDay));
      for (let day = step() - 1; day < days.length; day += step()) away.push(days[day]);
      this.replay.setAbsence(maker, away);
    }
  }
}
