import { Client, escapeIdentifier, escapeLiteral } from 'pg';
import { LOOPBACK } from './free-port';
import { SUPERUSER } from './make-cluster';

/** The role and the database that the application uses; it owns the database and nothing else. */
export const APPLICATION = 'fettle';

/** Where a server listens and the password of its roles. */
export interface Access {
  readonly port: number;
  readonly password: string;
}

/** The connection URL of one role and database. */
export function databaseUrl({ port, password }: Access, role: string, database: string): string {
  return `postgres://${role}:${encodeURIComponent(password)}@${LOOPBACK}:${String(port)}/${database}`;
}

/**
 * Makes the application's role and database where they are missing and answers with its URL. In a throw-away cluster
 * the role may make further databases, one for each test file.
 */
export async function ensureApplicationDatabase(access: Access, mayCreateDatabases: 'CREATEDB' | 'NOCREATEDB') {
  const client = new Client({ connectionString: databaseUrl(access, SUPERUSER, 'postgres') });
  await client.connect();
  try {
    const role = escapeIdentifier(APPLICATION);
    const roles = await client.query('select 1 from pg_roles where rolname = $1', [APPLICATION]);
    const verb = roles.rowCount === 0 ? 'create' : 'alter';
    await client.query(`${verb} role ${role} login ${mayCreateDatabases} password ${escapeLiteral(access.password)}`);
    const databases = await client.query('select 1 from pg_database where datname = $1', [APPLICATION]);
    if (databases.rowCount === 0) await client.query(`create database ${role} owner ${role}`);
    return databaseUrl(access, APPLICATION, APPLICATION);
  } finally {
    await client.end();
  }
}
