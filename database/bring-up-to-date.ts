import type { DataSource } from 'typeorm';

/** Any number that nothing else locks: two servers that start together take turns. */
const MIGRATION_LOCK = 4_073_501;

/** Runs the migrations that a connected database lacks, in order, while no other process does. Returns their names. */
export async function bringUpToDate(dataSource: DataSource): Promise<readonly string[]> {
  const lock = dataSource.createQueryRunner();
  await lock.connect();
  try {
    await lock.query('select pg_advisory_lock($1)', [MIGRATION_LOCK]);
    const done = await dataSource.runMigrations();
    return done.map((migration) => migration.name);
  } finally {
    await lock.query('select pg_advisory_unlock($1)', [MIGRATION_LOCK]);
    await lock.release();
  }
}
