import { setTimeout as pause } from 'node:timers/promises';
import type { DataSource, EntityManager } from 'typeorm';
import type { Log } from '../http/log';
import type { Actor } from '../session/actor';
import { isTransient } from './database-problem';
import { Unit } from './unit';

const ATTEMPTS = 6;
const FIRST_PAUSE_MS = 8;

/**
 * Units of work. Every write is one serializable transaction, tried again as a whole, a bounded number of times, when others got in
 * its way; so a unit may run more than once, and must do nothing outside of the database.
 */
export class Transactions {
  constructor(
    private readonly dataSource: DataSource,
    private readonly log: Log,
    /** The present instant. */
    readonly clock: () => Date,
  ) {}

  /** Runs a unit that changes something on behalf of `actor` (null: the server itself). */
  async write<T>(actor: Actor | null, work: (unit: Unit) => Promise<T>): Promise<T> {
    for (let attempt = 1; ; attempt += 1) {
      try {
        return await this.dataSource.transaction('SERIALIZABLE', (manager) =>
          work(new Unit(manager, actor, this.clock())),
        );
      } catch (error) {
        if (!isTransient(error) || attempt === ATTEMPTS) throw error;
        this.log.debug({ attempt }, 'a transaction got into the way of another; trying again');
        // Chance keeps two that collided from colliding again.
        await pause(FIRST_PAUSE_MS * 2 ** attempt * (0.5 + Math.random() / 2));
      }
    }
  }

  /** Reads at one instant: whatever is read inside belongs together. */
  read<T>(work: (manager: EntityManager) => Promise<T>): Promise<T> {
    return this.dataSource.transaction('REPEATABLE READ', async (manager) => {
      await manager.query('set transaction read only');
      return work(manager);
    });
  }
}
