import type { Span } from '../time/span';
import { Chance, type Problem, type Replay } from '../planning';
import { normalQuantile } from './normal';
import { pertQuantile } from './pert-quantile';
import { mixName, shareOfRank, stratifiedRanks } from './stratified';
import type { StageUncertainty, Uncertainty } from './uncertainty';

/** The drawn quantities of one stage: the stratum of each draw. */
interface StageRanks {
  readonly index: number;
  readonly known: StageUncertainty;
  readonly plannedEffort: number;
  readonly plannedAge: number;
  readonly plannedEarliest: number;
  readonly effort: Int32Array;
  readonly dwell: Int32Array;
  readonly delay: Int32Array;
}

/** Writes the times of one draw after another into a replay. */
export class TimeDrawer {
  private readonly stages: readonly StageRanks[];
  private readonly overrun: Int32Array;
  private readonly curing: Int32Array;

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
    this.stages = uncertainty.stages.flatMap((known) => {
      const index = indexOf.get(known.stageId);
      if (index === undefined) return [];
      const ranks = (what: string): Int32Array => stratifiedRanks(seed, `${what} ${known.stageId}`, draws);
      return [
        {
          index,
          known,
          plannedEffort: finished.has(known.stageId) ? 0 : replay.effortMinutes[index],
          plannedAge: replay.dwellAge[index],
          plannedEarliest: replay.earliest[index],
          effort: ranks('effort'),
          dwell: ranks('dwell'),
          delay: ranks('delay'),
        },
      ];
    });
    this.overrun = stratifiedRanks(seed, 'overrun', draws);
    this.curing = stratifiedRanks(seed, 'curing', draws);
  }

  /** The strata of a stage's effort and dwell, for rank correlations; null where nothing is drawn for it. */
  ranksOf(stage: number): { readonly effort: Int32Array; readonly dwell: Int32Array } | null {
    return this.stages.find((one) => one.index === stage) ?? null;
  }

  /** Writes draw number `draw`, from 0. */
  write(draw: number): void {
    const overrun = this.factor(this.uncertainty.overrun, this.overrun[draw]);
    const curing = this.factor(this.uncertainty.curing, this.curing[draw]);
    for (const stage of this.stages) this.writeStage(stage, draw, overrun, curing);
    this.writeAbsences(draw);
  }

  private writeStage(stage: StageRanks, draw: number, overrun: number, curing: number): void {
    const { known, index } = stage;
    const { effortMinutes, dwellMinutes, delayMinutes } = known;
    if (stage.plannedEffort > 0 && effortMinutes.likely > 0) {
      const drawn = pertQuantile(effortMinutes, shareOfRank(stage.effort[draw], this.draws)) * overrun;
      // A stage begun has only a part left: the same share of what was drawn as of what was planned.
      this.replay.effortMinutes[index] = Math.max(1, Math.round((drawn * stage.plannedEffort) / effortMinutes.likely));
    }
    if (stage.plannedAge > 0 && dwellMinutes && dwellMinutes.likely > 0) {
      const drawn = pertQuantile(dwellMinutes, shareOfRank(stage.dwell[draw], this.draws)) * curing;
      this.replay.dwellAge[index] = Math.round((stage.plannedAge * drawn) / dwellMinutes.likely);
    }
    if (delayMinutes.high > 0) {
      const delay = pertQuantile(delayMinutes, shareOfRank(stage.delay[draw], this.draws));
      this.replay.earliest[index] = stage.plannedEarliest + Math.round(delay);
    }
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
