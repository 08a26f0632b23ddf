import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { ProductionChange, ProductionCreate, ProductionSummary, ProductionView } from '@common/contract';
import { KeyDate, Production } from '@database/entities';
import { invalidField, invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { keyDateFaults } from './key-dates';
import { productionSummary, productionView } from './production-mapper';
import { ProductionRepository } from './production-repository';

/** Jobs for clients. */
export class Productions {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<ProductionSummary[]> {
    return this.transactions.read(async (manager) =>
      (await new ProductionRepository(manager).productions()).map(productionSummary),
    );
  }

  read(viewer: Actor, id: string): Promise<ProductionView> {
    return this.transactions.read((manager) => readWhole(viewer, new ProductionRepository(manager), id));
  }

  create(actor: Actor, { keyDates, ...fields }: z.output<typeof ProductionCreate>): Promise<ProductionView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      await requireClient(repository, fields.clientId);
      const faults = keyDates.flatMap((keyDate, i) =>
        keyDateFaults(keyDate, { now: unit.at, pieceIds: new Set() }, `/keyDates/${String(i)}`),
      );
      if (faults.length > 0) throw invalidFields(faults);
      const id = randomUUID();
      await repository.save(unit.manager.create(Production, { ...fields, id, createdAt: unit.at, version: 1 }));
      for (const { pieceIds, at, ...keyDate } of keyDates) {
        const row = { ...keyDate, id: randomUUID(), productionId: id, at: new Date(at), version: 1 };
        await repository.saveKeyDate(unit.manager.create(KeyDate, row), pieceIds);
      }
      const after = await readWhole(actor, repository, id);
      const sentence = `Entered the production ${fields.name} for ${after.clientName}.`;
      await unit.record({ action: 'created', subject: { kind: 'production', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof ProductionChange>): Promise<ProductionView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const production = await repository.production(id);
      if (!production) throw notFound('production');
      const before = productionSummary(production);
      requireVersion(before, change);
      if (change.clientId !== undefined) await requireClient(repository, change.clientId);
      const { version: _version, ...fields } = change;
      const noteBefore = production.note;
      Object.assign(production, sentMembers(fields), { version: production.version + 1 });
      await repository.save(production);
      const after = await readWhole(actor, repository, id);
      const summary = productionSummary((await repository.production(id)) ?? production);
      const what = changedFields({ ...before, note: noteBefore }, { ...summary, note: after.note });
      const sentence = `Changed the production ${after.name}: ${what}.`;
      await unit.record({ action: 'changed', subject: { kind: 'production', id }, sentence, before, after: summary });
      return after;
    });
  }
}

/** A whole production, or the problem that there is none. */
export async function readWhole(viewer: Actor, repository: ProductionRepository, id: string): Promise<ProductionView> {
  const whole = await repository.whole(id);
  if (!whole) throw notFound('production');
  return productionView(viewer, whole);
}

async function requireClient(repository: ProductionRepository, id: string): Promise<void> {
  if (!(await repository.isClient(id))) throw invalidField('/clientId', 'There is no such client.');
}
