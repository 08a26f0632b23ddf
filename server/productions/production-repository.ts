import { In, type EntityManager } from 'typeorm';
import { Client, KeyDate, KeyDatePiece, Link, Piece, Production, Purchase, Stage } from '@database/entities';
import type { WholeProduction } from './production-mapper';

const SUMMARY = { client: true, keyDates: { pieces: true }, pieces: { stages: true } } as const;
const STAGE_PARTS = { piece: true, crew: true, places: { bays: true } } as const;

/** Clients, productions, their key dates, pieces and purchases, through one manager. */
export class ProductionRepository {
  constructor(private readonly manager: EntityManager) {}

  clients(): Promise<Client[]> {
    return this.manager.find(Client, { order: { name: 'ASC', id: 'ASC' } });
  }

  isClient(id: string): Promise<boolean> {
    return this.manager.existsBy(Client, { id });
  }

  async addClient(client: Client): Promise<void> {
    await this.manager.insert(Client, client);
  }

  productions(): Promise<Production[]> {
    return this.manager.find(Production, {
      relations: SUMMARY,
      relationLoadStrategy: 'query',
      order: { createdAt: 'ASC', id: 'ASC' },
    });
  }

  production(id: string): Promise<Production | null> {
    return this.manager.findOne(Production, { where: { id }, relations: SUMMARY, relationLoadStrategy: 'query' });
  }

  async whole(id: string): Promise<WholeProduction | null> {
    const production = await this.production(id);
    if (!production) return null;
    const pieceIds = production.pieces.map((piece) => piece.id);
    const stages = await this.manager.find(Stage, {
      where: { pieceId: In(pieceIds) },
      relations: STAGE_PARTS,
      relationLoadStrategy: 'query',
    });
    const stageIds = stages.map((stage) => stage.id);
    const links = await this.manager.find(Link, {
      where: [{ fromStageId: In(stageIds) }, { toStageId: In(stageIds) }],
      order: { id: 'ASC' },
    });
    const purchases = await this.manager.find(Purchase, {
      where: { productionId: id },
      order: { name: 'ASC', id: 'ASC' },
    });
    return { production, stages, links, purchases };
  }

  async save(production: Production): Promise<void> {
    const { client: _client, keyDates: _keyDates, pieces: _pieces, ...row } = production;
    await this.manager.upsert(Production, row, ['id']);
  }

  keyDate(id: string): Promise<KeyDate | null> {
    return this.manager.findOne(KeyDate, {
      where: { id },
      relations: { production: true, pieces: true },
      relationLoadStrategy: 'query',
    });
  }

  /** Writes a key date's own row, and its pieces in place of those before, where given. */
  async saveKeyDate(keyDate: KeyDate, pieceIds: readonly string[] | undefined): Promise<void> {
    const { production: _production, pieces: _pieces, ...row } = keyDate;
    await this.manager.upsert(KeyDate, row, ['id']);
    if (!pieceIds) return;
    await this.manager.delete(KeyDatePiece, { keyDateId: keyDate.id });
    await this.manager.insert(
      KeyDatePiece,
      pieceIds.map((pieceId) => ({ pieceId, keyDateId: keyDate.id })),
    );
  }

  async removeKeyDate(id: string): Promise<void> {
    await this.manager.delete(KeyDate, { id });
  }

  pieceIds(productionId: string): Promise<ReadonlySet<string>> {
    return this.manager
      .find(Piece, { where: { productionId }, select: { id: true } })
      .then((pieces) => new Set(pieces.map((piece) => piece.id)));
  }

  purchase(id: string): Promise<Purchase | null> {
    return this.manager.findOneBy(Purchase, { id });
  }

  async savePurchase(purchase: Purchase): Promise<void> {
    const { production: _production, stage: _stage, ...row } = purchase;
    await this.manager.upsert(Purchase, row, ['id']);
  }

  async removePurchase(id: string): Promise<void> {
    await this.manager.delete(Purchase, { id });
  }
}
