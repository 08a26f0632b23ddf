import { randomUUID } from 'node:crypto';
import { check, type Plan, type Problem } from '@common/planning';
import { IssuedEntry, IssuedOccupancy, IssuedPlan, IssuedShift, LevelRun, WorkingRevision } from '@database/entities';
import { eventually, withStudio, type Visitor } from './studio';
import { addProduction, furnish, stageOf, type Workshop } from './workshop';

const ahead = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString();

describe('the working plan', () => {
  const studio = withStudio();
  let manager: Visitor;
  let shop: Workshop;
  const stageIds: string[] = [];
  const plan = async () => (await manager.get('/api/plan')).body;
  const placement = async (stageId: string) =>
    (await plan()).plan.placements.find((one: { stageId: string }) => one.stageId === stageId);
  const addStage = async (pieceId: string, name: string, more: object = {}) =>
    (await manager.post(`/api/pieces/${pieceId}/stages`, stageOf(shop.craftId, name, more))).body.id as string;
  /** Levels the plan as it is and takes what was found. */
  const levelAndTake = async () => {
    const { revision } = await plan();
    const run = (await manager.post('/api/plan/level', { revision, seconds: 0.3 })).body;
    await eventually(async () => (await manager.get(`/api/plan/level/${run.id}`)).body.state === 'found');
    return (await manager.post(`/api/plan/level/${run.id}/take`, { revision })).body.revision as number;
  };

  beforeAll(async () => {
    manager = await studio.as('manager');
    // The makers of these tests work at any hour.
    await (await studio.as('owner')).patch('/api/studio', { settings: { restBetweenMinutes: 0 }, version: 1 });
    shop = await furnish(manager);
  });

  it('is there from the start, empty', async () => {
    const first = await plan();
    expect(first).toMatchObject({ revision: 1, canUndo: false, canRedo: false, stale: false, issued: null, unmet: [] });
  });

  it('is laid out in the order of entry until somebody changes it', async () => {
    const date = { kind: 'delivery', at: ahead(20), strength: 'hard', weight: 10 };
    const { pieceId } = await addProduction(manager, shop.clientId, 'The Moon', [date]);
    const dwell = { materialId: null, milestone: null, minutes: 600, attendedMinutes: 0, window: null };
    const places = [{ bayIds: [shop.bayId], units: 1, hold: 'dwell', untilStageId: null }];
    for (const name of ['Prime', 'First coat', 'Second coat'])
      stageIds.push(await addStage(pieceId, name, { dwell, places }));
    const view = await plan();
    expect(view).toMatchObject({ label: 'Laid out in the order of entry', stale: false, canUndo: false });
    expect(view.plan.placements).toHaveLength(3);
    // What is shown has passed the checker: nothing is unmet, and the same check here says so too.
    expect(view.unmet).toEqual([]);
    expect(check(view.problem as Problem, view.plan as Plan)).toEqual([]);
    expect(view.directory.stages.map((stage: { name: string }) => stage.name)).toEqual([
      'Prime',
      'First coat',
      'Second coat',
    ]);
  });

  it('takes a move, pins it, lets what follows give way, and tells open pages', async () => {
    const before = await plan();
    const stream = await manager.listen();
    const was = await placement(stageIds[0]);
    const start = was.work[0].start + 300;
    const { status, body } = await manager.post('/api/plan/moves', {
      revision: before.revision,
      stageId: stageIds[0],
      start,
      makerIds: null,
      bayIds: null,
    });
    expect([status, body]).toEqual([200, { revision: before.revision + 1 }]);
    const after = await plan();
    expect(after).toMatchObject({
      label: 'Move “Moon: Prime”',
      canUndo: true,
      undoLabel: 'Move “Moon: Prime”',
      unmet: [],
      stale: false,
    });
    expect((await placement(stageIds[0])).work[0].start).toBe(start);
    expect((await placement(stageIds[1])).work[0].start).toBeGreaterThanOrEqual(
      (await placement(stageIds[0])).dwellEnd,
    );
    const pinned = after.problem.stages.find((stage: { id: string }) => stage.id === stageIds[0]);
    expect(pinned.pin).toEqual({ start, makerIds: null, bayIds: null });
    await eventually(() =>
      stream.events.some((event) => event['kind'] === 'plan-revised' && event['revision'] === after.revision),
    );
    stream.stop();
  });

  it('refuses a move of a plan that somebody else changed', async () => {
    const { revision } = await plan();
    const start = (await placement(stageIds[0])).work[0].start;
    const move = { revision: revision - 1, stageId: stageIds[0], start, makerIds: null, bayIds: null };
    const { status, body } = await manager.post('/api/plan/moves', move);
    expect([status, body.type, body.current.revision]).toEqual([409, '/problems/version-conflict', revision]);
  });

  it('lets one of several moves at once through', async () => {
    const { revision } = await plan();
    const { start } = (await placement(stageIds[0])).work[0];
    const answers = await Promise.all(
      [10, 20, 30].map((later) =>
        manager.post('/api/plan/moves', {
          revision,
          stageId: stageIds[0],
          start: start + later,
          makerIds: null,
          bayIds: null,
        }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    expect((await plan()).revision).toBe(revision + 1);
  });

  it.each([
    ['into the past', { start: 1_000_000 }, '/start'],
    ['beyond all planning', { start: 40_000_000 }, '/start'],
    ['to nobody', { makerIds: [randomUUID()] }, '/makerIds'],
    ['into no bay', { bayIds: [randomUUID()] }, '/bayIds'],
    ['nowhere', {}, ''],
    ['that is none', { stageId: randomUUID(), start: 30_000_000 }, '/stageId'],
  ])('refuses a move %s', async (_how, move, pointer) => {
    const { revision } = await plan();
    const whole = { revision, stageId: stageIds[0], start: null, makerIds: null, bayIds: null, ...move };
    const { status, body } = await manager.post('/api/plan/moves', whole);
    expect([status, body.errors?.[0].pointer]).toEqual([422, pointer]);
  });

  it('undoes and does again without end, and forgets nothing', async () => {
    const layouts: string[] = [];
    const remember = async () => layouts.push(JSON.stringify((await plan()).plan));
    await remember();
    for (let i = 1; i <= 5; i += 1) {
      const { revision } = await plan();
      const start = (await placement(stageIds[0])).work[0].start + 60;
      await manager.post('/api/plan/moves', { revision, stageId: stageIds[0], start, makerIds: null, bayIds: null });
      await remember();
    }
    for (let i = 4; i >= 0; i -= 1) {
      await manager.post('/api/plan/undo', { revision: (await plan()).revision });
      expect(JSON.stringify((await plan()).plan)).toBe(layouts[i]);
    }
    for (let i = 1; i <= 5; i += 1) {
      const { canRedo, redoLabel, revision } = await plan();
      expect([canRedo, redoLabel]).toEqual([true, 'Move “Moon: Prime”']);
      await manager.post('/api/plan/redo', { revision });
      expect(JSON.stringify((await plan()).plan)).toBe(layouts[i]);
    }
    const end = await manager.post('/api/plan/redo', { revision: (await plan()).revision });
    expect([end.status, end.body.detail]).toEqual([422, 'There is nothing to redo.']);
  });

  it('releases a pin', async () => {
    const { revision } = await plan();
    expect((await manager.post('/api/plan/releases', { revision, stageId: stageIds[0] })).status).toBe(200);
    const stage = (await plan()).problem.stages.find((one: { id: string }) => one.id === stageIds[0]);
    expect(stage.pin).toBeNull();
    const again = await manager.post('/api/plan/releases', { revision: revision + 1, stageId: stageIds[0] });
    expect(again.body.errors[0].pointer).toBe('/stageId');
  });

  it('is levelled in the background, shown as a comparison, and taken', async () => {
    const before = await plan();
    const stream = await manager.listen();
    const started = await manager.post('/api/plan/level', { revision: before.revision, seconds: 0.5, seed: 7 });
    expect([started.status, started.body.mode]).toEqual([202, 'dates']);
    const second = await manager.post('/api/plan/level', { revision: before.revision });
    expect([second.status, second.body.type]).toEqual([409, '/problems/level-running']);
    const early = await manager.get(`/api/plan/level/${started.body.id}/proposal`);
    expect(early.body.type).toBe('/problems/level-running');
    await eventually(async () => (await manager.get(`/api/plan/level/${started.body.id}`)).body.state === 'found');
    const proposal = (await manager.get(`/api/plan/level/${started.body.id}/proposal`)).body;
    expect(proposal.unmet).toEqual([]);
    expect(proposal.keyDates).toHaveLength(1);
    expect(proposal.keyDates[0].marginAfter).toBeGreaterThanOrEqual(0);
    // What is found is never worse than what stands.
    expect(proposal.after.unevenness).toBeLessThanOrEqual(proposal.before.unevenness);
    const taken = await manager.post(`/api/plan/level/${started.body.id}/take`, { revision: before.revision });
    expect(taken.body).toEqual({ revision: before.revision + 1 });
    const after = await plan();
    expect(after).toMatchObject({ label: 'Level', stale: false, unmet: [], canUndo: true });
    expect(after.plan).toEqual(proposal.plan);
    const again = await manager.post(`/api/plan/level/${started.body.id}/take`, { revision: after.revision });
    expect(again.status).toBe(409);
    await eventually(() =>
      stream.events.some((event) => (event['run'] as { state?: string } | undefined)?.state === 'taken'),
    );
    const states = stream.events.flatMap((event) => (event['run'] as { state?: string } | undefined)?.state ?? []);
    expect([...new Set(states)]).toEqual(['running', 'found', 'taken']);
    stream.stop();
  });

  it('can leave what was found, for good', async () => {
    const { revision } = await plan();
    const run = (await manager.post('/api/plan/level', { revision, seconds: 0.2, mode: 'within-dates' })).body;
    await eventually(async () => (await manager.get(`/api/plan/level/${run.id}`)).body.state === 'found');
    expect((await manager.post(`/api/plan/level/${run.id}/leave`)).body.state).toBe('left');
    const late = await manager.post(`/api/plan/level/${run.id}/take`, { revision });
    expect(late.body.type).toBe('/problems/already-exists');
  });

  it('stops levelling when told to, from any process, and what was found can be taken', async () => {
    const { revision } = await plan();
    const run = (await manager.post('/api/plan/level', { revision, seconds: 60 })).body;
    await eventually(async () => (await manager.get(`/api/plan/level/${run.id}`)).body.state === 'running');
    const other = await studio.another();
    const response = await fetch(`${other.url}/api/plan/level/${run.id}/cancel`, {
      method: 'POST',
      headers: { Cookie: manager.cookie, 'X-Fettle-Token': manager.token },
    });
    const cancelled = (await response.json()) as { state: string };
    expect(cancelled.state).toBe('cancelled');
    expect((await manager.post(`/api/plan/level/${run.id}/take`, { revision })).status).toBe(200);
  });

  it('does not take what answers another studio', async () => {
    const { revision } = await plan();
    const run = (await manager.post('/api/plan/level', { revision, seconds: 0.2 })).body;
    await eventually(async () => (await manager.get(`/api/plan/level/${run.id}`)).body.state === 'found');
    const day = ahead(3).slice(0, 10);
    await manager.post('/api/closures', { name: 'Flood', days: { from: day, until: ahead(4).slice(0, 10) } });
    expect((await plan()).stale).toBe(true);
    const taken = await manager.post(`/api/plan/level/${run.id}/take`, { revision });
    expect([taken.status, taken.body.type]).toEqual([409, '/problems/plan-stale']);
  });

  it('fails a levelling whose process is gone, and levels again', async () => {
    const { manager: db } = studio.database.dataSource;
    const head = await db.findOneOrFail(WorkingRevision, { where: {}, order: { seq: 'DESC' } });
    const id = randomUUID();
    const row = { id, state: 'running', mode: 'dates', revision: 1, baseId: head.id, seconds: 5, seed: 1 } as const;
    // Nobody holds the lock on this number: the process that did is dead.
    await db.insert(LevelRun, {
      ...row,
      plannedFrom: head.plannedFrom,
      fingerprint: 'x',
      startedAt: new Date(),
      workedBy: 12_345,
    });
    const { body } = await manager.get(`/api/plan/level/${id}`);
    expect(body).toMatchObject({ state: 'failed' });
    expect(body.failure).toContain('ended before it was done');
  });

  it('is not issued while it answers another studio', async () => {
    const { revision, stale } = await plan();
    expect(stale).toBe(true);
    const preview = (await manager.get('/api/plan/issue')).body;
    expect(preview.obstacles[0]).toContain('changed since this plan was laid out');
    const issued = await manager.post('/api/plan/issue', { revision });
    expect([issued.status, issued.body.type]).toEqual([409, '/problems/plan-stale']);
    expect(await studio.database.dataSource.manager.count(IssuedPlan)).toBe(0);
  });

  it('is issued under a number of its own, whoever presses at the same time, and reaches makers and dates', async () => {
    const revision = await levelAndTake();
    const preview = (await manager.get('/api/plan/issue')).body;
    expect(preview).toMatchObject({ revision, obstacles: [], warnings: [] });
    expect(preview.changes.map((change: { sentence: string }) => change.sentence)[0]).toMatch(/is new and starts/);
    const stream = await (await studio.as('maker')).listen();
    const answers = await Promise.all(
      [1, 2, 3].map((i) => manager.post('/api/plan/issue', { revision, note: `Try ${i}` })),
    );
    const made = answers.filter(({ status }) => status === 201);
    const numbers = made.map(({ body }) => body.number as number).sort((a, b) => a - b);
    expect(numbers).toEqual(made.map((_, i) => i + 1));
    expect(numbers.length).toBeGreaterThan(0);
    expect(answers.every(({ status }) => status === 201 || status === 409)).toBe(true);
    const { manager: db } = studio.database.dataSource;
    expect(await db.countBy(IssuedEntry, { planNumber: 1 })).toBe(3);
    expect(await db.countBy(IssuedShift, { planNumber: 1 })).toBeGreaterThanOrEqual(3);
    expect(await db.countBy(IssuedOccupancy, { planNumber: 1 })).toBe(3);
    await eventually(() => stream.events.some((event) => event['kind'] === 'plan-issued'));
    expect(stream.events.every((event) => event['kind'] !== 'plan-revised' && event['kind'] !== 'level')).toBe(true);
    stream.stop();
    const view = await plan();
    expect(view).toMatchObject({ stale: false, issued: { by: 'The manager', differs: false } });
    const dates = (await manager.get('/api/dates')).body;
    expect(dates).toMatchObject([{ kind: 'delivery', state: 'met' }]);
    expect(dates[0].drivers.at(-1)).toMatchObject({ stageId: stageIds[2], name: 'Second coat' });
    const load = (await manager.get('/api/load?by=craft')).body;
    const asked = load.rows[0].loadMinutes.reduce((sum: number, minutes: number) => sum + minutes, 0);
    expect(asked).toBe(360);
  });

  it('puts a maker’s issued work on the day sheet, the dwell with it', async () => {
    const { manager: db } = studio.database.dataSource;
    const shift = await db.findOneOrFail(IssuedShift, { where: { stageId: stageIds[0] } });
    const at = new Date(shift.during.start * 60_000);
    const day = at.toLocaleDateString('sv-SE', { timeZone: 'Europe/London' });
    const sheet = (await manager.get(`/api/day-sheet?makerId=${shift.makerId}&day=${day}`)).body;
    const entry = sheet.entries.find((one: { stageId: string }) => one.stageId === stageIds[0]);
    expect(entry).toMatchObject({
      name: 'Prime',
      pieceName: 'Moon',
      productionName: 'The Moon',
      start: at.toISOString(),
      bayName: 'Booth',
      handsOnMinutes: 120,
    });
    expect(Date.parse(entry.dwellUntil as string) - Date.parse(entry.end as string)).toBe(600 * 60_000);
    expect(sheet.dwells.map((one: { stageId: string }) => one.stageId)).toContain(stageIds[0]);
    const hand = await studio.as('maker');
    expect((await hand.get('/api/day-sheet')).body).toMatchObject({ makerId: studio.makerId, entries: [] });
    expect((await hand.get(`/api/day-sheet?makerId=${shift.makerId}`)).status).toBe(403);
  });

  it('stands in the issued plan as it was, though stages go until the next is issued', async () => {
    const numbers = (await manager.get('/api/issued-plans')).body as { number: number; stages: number }[];
    expect(numbers.at(0)?.stages).toBe(3);
    const { version } = (await plan()).directory.stages.find((stage: { id: string }) => stage.id === stageIds[2]);
    expect((await manager.delete(`/api/stages/${stageIds[2]}?version=${version}`)).status).toBe(204);
    expect((await manager.get('/api/issued-plans')).body[0].stages).toBe(3);
    expect((await plan()).plan.placements).toHaveLength(2);
  });

  it('is not issued when it asks for what can not be, and says what', async () => {
    const { revision } = await plan();
    const [first, second] = [await placement(stageIds[0]), await placement(stageIds[1])];
    // The second coat before the first is dry: a hand may put it there, the workshop may not be told so.
    const move = { revision, stageId: stageIds[1], start: first.work[0].start, makerIds: null, bayIds: null };
    expect(second.work[0].start).toBeGreaterThan(first.work[0].start);
    await manager.post('/api/plan/moves', move);
    const view = await plan();
    if (view.unmet.length === 0) throw new Error('The engine mended what the test wanted broken.');
    const issued = await manager.post('/api/plan/issue', { revision: view.revision });
    expect([issued.status, issued.body.type]).toEqual([422, '/problems/plan-unsound']);
    expect(issued.body.errors.length).toBeGreaterThan(0);
    expect((await manager.get('/api/issued-plans')).body[0].number).toBeLessThanOrEqual(3);
  });

  it('writes down every change of the plan', async () => {
    const trail = (await manager.get('/api/audit?limit=200')).body as { subjectKind: string; sentence: string }[];
    const sentences = trail.filter((entry) => entry.subjectKind === 'working-plan').map((entry) => entry.sentence);
    expect(sentences).toEqual(
      expect.arrayContaining([
        'Working plan: Level.',
        'Took back: Move “Moon: Prime”.',
        'Did again: Move “Moon: Prime”.',
      ]),
    );
  });
});
