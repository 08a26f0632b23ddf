import type { EntityManager } from 'typeorm';
import { Bay, Craft, Material } from '@database/entities';
import type { KnownRecords } from './drafts';

/** The crafts, bays and materials that there are. */
export async function knownRecords(manager: EntityManager): Promise<KnownRecords> {
  const crafts = await manager.find(Craft, { select: { id: true } });
  const bays = await manager.find(Bay, { select: { id: true } });
  const materials = await manager.find(Material, { select: { id: true } });
  const idsOf = (rows: readonly { readonly id: string }[]) => new Set(rows.map((row) => row.id));
  return { craftIds: idsOf(crafts), bayIds: idsOf(bays), materialIds: idsOf(materials) };
}
