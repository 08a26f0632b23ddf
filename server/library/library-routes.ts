import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Materials } from './materials';
import type { Recipes } from './recipes';

/** Materials and recipes. */
export function mountLibrary(api: Api, { materials, recipes }: { materials: Materials; recipes: Recipes }): void {
  api.on(endpoints.listMaterials, () => materials.list());
  api.on(endpoints.createMaterial, ({ actor, body }) => materials.create(actor, body));
  api.on(endpoints.changeMaterial, ({ actor, params, body }) => materials.change(actor, params.id, body));
  api.on(endpoints.listRecipes, () => recipes.list());
  api.on(endpoints.createRecipe, ({ actor, body }) => recipes.create(actor, body));
  api.on(endpoints.changeRecipe, ({ actor, params, body }) => recipes.change(actor, params.id, body));
}
