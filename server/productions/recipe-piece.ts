import { randomUUID } from 'node:crypto';
import { expandRecipe } from '@common/domain/expand-recipe';
import { recipeAmountsFault, recipeFaults, type RecipeAmounts, type RecipeDraft } from '@common/domain/recipe';
import type { StageDraft } from '@common/domain/stage-draft';
import type { Bay, Link, Piece, Stage } from '@database/entities';
import { invalidField } from '../http/problem';
import { draftRow } from '@database/draft-row';
import type { PlaceRow, StageParts } from './stage-repository';

/** The rows that a piece made from a recipe comes to. */
export interface RecipeRows {
  readonly recipeName: string;
  /** What each of the stages asks for, in their order. */
  readonly drafts: readonly StageDraft[];
  readonly moulds: readonly Partial<Bay>[];
  readonly stages: readonly Partial<Stage>[];
  readonly parts: ReadonlyMap<string, StageParts>;
  readonly links: readonly Partial<Link>[];
}

/** Lays a recipe out for a piece: stages and links in rows, and a mould for each that the recipe makes. */
export function recipeRows(recipe: RecipeDraft, amounts: RecipeAmounts, piece: Pick<Piece, 'id' | 'name'>): RecipeRows {
  const fault = recipeAmountsFault(recipe, amounts) ?? recipeFaults(recipe).at(0);
  if (fault !== undefined) throw invalidField('/recipe', fault);
  const expanded = expandRecipe(recipe, amounts);
  const moulds = Array.from({ length: expanded.moulds }, (_, i) => ({
    id: randomUUID(),
    name: `${piece.name}: mould${expanded.moulds === 1 ? '' : ` ${String(i + 1)}`}`,
    kind: 'mould' as const,
    capacity: 1,
    pieceId: piece.id,
  }));
  const ids = expanded.stages.map(() => randomUUID());
  const stages = expanded.stages.map(({ draft, nth, of }, position) => ({
    ...draftRow(draft),
    id: ids[position],
    pieceId: piece.id,
    position,
    nth,
    repeats: of,
  }));
  const parts = new Map(
    expanded.stages.map(({ draft, mould, untilStage }, i) => {
      const untilStageId = untilStage === null ? null : ids[untilStage];
      const places: PlaceRow[] = draft.places.map(({ bayIds, units, hold }) =>
        heldUntil({ bayIds, units, hold }, untilStageId),
      );
      if (mould !== null) {
        const hold = untilStageId === null ? ('dwell' as const) : ('until-stage' as const);
        places.push({ bayIds: [moulds[mould].id], units: 1, hold, untilStageId });
      }
      return [ids[i], { crew: draft.crew, places }];
    }),
  );
  const links = expanded.links.map(({ from, to, ...link }) => ({
    ...link,
    id: randomUUID(),
    fromStageId: ids[from],
    toStageId: ids[to],
  }));
  const drafts = expanded.stages.map((stage) => stage.draft);
  return { recipeName: recipe.name, drafts, moulds, stages, parts, links };
}

function heldUntil(place: Omit<PlaceRow, 'untilStageId'>, untilStageId: string | null): PlaceRow {
  return { ...place, untilStageId: place.hold === 'until-stage' ? untilStageId : null };
}
