import { dayOfInstant } from '@common/time/calendar-day';
import { Account, Craft, Maker, Production } from '@database/entities';
import type { DataSource, EntityManager } from 'typeorm';
import { buildDemoStudio } from './build-demo-studio';
import { DEMO_ZONE } from './demo-calendar';
import { demoSignIns, seedAccounts } from './seed-accounts';
import { seedCrafts, seedMaterials, seedRecipes } from './seed-library';
import { seedProductions, seedStages } from './seed-work';
import { seedBays, seedMakers, seedStudio } from './seed-workshop';

/** Any number that nothing else locks: two starts at once set one demo up. */
const SEED_LOCK = 4_073_502;

const MS_PER_MINUTE = 60_000;

/**
 * Fills an empty, migrated database with the demo studio as it stands today; one that holds anything is left as it is. Answers
 * with the lines that a newcomer needs: who of the demo's people can sign in, and with what.
 */
export async function seedDemo(dataSource: DataSource, now: Date): Promise<readonly string[]> {
  const today = dayOfInstant(Math.floor(now.getTime() / MS_PER_MINUTE), DEMO_ZONE);
  const demo = buildDemoStudio(today);
  return dataSource.transaction(async (manager) => {
    await manager.query('select pg_advisory_xact_lock($1)', [SEED_LOCK]);
    if (await isEmpty(manager)) {
      await seedStudio(manager, demo);
      await seedCrafts(manager, demo.crafts);
      await seedMaterials(manager, demo.materials);
      await seedMakers(manager, demo.makers);
      const bays = demo.bays.filter((bay) => bay.pieceId === null);
      await seedBays(manager, bays);
      await seedRecipes(manager, demo.recipes, new Set(bays.map((bay) => bay.id)));
      await seedProductions(manager, demo);
      // A mould belongs to a piece, and stages to a mould.
      await seedBays(
        manager,
        demo.bays.filter((bay) => bay.pieceId !== null),
      );
      await seedStages(manager, demo);
      await seedAccounts(manager, demo.accounts);
    }
    return demoSignIns(manager, demo.accounts);
  });
}

/**
 * Gives an empty studio what every installation starts with: crafts, materials, and recipes without places. Does nothing
 * where there are crafts already.
 */
export async function seedLibrary(dataSource: DataSource): Promise<void> {
  const demo = buildDemoStudio('2026-01-01');
  await dataSource.transaction(async (manager) => {
    await manager.query('select pg_advisory_xact_lock($1)', [SEED_LOCK]);
    if (await manager.exists(Craft)) {
      return;
    }
    await seedCrafts(manager, demo.crafts);
    await seedMaterials(manager, demo.materials);
    await seedRecipes(manager, demo.recipes, new Set());
  });
}

async function isEmpty(manager: EntityManager): Promise<boolean> {
  for (const entity of [Account, Craft, Maker, Production]) {
    if (await manager.exists(entity)) {
      return false;
    }
  }
  return true;
}
