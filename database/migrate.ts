import { bringUpToDate } from './bring-up-to-date';
import { createDataSource } from './data-source';
import { seedDemo, seedLibrary } from './demo/seed';

/**
 * Brings the database at DATABASE_URL to the present schema. With `--with-demo` it fills an empty one with the demo studio and
 * says on stdout who can sign in; with `--with-library` it enters crafts, materials and recipes alone.
 */
async function migrate(): Promise<void> {
  const url = process.env['DATABASE_URL'];
  if (!url) throw new Error('DATABASE_URL is not set: name the database to migrate.');
  const dataSource = await createDataSource(url).initialize();
  try {
    await bringUpToDate(dataSource);
    if (process.argv.includes('--with-demo')) {
      for (const line of await seedDemo(dataSource, new Date())) process.stdout.write(`${line}\n`);
    }
    if (process.argv.includes('--with-library')) await seedLibrary(dataSource);
  } finally {
    await dataSource.destroy();
  }
}

migrate().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exitCode = 1;
});
