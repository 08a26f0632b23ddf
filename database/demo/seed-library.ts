import type { StageDraft } from '@common/domain/stage-draft';
import {
  Craft,
  Material,
  MaterialDwell,
  Recipe,
  RecipeStep,
  RecipeStepCrew,
  RecipeStepPlace,
  RecipeStepPlaceBay,
} from '@database/entities';
import { draftRow, type DraftRow } from '@database/draft-row';
import type { EntityManager } from 'typeorm';
import type { DemoMaterial } from './demo-material';
import type { DemoCraft, DemoRecipe } from './demo-studio-types';
import { recordId, recordIdOrNull } from './record-id';

/** Enters crafts. */
export async function seedCrafts(manager: EntityManager, crafts: readonly DemoCraft[]): Promise<void> {
  await manager.insert(
    Craft,
    crafts.map(({ id, key, name }) => ({ id: recordId(id), key, name })),
  );
}

/** Enters materials with their dwells. */
export async function seedMaterials(manager: EntityManager, materials: readonly DemoMaterial[]): Promise<void> {
  await manager.insert(
    Material,
    materials.map(({ id, dwells: _dwells, cautions, ...material }) => ({
      ...material,
      id: recordId(id),
      cautions: [...cautions],
    })),
  );
  await manager.insert(
    MaterialDwell,
    materials.flatMap(({ id, dwells }) =>
      dwells.map(({ minutes, ...dwell }, position) => ({
        ...dwell,
        materialId: recordId(id),
        position,
        lowMinutes: minutes.low,
        likelyMinutes: minutes.likely,
        highMinutes: minutes.high,
      })),
    ),
  );
}

/** Enters recipes; places at bays that are not among `bayKeys` are left out, as an empty studio has none. */
export async function seedRecipes(
  manager: EntityManager,
  recipes: readonly DemoRecipe[],
  bayKeys: ReadonlySet<string>,
): Promise<void> {
  await manager.insert(
    Recipe,
    recipes.map(({ id, steps: _steps, ...recipe }) => ({ ...recipe, id: recordId(id) })),
  );
  const steps = recipes.flatMap((recipe) =>
    recipe.steps.map((step, position) => {
      const places = step.stage.places.filter((place) => place.bayIds.every((key) => bayKeys.has(key)));
      return { ...step, places, position, recipeId: recordId(recipe.id), id: recordId(`${recipe.id}/${position}`) };
    }),
  );
  await manager.insert(
    RecipeStep,
    steps.map(({ id, recipeId, position, after, each, mould, untilStep, stage }) => ({
      ...draftColumns(stage),
      id,
      recipeId,
      position,
      after: [...after],
      each,
      mould,
      untilPosition: untilStep,
    })),
  );
  await manager.insert(
    RecipeStepCrew,
    steps.flatMap(({ id, stage }) =>
      stage.crew.map((wanted, position) => ({ ...crewColumns(wanted, position), stepId: id })),
    ),
  );
  await manager.insert(
    RecipeStepPlace,
    steps.flatMap(({ id, places }) =>
      places.map(({ units, hold }, position) => ({ stepId: id, position, units, hold })),
    ),
  );
  await manager.insert(
    RecipeStepPlaceBay,
    steps.flatMap(({ id, places }) =>
      places.flatMap((place, placePosition) =>
        place.bayIds.map((key, position) => ({ stepId: id, placePosition, position, bayId: recordId(key) })),
      ),
    ),
  );
}

/** The columns of a draft that names its material by key. */
export function draftColumns(draft: StageDraft): DraftRow {
  return { ...draftRow(draft), dwellMaterialId: recordIdOrNull(draft.dwell?.materialId ?? null) };
}

/** A crew wanted, as columns. */
export function crewColumns({ craftId, least, most }: StageDraft['crew'][number], position: number) {
  return { position, craftId: recordId(craftId), least, most };
}
