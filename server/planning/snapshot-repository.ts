import { In, type EntityManager } from 'typeorm';
import type { Plan } from '@common/planning';
import type { Span } from '@common/time/span';
import {
  Bay,
  Closure,
  Craft,
  IssuedEntry,
  Link,
  Maker,
  Material,
  Piece,
  Production,
  Purchase,
  Stage,
  Studio,
} from '@database/entities';
import { readClimates, type StudioClimates } from '../storage/climates';

const MS_PER_MINUTE = 60_000;
const MS_PER_DAY = 1440 * MS_PER_MINUTE;
const MARGIN_DAYS = 60;

const BY_QUERY = { relationLoadStrategy: 'query' } as const;

/** Everything that a plan is made from, as rows; productions in the order in which they were entered, their pieces and stages in theirs. */
export interface StudioRows {
  readonly studio: Studio;
  readonly closures: readonly Closure[];
  readonly crafts: readonly Craft[];
  readonly makers: readonly Maker[];
  readonly bays: readonly Bay[];
  readonly materials: readonly Material[];
  readonly productions: readonly Production[];
  readonly pieces: readonly Piece[];
  readonly stages: readonly Stage[];
  readonly links: readonly Link[];
  readonly purchases: readonly Purchase[];
  readonly issued: Plan | null;
  readonly climates: StudioClimates;
}

/** Reads the studio whole; the manager has to be that of a transaction that sees one instant. */
export async function readStudioRows(manager: EntityManager): Promise<StudioRows> {
  const productions = await manager.find(Production, {
    where: { state: In(['tentative', 'committed']) },
    relations: { client: true, keyDates: { pieces: true } },
    order: { createdAt: 'ASC', id: 'ASC' },
    ...BY_QUERY,
  });
  const rank = new Map(productions.map((production, i) => [production.id, i]));
  const pieces = await manager.find(Piece, { where: { productionId: In([...rank.keys()]) } });
  pieces.sort(
    (a, b) =>
      (rank.get(a.productionId) ?? 0) - (rank.get(b.productionId) ?? 0) ||
      a.position - b.position ||
      a.id.localeCompare(b.id),
  );
  const pieceRank = new Map(pieces.map((piece, i) => [piece.id, i]));
  const stages = await manager.find(Stage, {
    where: { pieceId: In([...pieceRank.keys()]) },
    relations: { crew: true, places: { bays: true }, makers: true, bays: true, dwellMaterial: true },
    ...BY_QUERY,
  });
  stages.sort(
    (a, b) =>
      (pieceRank.get(a.pieceId) ?? 0) - (pieceRank.get(b.pieceId) ?? 0) ||
      a.position - b.position ||
      a.id.localeCompare(b.id),
  );
  return {
    studio: await manager.findOneOrFail(Studio, { where: { single: true } }),
    closures: await manager.find(Closure, { order: { id: 'ASC' } }),
    crafts: await manager.find(Craft, { order: { name: 'ASC', id: 'ASC' } }),
    makers: await manager.find(Maker, {
      relations: { crafts: true, patterns: true, leave: true },
      order: { name: 'ASC', id: 'ASC' },
      ...BY_QUERY,
    }),
    bays: await manager.find(Bay, { relations: { openings: true }, order: { name: 'ASC', id: 'ASC' }, ...BY_QUERY }),
    materials: await manager.find(Material, { relations: { dwells: true }, order: { id: 'ASC' }, ...BY_QUERY }),
    productions,
    pieces,
    stages,
    links: await manager.find(Link, { order: { id: 'ASC' } }),
    purchases: await manager.find(Purchase, { order: { id: 'ASC' } }),
    issued: await readIssued(manager),
    climates: await readClimates(manager, frameOf(productions)),
  };
}

/**
 * Over which time a profile of the seasons is laid out: from well before the productions were entered, for what cures already, to
 * well after their last date. It hangs on the studio alone, not on the clock, so that the same studio makes the same problem.
 */
function frameOf(productions: readonly Production[]): Span {
  const entered = productions.map(({ createdAt }) => createdAt.getTime());
  const due = productions.flatMap(({ keyDates }) => keyDates.map(({ at }) => at.getTime()));
  const start = Math.min(...entered, ...due) - MARGIN_DAYS * MS_PER_DAY;
  const end = Math.max(...entered, ...due) + MARGIN_DAYS * MS_PER_DAY;
  return productions.length === 0
    ? { start: 0, end: 1 }
    : { start: Math.floor(start / MS_PER_MINUTE), end: Math.floor(end / MS_PER_MINUTE) };
}

/** The plan that people work to; null before the first issue. */
export async function readIssued(manager: EntityManager): Promise<Plan | null> {
  const newest = await manager.maximum(IssuedEntry, 'planNumber');
  if (newest === null) return null;
  const entries = await manager.find(IssuedEntry, { where: { planNumber: newest }, order: { stageId: 'ASC' } });
  return {
    placements: entries.map(({ stageId, work, crew, bayIds, dwellEndsAt }) => ({
      stageId,
      work,
      crew,
      bayIds,
      dwellEnd: Math.floor(dwellEndsAt.getTime() / 60_000),
    })),
  };
}
