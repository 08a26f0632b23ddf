import 'reflect-metadata';
import { types } from 'pg';
import { DataSource } from 'typeorm';
import { entities } from './entities';
import { migrations } from './migrations';
import { Naming } from './naming';

const DATE: number = 1082;
const DATE_ARRAY: number = 1182;

// A calendar day is not an instant: leave it as the text that it is, in whatever zone this process runs.
types.setTypeParser(DATE, (text) => text);
types.setTypeParser(DATE_ARRAY, (text) => (text === '{}' ? [] : text.slice(1, -1).split(',')));

/** How many connections one process holds at most, beside those of sessions and of live events. */
const POOL_SIZE = 12;

/** The database behind `url`, not yet connected. Its shape comes from migrations alone. */
export function createDataSource(url: string): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities: [...entities],
    migrations: [...migrations],
    migrationsTableName: 'migration',
    migrationsTransactionMode: 'each',
    synchronize: false,
    installExtensions: false,
    namingStrategy: new Naming(),
    poolSize: POOL_SIZE,
    applicationName: 'fettle',
    extra: { options: '-c timezone=UTC' },
  });
}
