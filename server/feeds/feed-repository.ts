import { In, Not, type EntityManager } from 'typeorm';
import type { FeedScope } from '@common/contract/feeds';
import {
  Bay,
  FeedState,
  FeedToken,
  IssuedEntry,
  IssuedPlan,
  KeyDate,
  Maker,
  type Piece,
  Production,
  Stage,
  Studio,
} from '@database/entities';
import { scopeKey } from './feed-event';
import type { IssuedNames, IssuedView } from './issued-view';

const NOTHING_ISSUED = { number: 0, atSeconds: 0, plan: { placements: [] } } as const;

/** Calendar addresses and what they show, read and written through one manager. */
export class FeedRepository {
  constructor(private readonly manager: EntityManager) {}

  /** An address by its secret's digest, with the account that it belongs to. */
  byDigest(digest: string): Promise<FeedToken | null> {
    return this.manager.findOne(FeedToken, {
      where: { tokenHash: Buffer.from(digest, 'hex') },
      relations: { account: true },
    });
  }

  /** All addresses of one account, newest first. */
  ofAccount(accountId: string): Promise<FeedToken[]> {
    return this.manager.find(FeedToken, { where: { accountId }, order: { createdAt: 'DESC', id: 'ASC' } });
  }

  byId(id: string, accountId: string): Promise<FeedToken | null> {
    return this.manager.findOneBy(FeedToken, { id, accountId });
  }

  async save(feed: FeedToken): Promise<void> {
    await this.manager.save(FeedToken, feed);
  }

  production(id: string): Promise<Production | null> {
    return this.manager.findOneBy(Production, { id });
  }

  maker(id: string): Promise<Maker | null> {
    return this.manager.findOneBy(Maker, { id });
  }

  studio(): Promise<Studio> {
    return this.manager.findOneOrFail(Studio, { where: { single: true } });
  }

  state(scope: FeedScope): Promise<FeedState | null> {
    return this.manager.findOneBy(FeedState, { scope: scopeKey(scope) });
  }

  async saveState(state: FeedState): Promise<void> {
    await this.manager.save(FeedState, state);
  }

  /** The plan that is in force, with today's names and key dates. */
  async issuedView(): Promise<IssuedView> {
    const [issued] = await this.manager.find(IssuedPlan, { order: { number: 'DESC' }, take: 1 });
    const entries = issued ? await this.manager.findBy(IssuedEntry, { planNumber: issued.number }) : [];
    const names = await this.#names(entries);
    if (!issued) {
      return { ...NOTHING_ISSUED, names };
    }
    const placements = entries.map(({ stageId, work, crew, bayIds, dwellEndsAt }) => ({
      stageId,
      work,
      crew,
      bayIds,
      dwellEnd: Math.floor(dwellEndsAt.getTime() / 60_000),
    }));
    return {
      number: issued.number,
      atSeconds: Math.floor(issued.issuedAt.getTime() / 1000),
      plan: { placements },
      names,
    };
  }

  async #names(entries: readonly IssuedEntry[]): Promise<IssuedNames> {
    // What was removed since the issue stays in it, and keeps its name.
    const stages = await this.manager.find(Stage, {
      where: { id: In(entries.map((entry) => entry.stageId)) },
      relations: { piece: true, dwellMaterial: true },
      withDeleted: true,
    });
    const pieces = new Map<string, Piece>(stages.map(({ piece }) => [piece.id, piece]));
    const [productions, keyDates, makers, bays] = await Promise.all([
      this.manager.find(Production, { select: { id: true, name: true, mark: true, state: true } }),
      this.manager.find(KeyDate, { where: { production: { state: Not<Production['state']>('declined') } } }),
      this.manager.find(Maker, { select: { id: true, name: true } }),
      this.manager.find(Bay, { select: { id: true, name: true } }),
    ]);
    return {
      productions,
      makers,
      bays,
      pieces: [...pieces.values()].map(({ id, name }) => ({ id, name })),
      stages: stages.map((stage) => ({
        id: stage.id,
        pieceId: stage.pieceId,
        productionId: pieces.get(stage.pieceId)?.productionId ?? '',
        name: stage.name,
        kind: stage.kind,
        nth: stage.nth,
        of: stage.repeats,
        materialName: stage.dwellMaterial?.name ?? null,
        milestone: stage.dwellMilestone,
        cautions: stage.cautions,
      })),
      keyDates: keyDates.map(({ id, productionId, kind, at, strength }) => ({
        id,
        productionId,
        kind,
        at: Math.floor(at.getTime() / 60_000),
        strength,
      })),
    };
  }
}
