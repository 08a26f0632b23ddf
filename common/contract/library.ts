import { z } from 'zod';
import { MATERIAL_MILESTONES } from '../domain/material';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { Id, Minutes, Name, Note, Version } from './primitives';
import { StageDraft } from './stage';

/** How temperature or humidity moves a dwell; see docs/dwell.md for each law and its source. */
export const DwellLaw = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('none') }),
  z.object({ kind: z.literal('arrhenius'), activationEnergyJPerMol: z.number().positive().max(200_000) }),
  z.object({ kind: z.literal('factor-per-10-degrees'), factor: z.number().min(1).max(12) }),
  z.object({ kind: z.literal('nurse-saul'), datumCelsius: z.number().min(-30).max(30) }),
  z.object({ kind: z.literal('evaporation') }),
]);
export type DwellLaw = z.infer<typeof DwellLaw>;

export { MATERIAL_MILESTONES };

/** Three times in minutes at the material's reference temperature and humidity. */
export const ThreePoint = z
  .object({ low: Minutes, likely: Minutes, high: Minutes })
  .refine((t) => t.low <= t.likely && t.likely <= t.high, {
    message: 'Low, likely and high must stand in that order.',
    path: ['likely'],
  });
export type ThreePoint = z.infer<typeof ThreePoint>;

export const MaterialDwell = z.object({
  milestone: z.enum(MATERIAL_MILESTONES),
  minutes: ThreePoint,
  law: DwellLaw,
  /** Below this nothing advances. */
  minimumCelsius: z.number().nullable(),
  maximumCelsius: z.number().nullable(),
  /** Where the figure comes from. */
  source: z.string().max(400),
});
export type MaterialDwell = z.infer<typeof MaterialDwell>;

const materialFields = {
  name: Name,
  family: z.string().trim().min(1).max(60),
  referenceCelsius: z.number().min(0).max(40),
  referenceHumidityPercent: z.number().min(0).max(100),
  attendedMinutes: Minutes,
  dwells: z.array(MaterialDwell).max(20),
  cautions: z.array(z.string().max(400)).max(20),
  note: Note,
};
export const MaterialView = z.object({ id: Id, ...materialFields, version: Version });
export type MaterialView = z.infer<typeof MaterialView>;
export const MaterialCreate = z.object(materialFields);
export const MaterialChange = z.object(materialFields).partial().extend({ version: Version });

/**
 * A stage of a recipe. `after` names earlier steps by their place in the list (0-based); empty for none. Minutes are for one
 * unit of the recipe's size. `each` says for what it is repeated.
 */
export const RecipeStep = z.object({
  stage: StageDraft,
  after: z.array(z.int().min(0)).max(20),
  each: z.enum(['once', 'cast', 'coat', 'mould']),
  /** `makes`: from it on there is a mould; `fills`: it takes the mould of its cast, and holds it until `untilStep` has ended. */
  mould: z.enum(['none', 'makes', 'fills']).default('none'),
  /** The step (0-based, of the same cast) that lets go of the mould and of places held `until-stage`; null for the own dwell. */
  untilStep: z.int().min(0).nullable().default(null),
});
export type RecipeStep = z.infer<typeof RecipeStep>;

const recipeFields = {
  name: Name,
  makes: Note,
  sizeUnit: z.string().trim().min(1).max(40),
  usualSize: z.number().positive().max(10_000),
  usualCasts: z.int().min(1).max(200),
  usualMoulds: z.int().min(0).max(20),
  usualCoats: z.int().min(1).max(20),
  steps: z.array(RecipeStep).min(1).max(120),
};
export const RecipeView = z.object({ id: Id, ...recipeFields, version: Version });
export type RecipeView = z.infer<typeof RecipeView>;
export const RecipeCreate = z.object(recipeFields);
export const RecipeChange = z.object(recipeFields).partial().extend({ version: Version });

export const libraryEndpoints = {
  listMaterials: endpoint({
    method: 'GET',
    path: '/api/materials',
    who: WORKSHOP,
    summary: 'Materials and their dwells',
    response: z.array(MaterialView),
  }),
  createMaterial: endpoint({
    method: 'POST',
    path: '/api/materials',
    who: OFFICE,
    summary: 'Add a material',
    body: MaterialCreate,
    response: MaterialView,
    status: 201,
  }),
  changeMaterial: endpoint({
    method: 'PATCH',
    path: '/api/materials/:id',
    who: OFFICE,
    summary: 'Change a material',
    params: ById,
    body: MaterialChange,
    response: MaterialView,
  }),
  listRecipes: endpoint({
    method: 'GET',
    path: '/api/recipes',
    who: WORKSHOP,
    summary: 'Recipes',
    response: z.array(RecipeView),
  }),
  createRecipe: endpoint({
    method: 'POST',
    path: '/api/recipes',
    who: OFFICE,
    summary: 'Add a recipe',
    body: RecipeCreate,
    response: RecipeView,
    status: 201,
  }),
  changeRecipe: endpoint({
    method: 'PATCH',
    path: '/api/recipes/:id',
    who: OFFICE,
    summary: 'Change a recipe',
    params: ById,
    body: RecipeChange,
    response: RecipeView,
  }),
};
