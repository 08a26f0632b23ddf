import { In, type EntityManager } from 'typeorm';
import { Bay, IssuedEntry, IssuedPlan, IssuedShift, Link, Maker, Stage, Studio } from '@database/entities';

/** What a day sheet is made from, through one manager. */
export class DaySheetRepository {
  constructor(private readonly manager: EntityManager) {}

  async zone(): Promise<string> {
    return (await this.manager.findOneOrFail(Studio, { where: { single: true } })).zone;
  }

  maker(id: string): Promise<Maker | null> {
    return this.manager.findOneBy(Maker, { id });
  }

  newestPlan(): Promise<IssuedPlan | null> {
    return this.manager.findOne(IssuedPlan, { where: {}, order: { number: 'DESC' } });
  }

  /** A maker's issued work that touches a span of instants, in its order. */
  shifts(planNumber: number, makerId: string, from: Date, until: Date): Promise<IssuedShift[]> {
    return this.manager
      .createQueryBuilder(IssuedShift, 'shift')
      .where('shift.planNumber = :planNumber and shift.makerId = :makerId', { planNumber, makerId })
      .andWhere('shift.during && tstzrange(:from, :until)', { from, until })
      .orderBy('lower(shift.during)')
      .getMany();
  }

  /** The plan's entries whose dwell runs during a span of instants. */
  dwelling(planNumber: number, from: Date, until: Date): Promise<IssuedEntry[]> {
    return this.manager
      .createQueryBuilder(IssuedEntry, 'entry')
      .where('entry.planNumber = :planNumber', { planNumber })
      .andWhere('entry.dwellEndsAt > entry.endsAt and entry.endsAt < :until and entry.dwellEndsAt > :from', {
        from,
        until,
      })
      .orderBy('entry.dwellEndsAt')
      .getMany();
  }

  entries(planNumber: number, stageIds: readonly string[]): Promise<IssuedEntry[]> {
    return this.manager.findBy(IssuedEntry, { planNumber, stageId: In(stageIds) });
  }

  /** Stages by id with their pieces and productions, removed ones too: what is issued stands until the next issue. */
  async stages(ids: readonly string[]): Promise<ReadonlyMap<string, Stage>> {
    const stages = await this.manager.find(Stage, {
      where: { id: In(ids) },
      relations: { piece: { production: true } },
      withDeleted: true,
    });
    return new Map(stages.map((stage) => [stage.id, stage]));
  }

  followersOf(stageIds: readonly string[]): Promise<Link[]> {
    return this.manager.findBy(Link, { fromStageId: In(stageIds) });
  }

  async names(): Promise<{ readonly makers: ReadonlyMap<string, string>; readonly bays: ReadonlyMap<string, string> }> {
    const makers = await this.manager.find(Maker, { select: { id: true, name: true } });
    const bays = await this.manager.find(Bay, { select: { id: true, name: true } });
    return {
      makers: new Map(makers.map(({ id, name }) => [id, name])),
      bays: new Map(bays.map(({ id, name }) => [id, name])),
    };
  }
}
