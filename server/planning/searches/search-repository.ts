import { In, type EntityManager } from 'typeorm';
import { PlanSearch } from '@database/entities';
import { ProcessMark } from '../../storage/process-mark';

const UNDER_WAY = ['waiting', 'running'] as const;

/** Searches about the working plan, through one manager. */
export class SearchRepository {
  constructor(private readonly manager: EntityManager) {}

  byId(id: string): Promise<PlanSearch | null> {
    return this.manager.findOneBy(PlanSearch, { id });
  }

  underWay(): Promise<PlanSearch[]> {
    return this.manager.findBy(PlanSearch, { state: In(UNDER_WAY) });
  }

  /** The newest of each production that was found for it. */
  async newestOfProductions(): Promise<ReadonlyMap<string, PlanSearch>> {
    const found = await this.manager.find(PlanSearch, { where: { state: 'found' }, order: { startedAt: 'ASC' } });
    return new Map(found.flatMap((search) => (search.productionId === null ? [] : [[search.productionId, search]])));
  }

  async save(search: PlanSearch): Promise<void> {
    const { base: _base, starter: _starter, keyDate: _keyDate, production: _production, ...row } = search;
    await this.manager.upsert(PlanSearch, row, ['id']);
  }

  /** Whether the process that works on it is there. To be asked inside a transaction. */
  isWorkedOn({ workedBy }: PlanSearch): Promise<boolean> {
    return workedBy === null ? Promise.resolve(false) : ProcessMark.isAlive(this.manager, workedBy);
  }
}

/** Whether a search waits or runs. */
export function isSearching({ state }: PlanSearch): boolean {
  return state === 'waiting' || state === 'running';
}
