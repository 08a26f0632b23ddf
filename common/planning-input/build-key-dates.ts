import type { SnapshotKeyDate, SnapshotProduction, SnapshotStage } from './studio-snapshot';
import type { Link } from '../planning/problem/link';
import type { KeyDate } from '../planning/problem/problem';
import type { Minute } from '../time/span';

/** The stages in the plan, by what key dates ask of them. */
export interface PlannedStages {
  readonly stages: readonly SnapshotStage[];
  readonly productionOf: (pieceId: string) => string;
  readonly links: readonly Link[];
}

/**
 * Key dates with the stages that have to be ready by them: of their pieces, or of the whole production, those that no other
 * of them waits for. A date gone by whose stages are all finished has nothing left to ask.
 */
export function buildKeyDates(
  productions: readonly SnapshotProduction[],
  planned: PlannedStages,
  now: Minute,
): readonly KeyDate[] {
  return productions.flatMap((production) => {
    const own = planned.stages.filter((stage) => planned.productionOf(stage.pieceId) === production.id);
    return production.keyDates.flatMap((date) => {
      const asked = own.filter((stage) => date.pieceIds.length === 0 || date.pieceIds.includes(stage.pieceId));
      const over = date.at < now && asked.every((stage) => stage.state === 'finished');
      return over ? [] : [keyDateOf(production.id, date, lastStages(asked, planned.links))];
    });
  });
}

function keyDateOf(productionId: string, date: SnapshotKeyDate, stageIds: readonly string[]): KeyDate {
  return { id: date.id, productionId, at: date.at, strength: date.strength, weight: date.weight, stageIds };
}

/** Stages whose end, dwell included, no other of the same set is bound to outlast. */
function lastStages(stages: readonly SnapshotStage[], links: readonly Link[]): readonly string[] {
  const asked = new Map(stages.map((stage) => [stage.id, stage]));
  const outlasted = new Set<string>();
  for (const link of links) {
    const from = asked.get(link.fromStageId);
    const waitsForAll = link.after === 'dwell' || from?.dwell === null;
    const waitsForFinish = link.kind === 'finish-start' || link.kind === 'finish-finish';
    if (from && asked.has(link.toStageId) && waitsForAll && waitsForFinish && link.minGapMinutes >= 0) {
      outlasted.add(from.id);
    }
  }
  return stages.filter((stage) => !outlasted.has(stage.id)).map((stage) => stage.id);
}
