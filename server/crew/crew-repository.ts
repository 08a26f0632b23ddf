import type { EntityManager } from 'typeorm';
import type { MakerCraft as MakerCraftInput, Pattern } from '@common/contract';
import type { z } from 'zod';
import { Craft, Leave, Maker, MakerCraft, MakerPattern } from '@database/entities';

const WITH_ALL = { crafts: true, patterns: true } as const;

/** Crafts, makers and leave, through one manager. */
export class CrewRepository {
  constructor(private readonly manager: EntityManager) {}

  crafts(): Promise<Craft[]> {
    return this.manager.find(Craft, { order: { name: 'ASC', id: 'ASC' } });
  }

  craft(id: string): Promise<Craft | null> {
    return this.manager.findOneBy(Craft, { id });
  }

  async addCraft(craft: Craft): Promise<void> {
    await this.manager.insert(Craft, craft);
  }

  async removeCraft(id: string): Promise<void> {
    await this.manager.delete(Craft, { id });
  }

  makers(): Promise<Maker[]> {
    return this.manager.find(Maker, {
      relations: WITH_ALL,
      relationLoadStrategy: 'query',
      order: { name: 'ASC', id: 'ASC' },
    });
  }

  maker(id: string): Promise<Maker | null> {
    return this.manager.findOne(Maker, { where: { id }, relations: WITH_ALL, relationLoadStrategy: 'query' });
  }

  /** Writes a maker's own row, and in its place whichever of crafts and patterns is given. */
  async saveMaker(
    maker: Maker,
    parts: { readonly crafts?: readonly z.output<typeof MakerCraftInput>[]; readonly patterns?: readonly Pattern[] },
  ): Promise<void> {
    const { crafts: _crafts, patterns: _patterns, leave: _leave, ...row } = maker;
    await this.manager.upsert(Maker, row, ['id']);
    if (parts.crafts) {
      await this.manager.delete(MakerCraft, { makerId: maker.id });
      await this.manager.insert(
        MakerCraft,
        parts.crafts.map((craft) => ({ ...craft, makerId: maker.id })),
      );
    }
    if (parts.patterns) {
      await this.manager.delete(MakerPattern, { makerId: maker.id });
      const rows = parts.patterns.map((pattern, position) => ({ ...pattern, makerId: maker.id, position }));
      await this.manager.insert(MakerPattern, rows);
    }
  }

  async leave(makerId?: string): Promise<Leave[]> {
    const leave = await this.manager.find(Leave, { where: makerId ? { makerId } : {} });
    return leave.sort((a, b) => a.days.from.localeCompare(b.days.from) || a.id.localeCompare(b.id));
  }

  leaveById(id: string): Promise<Leave | null> {
    return this.manager.findOne(Leave, { where: { id }, relations: { maker: true } });
  }

  async addLeave(leave: Leave): Promise<void> {
    await this.manager.insert(Leave, leave);
  }

  async removeLeave(id: string): Promise<void> {
    await this.manager.delete(Leave, { id });
  }
}
