import { LessThan, type EntityManager } from 'typeorm';
import { AuditEntry, Closure, Studio } from '@database/entities';

/** The studio's own row, its closures and its audit trail, through one manager. */
export class StudioRepository {
  constructor(private readonly manager: EntityManager) {}

  studio(): Promise<Studio> {
    return this.manager.findOneOrFail(Studio, { where: { single: true } });
  }

  async saveStudio(studio: Studio): Promise<void> {
    await this.manager.save(Studio, studio);
  }

  async closures(): Promise<Closure[]> {
    const closures = await this.manager.find(Closure);
    return closures.sort((a, b) => a.days.from.localeCompare(b.days.from) || a.id.localeCompare(b.id));
  }

  closure(id: string): Promise<Closure | null> {
    return this.manager.findOneBy(Closure, { id });
  }

  async saveClosure(closure: Closure): Promise<void> {
    await this.manager.save(Closure, closure);
  }

  async removeClosure(id: string): Promise<void> {
    await this.manager.delete(Closure, { id });
  }

  /** Lines of the audit trail, newest first: of one record or all, before an instant or up to now. */
  audit(of: { readonly subjectId?: string; readonly before?: Date; readonly limit: number }): Promise<AuditEntry[]> {
    return this.manager.find(AuditEntry, {
      where: { ...(of.subjectId && { subjectId: of.subjectId }), ...(of.before && { at: LessThan(of.before) }) },
      order: { at: 'DESC', id: 'DESC' },
      take: of.limit,
    });
  }
}
