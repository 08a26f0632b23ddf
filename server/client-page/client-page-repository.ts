import { In, Not, type EntityManager } from 'typeorm';
import { IssuedEntry, Link, Production, type Stage } from '@database/entities';

/** What a client's page is made from, through one manager. */
export class ClientPageRepository {
  constructor(private readonly manager: EntityManager) {}

  /** The client's productions, but for those that came to nothing. */
  productionsOf(clientId: string): Promise<Production[]> {
    return this.manager.find(Production, {
      where: { clientId, state: Not('declined') },
      relations: { keyDates: { pieces: true }, pieces: { stages: true } },
      relationLoadStrategy: 'query',
      order: { createdAt: 'ASC', id: 'ASC' },
    });
  }

  /** The newest issued plan's entries of some stages. */
  async issuedEntries(stageIds: readonly string[]): Promise<IssuedEntry[]> {
    const newest = await this.manager.maximum(IssuedEntry, 'planNumber');
    if (newest === null) return [];
    return this.manager.findBy(IssuedEntry, { planNumber: newest, stageId: In(stageIds) });
  }

  linksTo(stageIds: readonly string[]): Promise<Link[]> {
    return this.manager.find(Link, { where: { toStageId: In(stageIds) }, relations: { fromStage: true } });
  }
}

/** Whether everything that a sign-off waits for is done. */
export function isOpen(signOff: Stage, links: readonly Link[], siblings: readonly Stage[]): boolean {
  const before = links.filter((link) => link.toStageId === signOff.id).map((link) => link.fromStage);
  // Without links a piece is made one stage after another.
  const waitedFor = before.length > 0 ? before : siblings.filter((stage) => stage.position < signOff.position);
  return waitedFor.every((stage) => stage.state === 'finished');
}
