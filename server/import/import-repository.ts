import { In, type EntityManager } from 'typeorm';
import { Bay, Craft, Material, Piece, Production, Stage, Studio } from '@database/entities';
import type { KnownWords } from './row-stage';

/** A piece of the production with its place, and its stages with theirs. */
export interface StoredPiece {
  readonly id: string;
  readonly name: string;
  readonly position: number;
  readonly stages: readonly { readonly id: string; readonly name: string; readonly position: number }[];
}

/** What an import reads of the studio and the production, through one manager. */
export class ImportRepository {
  constructor(private readonly manager: EntityManager) {}

  production(id: string): Promise<Production | null> {
    return this.manager.findOneBy(Production, { id });
  }

  async knownWords(): Promise<KnownWords> {
    const { zone, currency } = await this.manager.findOneOrFail(Studio, { where: { single: true } });
    const crafts = await this.manager.find(Craft, { order: { name: 'ASC' } });
    const bays = await this.manager.find(Bay, { where: { active: true }, order: { name: 'ASC' } });
    const materials = await this.manager.find(Material, { relations: { dwells: true }, order: { name: 'ASC' } });
    return {
      zone,
      currencyDecimals:
        new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits ?? 2,
      crafts,
      bays,
      materials: materials.map(({ id, name, attendedMinutes, dwells }) => ({
        id,
        name,
        attendedMinutes,
        milestones: dwells.map(({ milestone, likelyMinutes }) => ({ milestone, likelyMinutes })),
      })),
    };
  }

  /** The production's pieces with their stages, each in its order. */
  async pieces(productionId: string): Promise<StoredPiece[]> {
    const pieces = await this.manager.find(Piece, { where: { productionId }, order: { position: 'ASC', id: 'ASC' } });
    const stages = await this.manager.find(Stage, {
      select: { id: true, name: true, pieceId: true, position: true },
      where: { pieceId: In(pieces.map((piece) => piece.id)) },
      order: { position: 'ASC', id: 'ASC' },
    });
    const byPiece = new Map<string, Stage[]>(pieces.map((piece) => [piece.id, []]));
    for (const stage of stages) byPiece.get(stage.pieceId)?.push(stage);
    return pieces.map(({ id, name, position }) => ({ id, name, position, stages: byPiece.get(id) ?? [] }));
  }
}
