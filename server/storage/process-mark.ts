import { randomInt } from 'node:crypto';
import type { Client } from 'pg';
import type { EntityManager } from 'typeorm';

/** The first half of the lock's name; any number that nothing else uses. */
const LOCK_SPACE = 4_073_502;
const MOST = 2_147_483_647;

/**
 * A number by which this process signs what it works on, and a lock on that number for as long as the process has its connection:
 * so another process can tell work under way from work that somebody's end left behind, without waiting for any clock.
 */
export class ProcessMark {
  readonly number = randomInt(1, MOST);

  /** Takes the lock on a connection of its own; shared, so that a connection made anew need not wait for the old one's end. */
  async holdOn(client: Client): Promise<void> {
    await client.query('select pg_advisory_lock_shared($1, $2)', [LOCK_SPACE, this.number]);
  }

  /** Whether the process with that number is there. To be asked inside a transaction. */
  static async isAlive(manager: EntityManager, number: number): Promise<boolean> {
    const rows: { free: boolean }[] = await manager.query('select pg_try_advisory_xact_lock($1, $2) as free', [
      LOCK_SPACE,
      number,
    ]);
    return !rows[0].free;
  }
}
