import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { RecipeChange, RecipeCreate, RecipeView } from '@common/contract';
import { recipeFaults } from '@common/domain/recipe';
import { Recipe } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import { draftFaults } from '../storage/drafts';
import { knownRecords } from '../storage/known-records';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { recipeView } from './library-mapper';
import { LibraryRepository } from './library-repository';

type RecipeFields = z.output<typeof RecipeCreate>;

/** Ways to make a kind of piece. */
export class Recipes {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<RecipeView[]> {
    return this.transactions.read(async (manager) => (await new LibraryRepository(manager).recipes()).map(recipeView));
  }

  create(actor: Actor, fields: RecipeFields): Promise<RecipeView> {
    return this.transactions.write(actor, async (unit) => {
      await requireSound(unit, fields);
      const repository = new LibraryRepository(unit.manager);
      const id = randomUUID();
      const { steps, ...row } = fields;
      await repository.saveRecipe(unit.manager.create(Recipe, { ...row, id, version: 1 }), steps);
      const after = recipeView(await requireRecipe(repository, id));
      const sentence = `Added the recipe ${fields.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'recipe', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof RecipeChange>): Promise<RecipeView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new LibraryRepository(unit.manager);
      const recipe = await requireRecipe(repository, id);
      const before = recipeView(recipe);
      requireVersion(before, change);
      const { steps, version: _version, ...fields } = change;
      await requireSound(unit, { ...before, ...sentMembers(change) });
      Object.assign(recipe, sentMembers(fields), { version: recipe.version + 1 });
      await repository.saveRecipe(recipe, steps);
      const after = recipeView(await requireRecipe(repository, id));
      const sentence = `Changed the recipe ${recipe.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'recipe', id }, sentence, before, after });
      return after;
    });
  }
}

async function requireRecipe(repository: LibraryRepository, id: string): Promise<Recipe> {
  const recipe = await repository.recipe(id);
  if (!recipe) throw notFound('recipe');
  return recipe;
}

async function requireSound(unit: Unit, recipe: RecipeFields): Promise<void> {
  const known = await knownRecords(unit.manager);
  const faults = [
    ...recipe.steps.flatMap(({ stage }, i) => draftFaults(stage, known, `/steps/${String(i)}/stage`)),
    ...recipeFaults(recipe).map((detail) => ({ pointer: '/steps', detail })),
  ];
  if (faults.length > 0) throw invalidFields(faults);
}
