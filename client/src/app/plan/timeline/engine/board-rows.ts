import type { WorkingPlanView } from '@common/contract';
import type { Plan, Problem } from '@common/planning';
import type { Span } from '@common/time/span';
import { bayTape, heldBays, makerTape, pieceTape, type Tape } from './tape';

/** What the rows of the wall stand for. */
export const ROWS_BY = ['piece', 'maker', 'bay'] as const;
export type RowsBy = (typeof ROWS_BY)[number];

/** One row of the wall, before it has a place on it. */
export interface BoardRow {
  /** Unique on the wall: the record's id after its kind. */
  readonly key: string;
  readonly kind: 'production' | RowsBy;
  /** The production, piece, maker or bay that the row stands for. */
  readonly id: string;
  /** The production that it belongs to; null for makers and for the studio's own bays. */
  readonly productionId: string | null;
  readonly title: string;
  readonly detail: string;
  /** When work may be done in it; null for whenever the studio is at work. */
  readonly lit: readonly Span[] | null;
  readonly tapes: readonly Tape[];
}

type RowsInput = Pick<WorkingPlanView, 'directory' | 'problem'> & { readonly plan: Plan };

/** The rows of the wall in their order: by production and piece, by maker, or by bay. */
export function boardRows(input: RowsInput, by: RowsBy): BoardRow[] {
  switch (by) {
    case 'piece':
      return pieceRows(input);
    case 'maker':
      return makerRows(input);
    case 'bay':
      return bayRows(input);
  }
}

function pieceRows({ directory, problem, plan }: RowsInput): BoardRow[] {
  const byPiece = groupTapes(problem, plan, (stage, placement) => [[stage.pieceId, pieceTape(stage, placement)]]);
  const asked = new Set(problem.stages.map((stage) => stage.pieceId));
  return directory.productions.flatMap((production) => {
    const pieces = directory.pieces
      .filter((piece) => piece.productionId === production.id && asked.has(piece.id))
      .sort((a, b) => a.position - b.position || (a.name < b.name ? -1 : 1));
    if (pieces.length === 0) return [];
    const head: BoardRow = {
      key: `production:${production.id}`,
      kind: 'production',
      id: production.id,
      productionId: production.id,
      title: production.name,
      detail: production.state === 'tentative' ? `${production.clientName}, tentative` : production.clientName,
      lit: null,
      tapes: [],
    };
    const rows = pieces.map((piece): BoardRow => ({
      key: `piece:${piece.id}`,
      kind: 'piece',
      id: piece.id,
      productionId: production.id,
      title: piece.name,
      detail: '',
      lit: null,
      tapes: byPiece.get(piece.id) ?? [],
    }));
    return [head, ...rows];
  });
}

function makerRows({ directory, problem, plan }: RowsInput): BoardRow[] {
  const byMaker = groupTapes(problem, plan, (stage, placement) => {
    const makers = new Set(placement.crew.map((member) => member.makerId));
    return [...makers].map((makerId) => [makerId, makerTape(stage, placement)]);
  });
  const named = new Map(directory.makers.map((maker) => [maker.id, maker]));
  const crafts = new Map(directory.crafts.map((craft) => [craft.id, craft.name.toLowerCase()]));
  return problem.makers.map((maker) => ({
    key: `maker:${maker.id}`,
    kind: 'maker',
    id: maker.id,
    productionId: null,
    title: named.get(maker.id)?.name ?? 'A maker',
    detail: maker.crafts.map((held) => crafts.get(held.craftId) ?? 'a craft').join(', '),
    lit: maker.shifts,
    tapes: byMaker.get(maker.id) ?? [],
  }));
}

function bayRows({ directory, problem, plan }: RowsInput): BoardRow[] {
  const stages = new Map(problem.stages.map((stage) => [stage.id, stage]));
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  const byBay = new Map<string, Tape[]>();
  for (const { stageId, bayId, span } of heldBays(problem, plan)) {
    const stage = stages.get(stageId);
    const placement = placed.get(stageId);
    if (stage && placement) append(byBay, bayId, bayTape(stage, placement, span));
  }
  const named = new Map(directory.bays.map((bay) => [bay.id, bay]));
  const pieces = new Map(directory.pieces.map((piece) => [piece.id, piece]));
  return problem.bays.map((bay) => {
    const entry = named.get(bay.id);
    const piece = entry?.pieceId ? pieces.get(entry.pieceId) : undefined;
    const room = bay.capacity === 1 ? 'one at a time' : `room for ${bay.capacity}`;
    return {
      key: `bay:${bay.id}`,
      kind: 'bay',
      id: bay.id,
      productionId: piece?.productionId ?? null,
      title: entry?.name ?? 'A bay',
      detail: piece ? `mould of ${piece.name}` : room,
      lit: bay.open,
      tapes: byBay.get(bay.id) ?? [],
    };
  });
}

type Placed = Plan['placements'][number];

function groupTapes(
  problem: Problem,
  plan: Plan,
  tapesOf: (stage: Problem['stages'][number], placement: Placed) => [string, Tape][],
): Map<string, Tape[]> {
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  const groups = new Map<string, Tape[]>();
  for (const stage of problem.stages) {
    const placement = placed.get(stage.id);
    if (!placement) continue;
    for (const [key, tape] of tapesOf(stage, placement)) append(groups, key, tape);
  }
  return groups;
}

function append<T>(groups: Map<string, T[]>, key: string, item: T): void {
  const group = groups.get(key);
  if (group) group.push(item);
  else groups.set(key, [item]);
}
