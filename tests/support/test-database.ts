import { randomUUID } from 'node:crypto';
import { createDataSource } from '@database/data-source';
import { seedDemo } from '@database/demo/seed';
import { Client, escapeIdentifier } from 'pg';
import { type DataSource } from 'typeorm';
import { TEST_CLUSTER_URL } from './test-cluster';

/** A migrated database that one test file has to itself. */
export interface TestDatabase {
  /** Known once the file's `beforeAll` has run. */
  readonly url: string;
  readonly dataSource: DataSource;
}

/** What a database is copied from: made once a run, by whichever test file needs it first. */
interface Template {
  readonly name: string;
  /** Fills the migrated database that becomes the template. */
  readonly fill: (dataSource: DataSource) => Promise<unknown>;
}

const EMPTY: Template = { name: 'fettle_template_empty', fill: () => Promise.resolve() };
const DEMO: Template = { name: 'fettle_template_demo', fill: (dataSource) => seedDemo(dataSource, new Date()) };

const SET_UP_MS = 120_000;
// Any number, the same in every test process: one of them makes a template while the others wait.
const TEMPLATE_LOCK = 4300;

/**
 * Gives a test file an empty, migrated database and drops it at the end. Call it at the top of the file or of a
 * `describe`; read it inside the tests.
 */
export function withDatabase(): TestDatabase {
  return copied(EMPTY);
}

/** The same, with the demo studio in it, as it stands today. */
export function withDemoDatabase(): TestDatabase {
  return copied(DEMO);
}

function copied(template: Template): TestDatabase {
  const name = `test_${randomUUID().replaceAll('-', '')}`;
  const url = urlOf(name);
  let dataSource: DataSource | undefined;
  beforeAll(async () => {
    await copyTemplate(template, name);
    dataSource = await createDataSource(url).initialize();
  }, SET_UP_MS);
  afterAll(async () => {
    // Jest must end even if the set-up failed half-way.
    if (dataSource?.isInitialized === true) await dataSource.destroy();
    await onServer((client) => client.query(`drop database if exists ${escapeIdentifier(name)} with (force)`));
  }, SET_UP_MS);
  return {
    url,
    get dataSource() {
      if (dataSource === undefined) throw new Error('The database is there only inside tests and hooks.');
      return dataSource;
    },
  };
}

async function copyTemplate(template: Template, name: string): Promise<void> {
  await onServer(async (client) => {
    await client.query('select pg_advisory_lock($1)', [TEMPLATE_LOCK]);
    const found = await client.query('select 1 from pg_database where datname = $1', [template.name]);
    if (found.rowCount === 0) await makeTemplate(client, template);
    await client.query(`create database ${escapeIdentifier(name)} template ${escapeIdentifier(template.name)}`);
  });
}

async function makeTemplate(client: Client, { name, fill }: Template): Promise<void> {
  const making = `${name}_making`;
  await client.query(`drop database if exists ${making} with (force)`);
  await client.query(`create database ${making}`);
  const dataSource = await createDataSource(urlOf(making)).initialize();
  try {
    await dataSource.runMigrations();
    await fill(dataSource);
  } finally {
    await dataSource.destroy();
  }
  await client.query(`alter database ${making} rename to ${name}`);
}

/** Runs work on the server's own database; closing the session gives back the lock. */
async function onServer<T>(work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: clusterUrl() });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

function clusterUrl(): string {
  const url = process.env[TEST_CLUSTER_URL];
  if (url === undefined) throw new Error('Run this file in the Jest project api or browser, which start PostgreSQL.');
  return url;
}

function urlOf(database: string): string {
  const url = new URL(clusterUrl());
  url.pathname = `/${database}`;
  return url.toString();
}
