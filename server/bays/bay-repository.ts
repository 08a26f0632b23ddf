import type { EntityManager } from 'typeorm';
import type { Pattern } from '@common/contract';
import { Bay, BayOpening, Piece } from '@database/entities';

/** Bays and moulds, through one manager. */
export class BayRepository {
  constructor(private readonly manager: EntityManager) {}

  all(): Promise<Bay[]> {
    return this.manager.find(Bay, {
      relations: { openings: true },
      relationLoadStrategy: 'query',
      order: { name: 'ASC', id: 'ASC' },
    });
  }

  byId(id: string): Promise<Bay | null> {
    return this.manager.findOne(Bay, { where: { id }, relations: { openings: true }, relationLoadStrategy: 'query' });
  }

  isPiece(id: string): Promise<boolean> {
    return this.manager.existsBy(Piece, { id });
  }

  /** Writes a bay's own row, and its openings in place of those before, where given. */
  async save(bay: Bay, openings: readonly Pattern[] | undefined): Promise<void> {
    const { openings: _openings, piece: _piece, ...row } = bay;
    await this.manager.upsert(Bay, row, ['id']);
    if (!openings) return;
    await this.manager.delete(BayOpening, { bayId: bay.id });
    const rows = openings.map((opening, position) => ({ ...opening, bayId: bay.id, position }));
    await this.manager.insert(BayOpening, rows);
  }
}
