import { PLAIN_LINK } from '@common/domain/stage-draft';
import { Piece, type Link, type Stage } from '@database/entities';
import { draftRow } from '@database/draft-row';
import type { StoredPiece } from './import-repository';
import type { PlannedStage, StageRef } from './read-stages';

/** The rows that an import comes to. */
export interface ImportRows {
  readonly pieces: readonly Piece[];
  readonly stages: readonly Partial<Stage>[];
  readonly parts: ReadonlyMap<string, PartRows>;
  readonly links: readonly Partial<Link>[];
  /** Pieces that were there and in which a link is now said. */
  readonly linkedOldPieceIds: readonly string[];
}

interface PartRows {
  readonly crew: PlannedStage['draft']['crew'];
  readonly places: readonly {
    readonly bayIds: readonly string[];
    readonly units: number;
    readonly hold: 'work' | 'dwell' | 'until-stage';
    readonly untilStageId: string | null;
  }[];
}

/** Lays planned stages out in rows: new pieces and stages go after those that are there. `newId` makes an id. */
export function importRows(
  productionId: string,
  stages: readonly PlannedStage[],
  stored: readonly StoredPiece[],
  newId: () => string,
): ImportRows {
  const ids = stages.map(newId);
  const idOf = (ref: StageRef): string => (ref.kind === 'new' ? ids[ref.index] : ref.id);
  const slots = pieceSlots(productionId, stages, stored, newId);
  const pieceOf = stages.map((stage) => slotOf(slots, stage).id);
  const rows = stages.map((stage, index) => {
    const slot = slotOf(slots, stage);
    const position = slot.nextPosition;
    slot.nextPosition += 1;
    return { ...draftRow({ ...stage.draft, places: [] }), id: ids[index], pieceId: slot.id, position };
  });
  const links = stages.flatMap(({ waitsFor }, index) =>
    waitsFor.map((ref) => ({ ...PLAIN_LINK, id: newId(), fromStageId: idOf(ref), toStageId: ids[index] })),
  );
  const oldStages = new Map(stored.flatMap((piece) => piece.stages.map((stage) => [stage.id, piece.id] as const)));
  const linkedOld = stages.flatMap(({ waitsFor, existingPieceId }, index) => {
    const within = waitsFor.some(
      (ref) => (ref.kind === 'new' ? pieceOf[ref.index] : oldStages.get(ref.id)) === pieceOf[index],
    );
    return within && existingPieceId !== null ? [existingPieceId] : [];
  });
  return {
    pieces: [...slots.values()].flatMap((slot) => slot.piece ?? []),
    stages: rows,
    parts: new Map(stages.map((stage, index) => [ids[index], partRows(stage, idOf)])),
    links,
    linkedOldPieceIds: [...new Set(linkedOld)],
  };
}

interface PieceSlot {
  readonly id: string;
  /** Null where the piece is there already. */
  readonly piece: Piece | null;
  nextPosition: number;
}

function slotOf(slots: ReadonlyMap<string, PieceSlot>, stage: PlannedStage): PieceSlot {
  const slot = slots.get(stage.existingPieceId ?? stage.pieceName.toLowerCase());
  if (!slot) throw new Error(`The piece of line ${stage.line} was not laid out.`);
  return slot;
}

/** Old pieces by their ids and new ones by their names in lower case; no id is a name. */
function pieceSlots(
  productionId: string,
  stages: readonly PlannedStage[],
  stored: readonly StoredPiece[],
  newId: () => string,
): ReadonlyMap<string, PieceSlot> {
  const slots = new Map<string, PieceSlot>(
    stored.map(({ id, stages: old }) => [
      id,
      { id, piece: null, nextPosition: 1 + old.reduce((last, stage) => Math.max(last, stage.position), -1) },
    ]),
  );
  let position = 1 + stored.reduce((last, piece) => Math.max(last, piece.position), -1);
  for (const { existingPieceId, pieceName } of stages) {
    const key = pieceName.toLowerCase();
    if (existingPieceId !== null || slots.has(key)) continue;
    const piece = Object.assign(new Piece(), {
      id: newId(),
      productionId,
      name: pieceName,
      note: '',
      position,
      recipeId: null,
      version: 1,
      removedAt: null,
    });
    position += 1;
    slots.set(key, { id: piece.id, piece, nextPosition: 0 });
  }
  return slots;
}

function partRows({ draft, places, heldUntil }: PlannedStage, idOf: (ref: StageRef) => string): PartRows {
  return {
    crew: draft.crew,
    places: places.map(({ bayIds, units, hold }, index) => {
      const until = heldUntil[index];
      return { bayIds, units, hold, untilStageId: until === null ? null : idOf(until) };
    }),
  };
}
