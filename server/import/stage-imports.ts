import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault } from '@common/contract/problem-details';
import type { StageImport, StageImportResult } from '@common/contract/stage-import';
import type { EntityManager } from 'typeorm';
import { notFound } from '../http/problem';
import { handsFaults, readHands, StageRepository, writeUnderstoodWaits } from '../productions';
import type { Actor } from '../session/actor';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { FaultList } from './fault-list';
import { importRows, type ImportRows } from './import-rows';
import { ImportRepository, type StoredPiece } from './import-repository';
import { readStages, type PlannedStage } from './read-stages';

/** Rows written in one statement: PostgreSQL takes 65,535 values at most. */
const ROWS_AT_ONCE = 500;

type Sent = z.output<typeof StageImport>;

/** Stages from CSV text into a production: all rows or none. */
export class StageImports {
  constructor(private readonly transactions: Transactions) {}

  /** Reads the text; `try` only says what it comes to, `take` writes it where nothing is at fault. */
  import(actor: Actor, productionId: string, { csv, mode }: Sent): Promise<StageImportResult> {
    const now = this.transactions.clock();
    return mode === 'try'
      ? this.transactions.read(async (manager) => (await read(manager, productionId, csv, now)).result)
      : this.transactions.write(actor, (unit) => take(unit, productionId, csv));
  }
}

interface Reading {
  readonly productionName: string;
  readonly rows: ImportRows | null;
  readonly result: StageImportResult;
}

async function read(manager: EntityManager, productionId: string, csv: string, now: Date): Promise<Reading> {
  const repository = new ImportRepository(manager);
  const production = await repository.production(productionId);
  if (!production) throw notFound('production');
  const pieces = await repository.pieces(productionId);
  const reading = readStages(csv, await repository.knownWords(), pieces);
  const faults = reading.kind === 'faults' ? reading.faults : await crewFaults(manager, reading.stages, now);
  if (reading.kind === 'faults' || faults.length > 0) {
    return { productionName: production.name, rows: null, result: refused(faults) };
  }
  const rows = rowsFor(productionId, reading.stages, pieces);
  const result = { pieces: rows.pieces.length, stages: rows.stages.length, faults: [], taken: false };
  return { productionName: production.name, rows, result };
}

async function take(unit: Unit, productionId: string, csv: string): Promise<StageImportResult> {
  const { productionName, rows, result } = await read(unit.manager, productionId, csv, unit.at);
  if (!rows) return result;
  const repository = new StageRepository(unit.manager);
  // A piece whose stages follow one another unsaid must not lose that order to the first link that is said.
  await writeUnderstoodWaits(repository, rows.linkedOldPieceIds);
  for (const piece of rows.pieces) await repository.savePiece(piece);
  for (const some of inParts(rows.stages)) await repository.addStages(some);
  for (const some of inParts([...rows.parts])) await repository.addParts(new Map(some));
  for (const some of inParts(rows.links)) await repository.addLinks(some);
  const sentence = `Imported ${counted(result.stages, 'stage')} into ${productionName}, with ${counted(result.pieces, 'new piece')}.`;
  await unit.record({ action: 'imported', subject: { kind: 'production', id: productionId }, sentence });
  return { ...result, taken: true };
}

/** What nobody in the crew can do, and visits that have gone by. */
async function crewFaults(
  manager: EntityManager,
  stages: readonly PlannedStage[],
  now: Date,
): Promise<readonly FieldFault[]> {
  const hands = await readHands(manager, now);
  const faults = new FaultList();
  for (const { line, draft } of stages) {
    for (const { detail } of handsFaults(hands, { ...draft, places: [] })) faults.add(line, () => detail);
    if (draft.visitAt !== null && new Date(draft.visitAt) < now) {
      faults.add(line, () => 'This visit has gone by. Choose an instant that is still ahead.');
    }
  }
  return faults.all();
}

function rowsFor(productionId: string, stages: readonly PlannedStage[], pieces: readonly StoredPiece[]): ImportRows {
  return importRows(productionId, stages, pieces, randomUUID);
}

function refused(faults: readonly FieldFault[]): StageImportResult {
  return { pieces: 0, stages: 0, faults: [...faults], taken: false };
}

function* inParts<T>(rows: readonly T[]): Generator<readonly T[]> {
  for (let from = 0; from < rows.length; from += ROWS_AT_ONCE) yield rows.slice(from, from + ROWS_AT_ONCE);
}

function counted(count: number, word: string): string {
  return `${String(count)} ${word}${count === 1 ? '' : 's'}`;
}
