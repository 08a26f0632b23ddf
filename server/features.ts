import type { FeatureParts } from './app-parts';
import { Bays, mountBays } from './bays';
import { Climates, mountClimates } from './climates';
import { ClientPage, mountClientPage } from './client-page';
import { Crafts, Leaves, Makers, mountCrew } from './crew';
import { DaySheets, mountDaySheets } from './day-sheets';
import { mountFeeds } from './feeds';
import { mountImport } from './import';
import { Materials, mountLibrary, Recipes } from './library';
import { mountOpenApi } from './openapi';
import { createPlanningParts, mountPlanning } from './planning';
import { createProductionParts, mountProductions } from './productions';
import { Accounts, mountGoogle, mountSession } from './session';
import { mountStudio, StudioService } from './studio';

/** Every feature's routes, made and mounted. */
export function mountFeatures(parts: FeatureParts): void {
  const { api, transactions } = parts;
  mountSession(api, { ...parts, accounts: new Accounts(transactions) });
  mountGoogle(parts);
  mountStudio(api, new StudioService(transactions));
  mountCrew(api, {
    crafts: new Crafts(transactions),
    makers: new Makers(transactions),
    leaves: new Leaves(transactions),
  });
  mountBays(api, new Bays(transactions));
  mountClimates(api, new Climates(transactions));
  mountLibrary(api, { materials: new Materials(transactions), recipes: new Recipes(transactions) });
  mountPlanning(api, createPlanningParts(parts));
  mountProductions(api, createProductionParts(transactions));
  mountClientPage(api, new ClientPage(transactions));
  mountDaySheets(api, new DaySheets(transactions));
  mountImport(api, transactions);
  mountFeeds({ ...parts, publicUrl: parts.config.publicUrl });
  mountOpenApi(parts.app);
}
