import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { PieceChange, PieceCreate, PieceView, ProductionView } from '@common/contract';
import { Piece } from '@database/entities';
import { invalidField, invalidFields, notFound, Problem } from '../http/problem';
import { LibraryRepository, recipeView } from '../library';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { pieceView } from './production-mapper';
import { ProductionRepository } from './production-repository';
import { readWhole } from './productions';
import { recipeRows, type RecipeRows } from './recipe-piece';
import { handsFaults, readHands } from './stage-fitness';
import { stageName } from './stage-name';
import { StageRepository } from './stage-repository';

type RecipeChoice = NonNullable<z.output<typeof PieceCreate>['recipe']>;

/** Things being made. */
export class Pieces {
  constructor(private readonly transactions: Transactions) {}

  create(actor: Actor, productionId: string, draft: z.output<typeof PieceCreate>): Promise<ProductionView> {
    return this.transactions.write(actor, async (unit) => {
      const productions = new ProductionRepository(unit.manager);
      const production = await productions.production(productionId);
      if (!production) throw notFound('production');
      const stages = new StageRepository(unit.manager);
      const siblings = await stages.piecesOf(productionId);
      const piece = unit.manager.create(Piece, {
        id: randomUUID(),
        productionId,
        name: draft.name,
        note: draft.note,
        position: 1 + Math.max(-1, ...siblings.map((sibling) => sibling.position)),
        recipeId: draft.recipe?.recipeId ?? null,
        version: 1,
        removedAt: null,
      });
      const rows = draft.recipe ? await chosenRows(unit, draft.recipe, piece) : null;
      await stages.savePiece(piece);
      if (rows) await addRows(stages, rows);
      const sentence = `Added ${piece.name} to ${production.name}${rows ? ` by the recipe ${rows.recipeName}` : ''}.`;
      const after = pieceView(piece);
      await unit.record({ action: 'created', subject: { kind: 'piece', id: piece.id }, sentence, after });
      return readWhole(actor, productions, productionId);
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof PieceChange>): Promise<PieceView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const piece = await requirePiece(repository, id);
      const before = pieceView(piece);
      requireVersion(before, change);
      const { position, version: _version, ...fields } = change;
      Object.assign(piece, sentMembers(fields), { version: piece.version + 1 });
      if (position !== undefined) await moveTo(repository, piece, position);
      await repository.savePiece(piece);
      const after = pieceView(piece);
      const sentence = `Changed ${piece.name} of ${piece.production.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'piece', id }, sentence, before, after });
      return after;
    });
  }

  remove(actor: Actor, id: string, version: number): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const piece = await requirePiece(repository, id);
      const before = pieceView(piece);
      requireVersion(before, { version });
      const stages = await repository.stagesOf(id);
      const begun = stages.find((stage) => stage.state !== 'to-do');
      if (begun) throw new Problem('still-in-use', `Work has begun on ${stageName(begun)}; the piece stays.`);
      const ids = stages.map((stage) => stage.id);
      await requireUnneeded(repository, ids, piece.name);
      await repository.removeStages(ids, unit.at);
      await repository.removePiece(id, unit.at);
      const sentence = `Removed ${piece.name} from ${piece.production.name}.`;
      await unit.record({ action: 'removed', subject: { kind: 'piece', id }, sentence, before });
    });
  }
}

/** Refuses to take stages away that a purchase is for, or that another stage keeps its place until. */
export async function requireUnneeded(
  repository: StageRepository,
  ids: readonly string[],
  what: string,
): Promise<void> {
  const purchase = await repository.purchaseFor(ids);
  if (purchase) {
    throw new Problem(
      'still-in-use',
      `The purchase “${purchase.name}” is for ${what}; move it to another stage first.`,
    );
  }
  const keeper = await repository.keeperUntil(ids);
  if (keeper)
    throw new Problem('still-in-use', `“${keeper.name}” keeps its place until ${what} is done; change that first.`);
}

async function requirePiece(repository: StageRepository, id: string): Promise<Piece> {
  const piece = await repository.piece(id);
  if (!piece) throw notFound('piece');
  return piece;
}

/** The recipe that was chosen, laid out for the piece, where the crew can do what it asks. */
async function chosenRows(unit: Unit, choice: RecipeChoice, piece: Piece): Promise<RecipeRows> {
  const row = await new LibraryRepository(unit.manager).recipe(choice.recipeId);
  if (!row) throw invalidField('/recipe/recipeId', 'There is no such recipe.');
  const rows = recipeRows(recipeView(row), choice, piece);
  const hands = await readHands(unit.manager, unit.at);
  const details = rows.drafts.flatMap((draft) =>
    handsFaults(hands, draft).map(({ detail }) => `${draft.name}: ${detail}`),
  );
  // A step repeated for every cast need not be told as often.
  const faults = [...new Set(details)].map((detail) => ({ pointer: '/recipe', detail }));
  if (faults.length > 0) throw invalidFields(faults);
  return rows;
}

async function addRows(stages: StageRepository, rows: RecipeRows): Promise<void> {
  await stages.addMoulds(rows.moulds);
  await stages.addStages(rows.stages);
  await stages.addParts(rows.parts);
  await stages.addLinks(rows.links);
}

/** Puts the piece at a place among its siblings, and counts all anew. */
async function moveTo(repository: StageRepository, piece: Piece, position: number): Promise<void> {
  const others = (await repository.piecesOf(piece.productionId)).filter((sibling) => sibling.id !== piece.id);
  others.splice(position, 0, piece);
  for (const [place, sibling] of others.entries()) {
    if (sibling.position === place) continue;
    sibling.position = place;
    if (sibling.id !== piece.id) await repository.savePiece(sibling);
  }
}
