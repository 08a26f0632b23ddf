import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { MaterialView, RecipeView } from '@common/contract';
import {
  Material,
  MaterialDwell,
  Recipe,
  RecipeStep,
  RecipeStepCrew,
  RecipeStepPlace,
  RecipeStepPlaceBay,
} from '@database/entities';
import { draftRow } from '@database/draft-row';

const RECIPE_PARTS = { steps: { crew: true, places: { bays: true } } } as const;

/** Materials and recipes, through one manager. */
export class LibraryRepository {
  constructor(private readonly manager: EntityManager) {}

  materials(): Promise<Material[]> {
    return this.manager.find(Material, {
      relations: { dwells: true },
      relationLoadStrategy: 'query',
      order: { name: 'ASC', id: 'ASC' },
    });
  }

  material(id: string): Promise<Material | null> {
    return this.manager.findOne(Material, {
      where: { id },
      relations: { dwells: true },
      relationLoadStrategy: 'query',
    });
  }

  /** Writes a material's own row, and its dwells in place of those before, where given. */
  async saveMaterial(material: Material, dwells: MaterialView['dwells'] | undefined): Promise<void> {
    const { dwells: _dwells, ...row } = material;
    await this.manager.upsert(Material, row, ['id']);
    if (!dwells) return;
    await this.manager.delete(MaterialDwell, { materialId: material.id });
    const rows = dwells.map(({ minutes, ...dwell }, position) => ({
      ...dwell,
      materialId: material.id,
      position,
      lowMinutes: minutes.low,
      likelyMinutes: minutes.likely,
      highMinutes: minutes.high,
    }));
    await this.manager.insert(MaterialDwell, rows);
  }

  recipes(): Promise<Recipe[]> {
    return this.manager.find(Recipe, {
      relations: RECIPE_PARTS,
      relationLoadStrategy: 'query',
      order: { name: 'ASC', id: 'ASC' },
    });
  }

  recipe(id: string): Promise<Recipe | null> {
    return this.manager.findOne(Recipe, { where: { id }, relations: RECIPE_PARTS, relationLoadStrategy: 'query' });
  }

  /** Writes a recipe's own row, and its steps in place of those before, where given. */
  async saveRecipe(recipe: Recipe, steps: RecipeView['steps'] | undefined): Promise<void> {
    const { steps: _steps, ...row } = recipe;
    await this.manager.upsert(Recipe, row, ['id']);
    if (!steps) return;
    await this.manager.delete(RecipeStep, { recipeId: recipe.id });
    const ids = steps.map(() => randomUUID());
    const rows = steps.map(({ stage, after, each, mould, untilStep }, position) => ({
      ...draftRow(stage),
      id: ids[position],
      recipeId: recipe.id,
      position,
      after,
      each,
      mould,
      untilPosition: untilStep,
    }));
    await this.manager.insert(RecipeStep, rows);
    await this.#insertCrewAndPlaces(steps, ids);
  }

  async #insertCrewAndPlaces(steps: RecipeView['steps'], ids: readonly string[]): Promise<void> {
    const crew = steps.flatMap(({ stage }, i) =>
      stage.crew.map((wanted, position) => ({ ...wanted, stepId: ids[i], position })),
    );
    const places = steps.flatMap(({ stage }, i) =>
      stage.places.map(({ units, hold }, position) => ({ stepId: ids[i], position, units, hold })),
    );
    const bays = steps.flatMap(({ stage }, i) =>
      stage.places.flatMap(({ bayIds }, placePosition) =>
        bayIds.map((bayId, position) => ({ stepId: ids[i], placePosition, position, bayId })),
      ),
    );
    await this.manager.insert(RecipeStepCrew, crew);
    await this.manager.insert(RecipeStepPlace, places);
    await this.manager.insert(RecipeStepPlaceBay, bays);
  }
}
