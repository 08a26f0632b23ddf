import type {
  ClientView,
  KeyDateView,
  PieceView,
  ProductionSummary,
  ProductionView,
  PurchaseView,
  StageLink,
  StageView,
} from '@common/contract';
import type { Client, KeyDate, Link, Piece, Production, Purchase, Stage } from '@database/entities';
import { isOffice, type Actor } from '../session';
import { draftOf } from '../storage/drafts';

export function clientView({ id, name, version }: Client): ClientView {
  return { id, name, version };
}

export function keyDateView(keyDate: KeyDate): KeyDateView {
  return {
    id: keyDate.id,
    productionId: keyDate.productionId,
    kind: keyDate.kind,
    at: keyDate.at.toISOString(),
    strength: keyDate.strength,
    weight: keyDate.weight,
    pieceIds: keyDate.pieces.map((piece) => piece.pieceId).sort(),
    version: keyDate.version,
  };
}

export function pieceView({ id, productionId, name, position, recipeId, note, version }: Piece): PieceView {
  return { id, productionId, name, position, recipeId, note, version };
}

/** A stage with its crew and places; its piece has to be loaded. */
export function stageView(stage: Stage): StageView {
  return {
    ...draftOf(stage),
    crew: inOrder(stage.crew).map(({ craftId, least, most }) => ({ craftId, least, most })),
    places: inOrder(stage.places).map(({ bays, units, hold, untilStageId }) => ({
      bayIds: inOrder(bays).map((bay) => bay.bayId),
      units,
      hold,
      untilStageId,
    })),
    id: stage.id,
    pieceId: stage.pieceId,
    productionId: stage.piece.productionId,
    position: stage.position,
    nth: stage.nth,
    of: stage.repeats,
    state: stage.state,
    startedAt: stage.startedAt?.toISOString() ?? null,
    finishedAt: stage.finishedAt?.toISOString() ?? null,
    spentMinutes: stage.spentMinutes,
    remainingMinutes: stage.remainingMinutes,
    version: stage.version,
  };
}

/** A stage as `viewer` may see it: a client learns how far it is, not what it takes or what the workshop notes of it. */
export function stageViewFor(viewer: Actor, stage: Stage): StageView {
  const view = stageView(stage);
  if (viewer.role !== 'client') return view;
  const nothing = { lowMinutes: 0, likelyMinutes: 0, highMinutes: 0 };
  return {
    ...view,
    handsOn: nothing,
    crew: [],
    places: [],
    note: '',
    cautions: [],
    spentMinutes: 0,
    remainingMinutes: null,
  };
}

export function linkView(link: Link): StageLink {
  const { id, fromStageId, toStageId, kind, after, minGapMinutes, maxGapMinutes, time } = link;
  return { id, fromStageId, toStageId, kind, after, minGapMinutes, maxGapMinutes, time };
}

export function purchaseView(purchase: Purchase): PurchaseView {
  const { id, productionId, stageId, name, supplier, leadDays, orderedOn, dueOn, receivedOn, costMinor, version } =
    purchase;
  return { id, productionId, stageId, name, supplier, leadDays, orderedOn, dueOn, receivedOn, costMinor, version };
}

/** A purchase as `viewer` may see it: what it costs is the office's business. */
export function purchaseViewFor(viewer: Actor, purchase: Purchase): PurchaseView {
  const view = purchaseView(purchase);
  if (isOffice(viewer)) return view;
  const { costMinor: _costMinor, ...open } = view;
  return open;
}

/** A production with the numbers that lists show; client, key dates, pieces and stages have to be loaded. */
export function productionSummary(production: Production): ProductionSummary {
  const stages = production.pieces.flatMap((piece) => piece.stages);
  return {
    id: production.id,
    name: production.name,
    clientId: production.clientId,
    clientName: production.client.name,
    mark: production.mark,
    hue: production.hue,
    state: production.state,
    keyDates: production.keyDates.map(keyDateView).sort((a, b) => a.at.localeCompare(b.at) || a.id.localeCompare(b.id)),
    pieces: production.pieces.length,
    stages: stages.length,
    finishedStages: stages.filter((stage) => stage.state === 'finished').length,
    handsOnMinutes: stages.reduce((sum, stage) => sum + stage.likelyMinutes, 0),
    version: production.version,
  };
}

/** What a whole production is made of. */
export interface WholeProduction {
  readonly production: Production;
  readonly stages: readonly Stage[];
  readonly links: readonly Link[];
  readonly purchases: readonly Purchase[];
}

/** A production whole, as `viewer` may see it. */
export function productionView(
  viewer: Actor,
  { production, stages, links, purchases }: WholeProduction,
): ProductionView {
  const pieces = inOrder(production.pieces);
  const placeOf = new Map(pieces.map((piece, i) => [piece.id, i]));
  const inPieceOrder = [...stages].sort(
    (a, b) => (placeOf.get(a.pieceId) ?? 0) - (placeOf.get(b.pieceId) ?? 0) || a.position - b.position,
  );
  return {
    ...productionSummary(production),
    note: production.note,
    piecesInOrder: pieces.map(pieceView),
    stagesInOrder: inPieceOrder.map(stageView),
    links: links.map(linkView),
    purchases: purchases.map((purchase) => purchaseViewFor(viewer, purchase)),
  };
}

function inOrder<T extends { readonly position: number }>(rows: readonly T[]): T[] {
  return [...rows].sort((a, b) => a.position - b.position);
}
