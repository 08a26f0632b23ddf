import type { SnapshotLink, SnapshotStage } from './studio-snapshot';
import { PLAIN_LINK } from '../domain/stage-draft';
import type { Link } from '../planning/problem/link';

/**
 * The links between stages that are in the plan, and the plain sequence of a piece whose stages have no link among
 * themselves: who only lists stages means one after another.
 */
export function buildLinks(stages: readonly SnapshotStage[], links: readonly SnapshotLink[]): readonly Link[] {
  const pieceOf = new Map(stages.map((stage) => [stage.id, stage.pieceId]));
  const given = links.filter((link) => pieceOf.has(link.fromStageId) && pieceOf.has(link.toStageId));
  const linkedPieces = new Set(
    given
      .filter((link) => pieceOf.get(link.fromStageId) === pieceOf.get(link.toStageId))
      .map((link) => pieceOf.get(link.fromStageId)),
  );
  const unlinked = stages.filter((stage) => !linkedPieces.has(stage.pieceId));
  return [...given.map(linkOf), ...sequences(unlinked)];
}

function linkOf(link: SnapshotLink): Link {
  const { fromStageId, toStageId, kind, after, minGapMinutes, maxGapMinutes, time } = link;
  return { fromStageId, toStageId, kind, after, minGapMinutes, maxGapMinutes, time };
}

function sequences(stages: readonly SnapshotStage[]): readonly Link[] {
  const pieces = new Map<string, SnapshotStage[]>();
  for (const stage of stages) {
    pieces.set(stage.pieceId, [...(pieces.get(stage.pieceId) ?? []), stage]);
  }
  return [...pieces.values()].flatMap((own) => {
    const inOrder = own.toSorted((a, b) => a.position - b.position);
    return inOrder.slice(1).map((stage, i) => ({ fromStageId: inOrder[i].id, toStageId: stage.id, ...PLAIN_LINK }));
  });
}
