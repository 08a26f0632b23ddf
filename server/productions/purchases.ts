import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault, PurchaseChange, PurchaseDraft, PurchaseView } from '@common/contract';
import { Purchase } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { purchaseView } from './production-mapper';
import { ProductionRepository } from './production-repository';
import { StageRepository } from './stage-repository';

/** Bought-in parts. */
export class Purchases {
  constructor(private readonly transactions: Transactions) {}

  create(actor: Actor, productionId: string, draft: z.output<typeof PurchaseDraft>): Promise<PurchaseView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const production = await repository.production(productionId);
      if (!production) throw notFound('production');
      const purchase = unit.manager.create(Purchase, { ...draft, id: randomUUID(), productionId, version: 1 });
      await requireSound(unit, purchase);
      await repository.savePurchase(purchase);
      const after = purchaseView(purchase);
      const sentence = `Added a purchase to ${production.name}: ${purchase.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'purchase', id: purchase.id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof PurchaseChange>): Promise<PurchaseView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const purchase = await requirePurchase(repository, id);
      const before = purchaseView(purchase);
      requireVersion(before, change);
      Object.assign(purchase, sentMembers(change), { version: purchase.version + 1 });
      await requireSound(unit, purchase);
      await repository.savePurchase(purchase);
      const after = purchaseView(purchase);
      const sentence = `Changed the purchase ${purchase.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'purchase', id }, sentence, before, after });
      return after;
    });
  }

  remove(actor: Actor, id: string, version: number): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const purchase = await requirePurchase(repository, id);
      const before = purchaseView(purchase);
      requireVersion(before, { version });
      await repository.removePurchase(id);
      const sentence = `Removed the purchase ${purchase.name}.`;
      await unit.record({ action: 'removed', subject: { kind: 'purchase', id }, sentence, before });
    });
  }
}

async function requirePurchase(repository: ProductionRepository, id: string): Promise<Purchase> {
  const purchase = await repository.purchase(id);
  if (!purchase) throw notFound('purchase');
  return purchase;
}

async function requireSound(unit: Unit, purchase: Purchase): Promise<void> {
  const faults: FieldFault[] = [];
  const stage = await new StageRepository(unit.manager).stage(purchase.stageId);
  if (stage?.piece.productionId !== purchase.productionId) {
    faults.push({ pointer: '/stageId', detail: 'The production has no such stage.' });
  }
  const { orderedOn, dueOn, receivedOn } = purchase;
  if (orderedOn !== null && receivedOn !== null && receivedOn < orderedOn) {
    faults.push({ pointer: '/receivedOn', detail: 'It can not have come before it was ordered.' });
  }
  if (orderedOn !== null && dueOn !== null && dueOn < orderedOn) {
    faults.push({ pointer: '/dueOn', detail: 'It can not be due before it was ordered.' });
  }
  if (faults.length > 0) throw invalidFields(faults);
}
