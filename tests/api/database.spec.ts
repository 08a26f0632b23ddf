import { randomUUID } from 'node:crypto';
import { migrations } from '@database/migrations';
import {
  Bay,
  Craft,
  IssuedOccupancy,
  IssuedPlan,
  IssuedShift,
  Leave,
  Maker,
  Piece,
  Production,
  Client,
  Stage,
  WorkingRevision,
} from '@database/entities';
import { createLog } from '../../server/http/log';
import { Transactions } from '../../server/storage/transactions';
import { withDatabase } from '../support/test-database';

// Error codes: PostgreSQL 15 manual, appendix A.
const EXCLUSION = '23P01';
const CHECK = '23514';
const FOREIGN_KEY = '23503';
const UNIQUE = '23505';

/** The code of the error that a statement fails with, or what it came to. */
async function codeOf(statement: Promise<unknown>): Promise<string> {
  try {
    await statement;
    return 'none';
  } catch (error) {
    return (error as { driverError: { code: string } }).driverError.code;
  }
}

describe('the database', () => {
  const database = withDatabase();
  const ids = {
    plan: 1,
    maker: randomUUID(),
    craft: randomUUID(),
    bay: randomUUID(),
    stage: randomUUID(),
    piece: randomUUID(),
  };
  beforeAll(async () => {
    const { manager } = database.dataSource;
    const client = randomUUID();
    const production = randomUUID();
    const revision = randomUUID();
    await manager.insert(Client, { id: client, name: 'C' });
    await manager.insert(Craft, { id: ids.craft, key: 'carving', name: 'Carving' });
    await manager.insert(Maker, { id: ids.maker, name: 'M', initials: 'M', hourCostMinor: 1 });
    await manager.insert(Bay, { id: ids.bay, name: 'B', kind: 'booth', capacity: 2 });
    await manager.insert(Production, {
      id: production,
      clientId: client,
      name: 'P',
      mark: 'Pp',
      hue: 0,
      state: 'committed',
    });
    await manager.insert(Piece, { id: ids.piece, productionId: production, name: 'Q', position: 0 });
    const minutes = { lowMinutes: 1, likelyMinutes: 2, highMinutes: 3, crewLossPermille: 0 };
    await manager.insert(Stage, {
      id: ids.stage,
      pieceId: ids.piece,
      position: 0,
      name: 'S',
      kind: 'make',
      continuity: 'free',
      ...minutes,
    });
    const layout = { plan: { placements: [] }, pins: {} };
    await manager.insert(WorkingRevision, {
      id: revision,
      seq: 1,
      label: 'L',
      layout,
      fingerprint: 'f',
      plannedFrom: 0,
      changedAt: new Date(),
    });
    for (const number of [1, 2]) {
      await manager.insert(IssuedPlan, {
        number,
        revisionId: revision,
        issuedAt: new Date(),
        fingerprint: 'f',
        changes: 0,
      });
    }
  });

  it('has the shape that the entities say, and gets there and back by migrations', async () => {
    const drift = async () =>
      (await database.dataSource.driver.createSchemaBuilder().log()).upQueries.map(({ query }) => query);
    expect(await drift()).toEqual([]);
    const applied = await database.dataSource.query('select name from migration order by id');
    expect(applied).toEqual(migrations.map((migration) => ({ name: new migration().name })));
  });

  const shift = (start: number, end: number, planNumber = ids.plan) =>
    database.dataSource.manager.insert(IssuedShift, {
      id: randomUUID(),
      planNumber,
      makerId: ids.maker,
      stageId: ids.stage,
      craftId: ids.craft,
      during: { start, end },
    });

  it('keeps a maker from being at two places at once in one plan', async () => {
    await shift(1000, 1060);
    expect(await codeOf(shift(1059, 1100))).toBe(EXCLUSION);
    expect(await codeOf(shift(1000, 1060))).toBe(EXCLUSION);
    // Half-open: one ends as the next begins. Another plan is another world.
    expect(await codeOf(shift(1060, 1100))).toBe('none');
    expect(await codeOf(shift(1000, 1060, 2))).toBe('none');
    expect(await codeOf(shift(2000, 2000))).toBe(CHECK);
  });

  const occupancy = (slot: number, start: number, end: number, capacity = 2) =>
    database.dataSource.manager.insert(IssuedOccupancy, {
      id: randomUUID(),
      planNumber: ids.plan,
      bayId: ids.bay,
      stageId: ids.stage,
      slot,
      capacity,
      during: { start, end },
    });

  it('keeps a bay from holding more than it can', async () => {
    await occupancy(0, 1000, 2000);
    expect(await codeOf(occupancy(0, 1999, 2100))).toBe(EXCLUSION);
    expect(await codeOf(occupancy(1, 1500, 1800))).toBe('none');
    expect(await codeOf(occupancy(2, 1500, 1800))).toBe(CHECK);
    expect(await codeOf(occupancy(0, 2000, 2100))).toBe('none');
  });

  it('keeps leave of one maker from overlapping', async () => {
    const leave = (from: string, until: string) =>
      database.dataSource.manager.insert(Leave, { id: randomUUID(), makerId: ids.maker, days: { from, until } });
    await leave('2026-03-01', '2026-03-08');
    expect(await codeOf(leave('2026-03-07', '2026-03-09'))).toBe(EXCLUSION);
    expect(await codeOf(leave('2026-03-08', '2026-03-09'))).toBe('none');
    const [stored] = await database.dataSource.manager.find(Leave, { order: { id: 'ASC' } });
    expect(stored.days.from).toMatch(/^2026-03-0\d$/);
  });

  it.each([
    ['a stage that takes less than none', `update stage set low_minutes = -1`, CHECK],
    ['high hours below likely ones', `update stage set high_minutes = 1`, CHECK],
    ['a stage begun at no time', `update stage set state = 'started'`, CHECK],
    ['a decision on what is no sign-off', `update stage set decision = 'approved'`, CHECK],
    ['a bay of no room', `update bay set capacity = 0`, CHECK],
    ['a piece of no production', `update piece set production_id = gen_random_uuid()`, FOREIGN_KEY],
    ['a craft that goes while it is in use', `delete from craft`, FOREIGN_KEY],
    ['a maker who goes while at work', `delete from maker`, FOREIGN_KEY],
    [
      'a second studio',
      `insert into studio (id, name, zone, currency, settings, forecast, rescue) select gen_random_uuid(), name, zone, currency, settings, forecast, rescue from studio`,
      UNIQUE,
    ],
    [
      'an account of a client that names none',
      `insert into account (id, name, email, role) values (gen_random_uuid(), 'a', 'a@b', 'client')`,
      CHECK,
    ],
  ])('refuses %s', async (_what, statement, code) => {
    expect(await codeOf(database.dataSource.query(statement))).toBe(code);
  });

  it('takes an e-mail address once, whatever its case', async () => {
    const add = (email: string) =>
      database.dataSource.query(
        `insert into account (id, name, email, role) values (gen_random_uuid(), 'a', $1, 'manager')`,
        [email],
      );
    await add('Ada@Studio.test');
    expect(await codeOf(add('ada@studio.TEST'))).toBe(UNIQUE);
  });
});

describe('a unit of work', () => {
  const database = withDatabase();
  const transactions = () => new Transactions(database.dataSource, createLog('silent'), () => new Date());
  const bay = async (name: string) => {
    const id = randomUUID();
    await database.dataSource.manager.insert(Bay, { id, name, kind: 'booth', capacity: 1 });
    return id;
  };

  it('is tried again as a whole when others got in its way (40001)', async () => {
    const id = await bay('Counted');
    const raise = () =>
      transactions().write(null, async ({ manager }) => {
        const found = await manager.findOneByOrFail(Bay, { id });
        await manager.update(Bay, { id }, { version: found.version + 1 });
      });
    await Promise.all([raise(), raise(), raise(), raise()]);
    // A lost update would leave a smaller count.
    expect((await database.dataSource.manager.findOneByOrFail(Bay, { id })).version).toBe(5);
  });

  it('gives up after a bounded number of tries, with the error that it met', async () => {
    let tries = 0;
    const failing = transactions().write(null, async ({ manager }) => {
      tries += 1;
      await manager.query(`do $$ begin raise exception 'in the way' using errcode = '40001'; end $$`);
    });
    await expect(failing).rejects.toMatchObject({ driverError: { code: '40001' } });
    expect(tries).toBe(6);
  });

  it('survives a deadlock (40P01): one gives way and is tried again', async () => {
    const [a, b] = [await bay('A'), await bay('B')];
    let met = 0;
    const touch = (first: string, second: string) =>
      transactions().write(null, async ({ manager }) => {
        await manager.query('select 1 from bay where id = $1 for update', [first]);
        met += 1;
        const until = Date.now() + 500;
        while (met < 2 && Date.now() < until) await new Promise((resolve) => setTimeout(resolve, 5));
        await manager.query('select 1 from bay where id = $1 for update', [second]);
        await manager.query('update bay set version = version + 1 where id = any($1)', [[first, second]]);
      });
    await Promise.all([touch(a, b), touch(b, a)]);
    const { version } = await database.dataSource.manager.findOneByOrFail(Bay, { id: a });
    expect(version).toBe(3);
  });

  it('does not try other errors again, and leaves nothing behind', async () => {
    let tries = 0;
    const failing = transactions().write(null, async (unit) => {
      tries += 1;
      await unit.record({ action: 'tried', subject: { kind: 'bay', id: null }, sentence: 'Tried.' });
      throw new Error('on purpose');
    });
    await expect(failing).rejects.toThrow('on purpose');
    expect(tries).toBe(1);
    expect(await database.dataSource.query('select 1 from audit_entry')).toEqual([]);
  });

  it('that only reads can not write', async () => {
    const writing = transactions().read((manager) => manager.query(`update bay set name = 'x'`));
    await expect(writing).rejects.toMatchObject({ driverError: { code: '25006' } });
  });
});
