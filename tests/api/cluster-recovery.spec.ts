import {
  chmodSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { openProjectCluster, openThrowAwayCluster, type Cluster } from '@database/cluster/cluster';
import { runningPostmaster } from '@database/cluster/postmaster';
import { Client } from 'pg';

const SLOW_MS = 60_000;

describe('a project’s own cluster', () => {
  let project: string;
  let cluster: Cluster | undefined;
  const dataFolder = () => join(project, '.fettle');
  const data = () => join(dataFolder(), 'cluster', 'data');
  const open = async () => (cluster = await openProjectCluster(dataFolder()));
  beforeEach(() => {
    project = mkdtempSync(join(tmpdir(), 'fettle cluster '));
    chmodSync(project, 0o755);
  });
  afterEach(async () => {
    await cluster?.stop();
    rmSync(project, { recursive: true });
  }, SLOW_MS);

  it(
    'keeps what is committed when its server is killed, and starts again',
    async () => {
      const { url } = await open();
      await query(url, 'create table kept (what text)');
      await query(url, `insert into kept values ('plaster')`);
      kill(data());
      const again = await open();
      expect(await query(again.url, 'select what from kept')).toEqual([{ what: 'plaster' }]);
    },
    SLOW_MS,
  );

  it(
    'starts over a lock file whose number is now another program’s',
    async () => {
      await (await open()).stop();
      writeFileSync(join(data(), 'postmaster.pid'), `${String(process.pid)}\n${data()}\n1\n5432\n\n127.0.0.1\n`);
      const { url } = await open();
      expect(await query(url, 'select 1 as one')).toEqual([{ one: 1 }]);
    },
    SLOW_MS,
  );

  it(
    'takes over a server that a killed launcher left running',
    async () => {
      const first = await open();
      const before = runningPostmaster(data());
      const second = await open();
      expect(second.url).toBe(first.url);
      expect(runningPostmaster(data())).toEqual(before);
      await second.stop();
      await first.stop();
      expect(runningPostmaster(data())).toBeUndefined();
    },
    SLOW_MS,
  );

  it(
    'makes a whole cluster where the making was interrupted, and sets a damaged one aside',
    async () => {
      await (await open()).stop();
      mkdirSync(join(dataFolder(), 'cluster', 'making-before', 'base'), { recursive: true });
      rmSync(join(data(), 'global', 'pg_control'));
      const { url } = await open();
      expect(await query(url, 'select 1 as one')).toEqual([{ one: 1 }]);
      const names = readdirSync(join(dataFolder(), 'cluster'));
      expect(names.filter((name) => name.startsWith('making'))).toEqual([]);
      expect(names.filter((name) => name.startsWith('data.damaged-'))).toHaveLength(1);
    },
    SLOW_MS,
  );

  it(
    'lets nobody in without the password, and listens on loopback alone',
    async () => {
      const { url } = await open();
      const guess = new URL(url);
      guess.password = 'guess';
      await expect(query(guess.toString(), 'select 1')).rejects.toMatchObject({ code: '28P01' });
      expect(await query(url, 'show listen_addresses')).toEqual([{ listen_addresses: '127.0.0.1' }]);
      expect(await query(url, 'select rolsuper from pg_roles where rolname = current_user')).toEqual([
        { rolsuper: false },
      ]);
    },
    SLOW_MS,
  );
});

describe('a throw-away cluster', () => {
  it(
    'is gone after its stop, and those of killed runs go with the next one',
    async () => {
      const left = await openThrowAwayCluster();
      const maker = join(left.path, 'made-by.json');
      writeFileSync(maker, JSON.stringify({ pid: process.pid, birth: 'another boot/1' }));
      const next = await openThrowAwayCluster();
      expect(existsSync(left.path)).toBe(false);
      await next.stop();
      expect(existsSync(next.path)).toBe(false);
    },
    SLOW_MS,
  );
});

async function query(url: string, sql: string): Promise<readonly unknown[]> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query<Record<string, unknown>>(sql)).rows;
  } finally {
    await client.end();
  }
}

function kill(dataFolder: string): void {
  process.kill(Number(readFileSync(join(dataFolder, 'postmaster.pid'), 'utf8').split('\n')[0]), 'SIGKILL');
}
