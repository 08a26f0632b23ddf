import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { Studio, WorkingRevision, type LayoutValue } from '@database/entities';
import type { Unit } from '../storage/unit';

/** A revision before it is stored. */
export interface NewRevision {
  readonly parentId: string | null;
  readonly label: string;
  readonly layout: LayoutValue;
  readonly fingerprint: string;
  readonly plannedFrom: number;
}

/** The working plan's history and its head, through one manager. */
export class RevisionRepository {
  constructor(private readonly manager: EntityManager) {}

  byId(id: string): Promise<WorkingRevision | null> {
    return this.manager.findOne(WorkingRevision, { where: { id }, relations: { changer: true } });
  }

  /** Where redo leads: the child that was laid out last; null at the newest end. */
  newestChild(id: string): Promise<WorkingRevision | null> {
    return this.manager.findOne(WorkingRevision, { where: { parentId: id }, order: { seq: 'DESC' } });
  }

  /** Stores a revision and lets the studio stand at it. Returns the working plan's new count. */
  async add(unit: Unit, studio: Studio, revision: NewRevision): Promise<number> {
    const seq = ((await this.manager.maximum(WorkingRevision, 'seq')) ?? 0) + 1;
    const id = randomUUID();
    await this.manager.insert(WorkingRevision, {
      ...revision,
      id,
      seq,
      changedBy: unit.actor?.accountId ?? null,
      changedAt: unit.at,
    });
    return this.standAt(unit, studio, id);
  }

  /** Lets the studio stand at a stored revision and tells open pages. Returns the working plan's new count. */
  async standAt(unit: Unit, studio: Studio, id: string): Promise<number> {
    studio.headRevisionId = id;
    studio.planRevision += 1;
    await this.manager.update(Studio, { id: studio.id }, { headRevisionId: id, planRevision: studio.planRevision });
    await unit.announce({ kind: 'plan-revised', revision: studio.planRevision });
    return studio.planRevision;
  }
}
