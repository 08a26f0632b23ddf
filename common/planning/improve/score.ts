import type { Compiled } from '../construct/compiled';
import { FINISHED, SOFT_WINDOW, FINISH_START } from '../construct/compiled';
import type { Generator } from '../construct/generator';
import type { Layout } from '../construct/layout';

export const BROKEN = 0;
export const HARD_LATENESS = 1;
export const WISHED_LATENESS = 2;
export const COST = 3;
export const FINISH_SUM = 4;
export const SCORE_PARTS = 5;

/**
 * What a search compares schedules by: the parts of the objective that come before evenness, changes weighed into the cost, and
 * then early finishes, which leave the most room for evenness to be sought afterwards. Same integers as `objective/`, but read off
 * a layout without making a plan.
 */
export type Score = Float64Array;

/** Negative where `a` is better, 0 where they are equal. */
export function compareScores(a: Score, b: Score): number {
  for (let part = 0; part < SCORE_PARTS; part += 1) if (a[part] !== b[part]) return a[part] - b[part];
  return 0;
}

/** Reads scores off layouts of one problem. */
export class Scorer {
  private readonly issuedStart: Float64Array;
  private readonly issuedCrew: (string | null)[];
  private readonly productionFinish: Float64Array;

  constructor(private readonly compiled: Compiled) {
    const { stageCount, problem } = compiled;
    this.issuedStart = new Float64Array(stageCount).fill(NaN);
    this.issuedCrew = new Array<string | null>(stageCount).fill(null);
    this.productionFinish = new Float64Array(compiled.dates.productionCount);
    for (const placement of problem.issued?.placements ?? []) {
      const stage = compiled.stageIndex.get(placement.stageId);
      if (stage === undefined || compiled.stages[stage].progress.kind !== 'to-do') continue;
      this.issuedStart[stage] = (placement.work[0]?.start ?? NaN) - compiled.origin;
      this.issuedCrew[stage] = crewKey(placement.crew.map((member) => compiled.makerIds.indexOf(member.makerId)));
    }
  }

  /** Fills `out` with the score of what a generator has laid out. */
  score(generator: Generator, out: Score): void {
    const { layout } = generator;
    out[BROKEN] = generator.broken;
    out[HARD_LATENESS] = this.lateness(layout, 1);
    out[WISHED_LATENESS] = this.lateness(layout, 0);
    out[COST] = this.cost(layout) + this.changes(layout) * this.compiled.problem.weights.changePenaltyMinor;
    out[FINISH_SUM] = this.finishSum(layout);
  }

  private lateness(layout: Layout, isHard: number): number {
    const { dates, horizonMinutes } = this.compiled;
    let sum = 0;
    for (let date = 0; date < dates.count; date += 1) {
      if (dates.isHard[date] !== isHard) continue;
      let late = 0;
      for (const stage of dates.stages[date]) {
        const finish = layout.isPlaced[stage] === 1 ? layout.finish[stage] : horizonMinutes;
        if (finish - dates.at[date] > late) late = finish - dates.at[date];
      }
      sum += late * dates.weight[date];
    }
    return sum;
  }

  private cost(layout: Layout): number {
    const { makers, work, stageCount } = this.compiled;
    let minorTimesSixty = 0;
    for (let stage = 0; stage < stageCount; stage += 1) {
      const crew = layout.crew[stage];
      if (layout.isPlaced[stage] === 0 || !crew || work.fixity[stage] === FINISHED) continue;
      for (const maker of crew.makers) {
        if (makers.hourCost[maker] === 0 && makers.hasOvertime[maker] === 0) continue;
        for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1) {
          minorTimesSixty += this.wage(maker, layout.spanPool[k], layout.spanPool[k + 1]);
        }
      }
    }
    return Math.ceil(minorTimesSixty / 60) + this.missedWindows(layout);
  }

  private wage(maker: number, start: number, end: number): number {
    const { makers } = this.compiled;
    const calendar = makers.ordinary[maker];
    let ordinary = 0;
    for (let i = calendar.indexAt(start); i < calendar.count && calendar.starts[i] < end; i += 1) {
      ordinary += Math.min(end, calendar.ends[i]) - Math.max(start, calendar.starts[i]);
    }
    return ordinary * makers.hourCost[maker] + (end - start - ordinary) * makers.overtimeCost[maker];
  }

  private missedWindows(layout: Layout): number {
    const { links, work } = this.compiled;
    let cost = 0;
    for (let link = 0; link < links.count; link += 1) {
      const from = links.from[link];
      if (work.windowKind[from] !== SOFT_WINDOW || links.kind[link] !== FINISH_START || links.afterWork[link] === 1)
        continue;
      const to = links.to[link];
      if (layout.isPlaced[from] === 0 || layout.isPlaced[to] === 0) continue;
      if (layout.start[to] > layout.windowEnd(from)) cost += work.windowCost[from];
    }
    return cost;
  }

  private changes(layout: Layout): number {
    if (!this.compiled.problem.issued) return 0;
    let changes = 0;
    for (let stage = 0; stage < this.compiled.stageCount; stage += 1) {
      const issued = this.issuedCrew[stage];
      if (issued === null) continue;
      const same =
        layout.isPlaced[stage] === 1 &&
        layout.start[stage] === this.issuedStart[stage] &&
        crewKey([...(layout.crew[stage]?.makers ?? [])]) === issued;
      if (!same) changes += 1;
    }
    return changes;
  }

  private finishSum(layout: Layout): number {
    const { dates, stageCount, horizonMinutes } = this.compiled;
    const finish = this.productionFinish.fill(0);
    for (let stage = 0; stage < stageCount; stage += 1) {
      const end = layout.isPlaced[stage] === 1 ? layout.finish[stage] : horizonMinutes;
      const production = dates.productionOf[stage];
      if (end > finish[production]) finish[production] = end;
    }
    let sum = 0;
    for (const end of finish) sum += end;
    return sum;
  }
}

function crewKey(makers: number[]): string {
  return makers.sort((a, b) => a - b).join(' ');
}
