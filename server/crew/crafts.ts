import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { CraftCreate, CraftView } from '@common/contract';
import { Craft } from '@database/entities';
import { notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { craftView } from './crew-mapper';
import { CrewRepository } from './crew-repository';

/** The studio's crafts. */
export class Crafts {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<CraftView[]> {
    return this.transactions.read(async (manager) => (await new CrewRepository(manager).crafts()).map(craftView));
  }

  create(actor: Actor, fields: z.output<typeof CraftCreate>): Promise<CraftView> {
    return this.transactions.write(actor, async (unit) => {
      const craft = unit.manager.create(Craft, { ...fields, id: randomUUID(), version: 1 });
      await new CrewRepository(unit.manager).addCraft(craft);
      const after = craftView(craft);
      const sentence = `Added the craft ${craft.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'craft', id: craft.id }, sentence, after });
      return after;
    });
  }

  /** The database refuses while a maker, a stage or a recipe refers to it. */
  remove(actor: Actor, id: string): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new CrewRepository(unit.manager);
      const craft = await repository.craft(id);
      if (!craft) throw notFound('craft');
      await repository.removeCraft(id);
      const sentence = `Removed the craft ${craft.name}.`;
      const before = craftView(craft);
      await unit.record({ action: 'removed', subject: { kind: 'craft', id }, sentence, before });
    });
  }
}
