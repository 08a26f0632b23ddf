import { randomUUID } from 'node:crypto';
import type { ClientView } from '@common/contract';
import { Client } from '@database/entities';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { clientView } from './production-mapper';
import { ProductionRepository } from './production-repository';

/** Who productions are made for. */
export class Clients {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<ClientView[]> {
    return this.transactions.read(async (manager) =>
      (await new ProductionRepository(manager).clients()).map(clientView),
    );
  }

  create(actor: Actor, { name }: { readonly name: string }): Promise<ClientView> {
    return this.transactions.write(actor, async (unit) => {
      const client = unit.manager.create(Client, { id: randomUUID(), name, version: 1 });
      await new ProductionRepository(unit.manager).addClient(client);
      const after = clientView(client);
      const sentence = `Added the client ${name}.`;
      await unit.record({ action: 'created', subject: { kind: 'client', id: client.id }, sentence, after });
      return after;
    });
  }
}
