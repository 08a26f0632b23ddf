import { In, type EntityManager } from 'typeorm';
import {
  Bay,
  KeyDatePiece,
  Link,
  Piece,
  Purchase,
  Stage,
  StageBay,
  StageCrew,
  StageMaker,
  StagePlace,
  StagePlaceBay,
  StageReport,
} from '@database/entities';

const STAGE_PARTS = { piece: { production: true }, crew: true, places: { bays: true } } as const;

/** A place as it is written: bays in order, and until when it is kept. */
export interface PlaceRow {
  readonly bayIds: readonly string[];
  readonly units: number;
  readonly hold: 'work' | 'dwell' | 'until-stage';
  readonly untilStageId: string | null;
}

/** What belongs to a stage beside its own row. */
export interface StageParts {
  readonly crew?: readonly { readonly craftId: string; readonly least: number; readonly most: number }[];
  readonly places?: readonly PlaceRow[];
}

/** Pieces, stages and links, through one manager. Removed ones are not found. */
export class StageRepository {
  constructor(private readonly manager: EntityManager) {}

  piece(id: string): Promise<Piece | null> {
    return this.manager.findOne(Piece, { where: { id }, relations: { production: true } });
  }

  piecesOf(productionId: string): Promise<Piece[]> {
    return this.manager.find(Piece, { where: { productionId }, order: { position: 'ASC', id: 'ASC' } });
  }

  async savePiece(piece: Piece): Promise<void> {
    const { production: _production, recipe: _recipe, stages: _stages, ...row } = piece;
    await this.manager.upsert(Piece, row, ['id']);
  }

  /** Marks a piece as removed, takes it from its key dates, and retires its moulds. */
  async removePiece(id: string, at: Date): Promise<void> {
    await this.manager.update(Piece, { id }, { removedAt: at });
    await this.manager.delete(KeyDatePiece, { pieceId: id });
    await this.manager.update(Bay, { pieceId: id }, { active: false });
  }

  async addMoulds(moulds: readonly Partial<Bay>[]): Promise<void> {
    await this.manager.insert(Bay, [...moulds]);
  }

  stage(id: string): Promise<Stage | null> {
    return this.manager.findOne(Stage, { where: { id }, relations: STAGE_PARTS, relationLoadStrategy: 'query' });
  }

  stagesOf(pieceId: string): Promise<Stage[]> {
    return this.manager.find(Stage, {
      where: { pieceId },
      relations: STAGE_PARTS,
      relationLoadStrategy: 'query',
      order: { position: 'ASC', id: 'ASC' },
    });
  }

  /** Every stage that is not removed, in few words. */
  outline(): Promise<Pick<Stage, 'id' | 'name' | 'pieceId' | 'position' | 'nth' | 'repeats' | 'piece'>[]> {
    return this.manager.find(Stage, {
      select: {
        id: true,
        name: true,
        pieceId: true,
        position: true,
        nth: true,
        repeats: true,
        piece: { id: true, name: true },
      },
      relations: { piece: true },
      order: { position: 'ASC', id: 'ASC' },
    });
  }

  async addStages(rows: readonly Partial<Stage>[]): Promise<void> {
    await this.manager.insert(Stage, [...rows]);
  }

  async saveStage(stage: Stage): Promise<void> {
    const { piece: _p, dwellMaterial: _m, crew: _c, places: _l, makers: _k, bays: _b, ...row } = stage;
    await this.manager.upsert(Stage, row, ['id']);
  }

  async setPosition(id: string, position: number): Promise<void> {
    await this.manager.update(Stage, { id }, { position });
  }

  /** Writes crew and places of stages that have none yet. */
  async addParts(parts: ReadonlyMap<string, StageParts>): Promise<void> {
    const entries = [...parts];
    const crew = entries.flatMap(([stageId, { crew: wanted }]) =>
      (wanted ?? []).map((row, position) => ({ ...row, stageId, position })),
    );
    const places = entries.flatMap(([stageId, { places: wanted }]) =>
      (wanted ?? []).map(({ bayIds: _bayIds, ...row }, position) => ({ ...row, stageId, position })),
    );
    const bays = entries.flatMap(([stageId, { places: wanted }]) =>
      (wanted ?? []).flatMap(({ bayIds }, placePosition) =>
        bayIds.map((bayId, position) => ({ stageId, placePosition, position, bayId })),
      ),
    );
    await this.manager.insert(StageCrew, crew);
    await this.manager.insert(StagePlace, places);
    await this.manager.insert(StagePlaceBay, bays);
  }

  /** Writes whichever of crew and places is given in place of what was. */
  async replaceParts(stageId: string, parts: StageParts): Promise<void> {
    if (parts.crew) await this.manager.delete(StageCrew, { stageId });
    if (parts.places) await this.manager.delete(StagePlace, { stageId });
    await this.addParts(new Map([[stageId, parts]]));
  }

  /** Marks stages as removed and takes away the links to and from them. */
  async removeStages(ids: readonly string[], at: Date): Promise<void> {
    await this.manager.update(Stage, { id: In(ids) }, { removedAt: at });
    await this.manager.delete(Link, { fromStageId: In(ids) });
    await this.manager.delete(Link, { toStageId: In(ids) });
    // Their own places no longer hold anything until another stage.
    await this.manager.delete(StagePlace, { stageId: In(ids) });
  }

  /** A stage outside of the given ones that keeps its place until one of them; null where none does. */
  async keeperUntil(ids: readonly string[]): Promise<Stage | null> {
    const places = await this.manager.find(StagePlace, {
      where: { untilStageId: In(ids) },
      relations: { stage: true },
    });
    return places.find((place) => !ids.includes(place.stageId))?.stage ?? null;
  }

  purchaseFor(ids: readonly string[]): Promise<Purchase | null> {
    return this.manager.findOneBy(Purchase, { stageId: In(ids) });
  }

  links(): Promise<Link[]> {
    return this.manager.find(Link, { order: { id: 'ASC' } });
  }

  link(id: string): Promise<Link | null> {
    return this.manager.findOne(Link, { where: { id }, relations: { fromStage: true, toStage: true } });
  }

  async addLinks(links: readonly Partial<Link>[]): Promise<void> {
    await this.manager.insert(Link, [...links]);
  }

  async removeLink(id: string): Promise<void> {
    await this.manager.delete(Link, { id });
  }

  report(key: string): Promise<StageReport | null> {
    return this.manager.findOneBy(StageReport, { key });
  }

  lastReport(stageId: string, kind: StageReport['kind']): Promise<StageReport | null> {
    return this.manager.findOne(StageReport, { where: { stageId, kind }, order: { at: 'DESC' } });
  }

  async addReport(report: Partial<StageReport>): Promise<void> {
    await this.manager.insert(StageReport, report);
  }

  /** Writes who works on a stage and in which bays, in place of what was known. */
  async setHands(stageId: string, makerIds: readonly string[], bayIds: readonly string[]): Promise<void> {
    await this.manager.delete(StageMaker, { stageId });
    await this.manager.delete(StageBay, { stageId });
    await this.manager.insert(
      StageMaker,
      makerIds.map((makerId) => ({ stageId, makerId })),
    );
    await this.manager.insert(
      StageBay,
      bayIds.map((bayId, position) => ({ stageId, position, bayId })),
    );
  }

  makersOn(stageId: string): Promise<string[]> {
    return this.manager.findBy(StageMaker, { stageId }).then((rows) => rows.map((row) => row.makerId));
  }
}
