import { freePort } from '@database/cluster/free-port';
import { readAddress } from '../../server/launch/address';
import { buildApplication } from '../../server/launch/build-application';
import { startBuiltServer, type ServerProcess } from '../../server/launch/server-process';
import { withDemoDatabase, type TestDatabase } from './test-database';

/** The built application as `npm start` serves it. */
export interface RunningStudio {
  /** Known once the file's `beforeAll` has run, without a slash at its end. */
  readonly url: string;
  readonly database: TestDatabase;
}

// The client may have to be built first, when the file is run by itself.
const SET_UP_MS = 7 * 60_000;

/** Serves the built application, with the demo studio in a database of its own, for the length of a file or a `describe`. */
export function withRunningStudio(): RunningStudio {
  let running: { readonly url: string; readonly server: ServerProcess } | undefined;
  // Jest ends things in the order of their mention: first the server, then the database under it.
  afterAll(async () => {
    await running?.server.stop();
  });
  const database = withDemoDatabase();
  beforeAll(async () => {
    await buildApplication();
    const { url, host, port } = readAddress({ PORT: String(await freePort()) });
    const server = await startBuiltServer(url, {
      HOST: host,
      PORT: String(port),
      DATABASE_URL: database.url,
      SESSION_SECRET: 'known to everybody, and good for tests alone',
      LOG_LEVEL: 'warn',
      NODE_ENV: 'production',
    });
    running = { url, server };
  }, SET_UP_MS);
  return {
    database,
    get url() {
      if (running === undefined) throw new Error('The studio runs only inside tests and hooks.');
      return running.url;
    },
  };
}
