import { bringUpToDate } from './bring-up-to-date';
import { createDataSource } from './data-source';

/** Brings the database at DATABASE_URL to the present schema and says on stdout what was done. */
async function migrate(): Promise<void> {
  const url = process.env['DATABASE_URL'];
  if (!url) throw new Error('DATABASE_URL is not set: name the database to migrate.');
  const dataSource = await createDataSource(url).initialize();
  try {
    const names = await bringUpToDate(dataSource);
    for (const name of names) process.stdout.write(`Migrated: ${name}\n`);
  } finally {
    await dataSource.destroy();
  }
}

migrate().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exitCode = 1;
});
