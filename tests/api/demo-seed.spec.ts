import { MaterialCreate, RecipeCreate } from '@common/contract';
import { buildProblem } from '@common/planning-input';
import type { Problem } from '@common/planning';
import { buildDemoStudio } from '@database/demo/build-demo-studio';
import { demoSnapshot } from '@database/demo/demo-problem';
import { recordId } from '@database/demo/record-id';
import { seedDemo, seedLibrary } from '@database/demo/seed';
import { Account, Craft, IssuedPlan, Recipe, RecipeStepPlace, Stage } from '@database/entities';
import { materialView, recipeView } from '../../server/library/library-mapper';
import { snapshotOf } from '../../server/planning/snapshot';
import { readStudioRows } from '../../server/planning/snapshot-repository';
import { withDatabase } from '../support/test-database';

const NOW = new Date('2026-12-01T07:30:00Z');
const NOW_MINUTE = NOW.getTime() / 60_000;

/** The parts of a problem that an order of rows can not change. */
function settled(problem: Problem): unknown {
  const byId = <T extends { readonly id: string }>(items: readonly T[]) =>
    items.toSorted((a, b) => (a.id < b.id ? -1 : 1));
  const advances = new Map(problem.advances.map(({ id, from, permille }) => [id, { from, permille }]));
  return {
    ...problem,
    advances: null,
    makers: byId(problem.makers).map((maker) => ({
      ...maker,
      crafts: maker.crafts.toSorted((a, b) => (a.craftId < b.craftId ? -1 : 1)),
    })),
    bays: byId(problem.bays),
    stages: byId(problem.stages).map((stage) => ({
      ...stage,
      dwell: stage.dwell && {
        ...stage.dwell,
        advance: Object.entries(stage.dwell.advance).map(([where, id]) => [where, advances.get(id)]),
      },
      progress:
        stage.progress.kind === 'to-do'
          ? stage.progress
          : { ...stage.progress, makerIds: stage.progress.makerIds.toSorted() },
    })),
    links: problem.links.map((link) => JSON.stringify(link)).toSorted(),
    keyDates: byId(problem.keyDates).map((date) => ({ ...date, stageIds: date.stageIds.toSorted() })),
  };
}

/** A problem of the demo's keys with the record ids that the keys stand for. */
function withRecordIds(problem: Problem): Problem {
  const key = /"((?:bay|stage|piece|production|maker|craft|key-date):[^"]+)"/g;
  return JSON.parse(JSON.stringify(problem).replace(key, (_, id: string) => `"${recordId(id)}"`)) as Problem;
}

describe('the demo in an empty database', () => {
  const database = withDatabase();
  let lines: readonly string[];

  beforeAll(async () => {
    lines = await seedDemo(database.dataSource, NOW);
  });

  it('says who can sign in, and with what', () => {
    expect(lines[0]).toMatch(/password: \S+/);
    expect(lines.filter((line) => line.includes('@example.test'))).toHaveLength(7);
  });

  it('asks of the engine exactly what the data asks', async () => {
    const rows = await database.dataSource.transaction((manager) => readStudioRows(manager));
    const options = { now: NOW_MINUTE, horizonEnd: null };
    const stored = buildProblem(snapshotOf(rows, {}), options);
    const meant = withRecordIds(buildProblem(demoSnapshot(buildDemoStudio('2026-12-01')), options));
    expect(settled(stored)).toEqual(settled(meant));
  });

  it('keeps the order of entry', async () => {
    const rows = await database.dataSource.transaction((manager) => readStudioRows(manager));
    expect(rows.stages.map((stage) => stage.id)).toEqual(
      buildDemoStudio('2026-12-01').stages.map((stage) => recordId(stage.id)),
    );
  });

  it('holds materials and recipes that the contract would take', async () => {
    const rows = await database.dataSource.transaction((manager) => readStudioRows(manager));
    rows.materials.forEach((material) => MaterialCreate.parse(materialView(material)));
    const recipes = await database.dataSource.manager.find(Recipe, {
      relations: { steps: { crew: true, places: { bays: true } } },
    });
    recipes.forEach((recipe) => RecipeCreate.parse(recipeView(recipe)));
    expect(recipes.length).toBeGreaterThanOrEqual(8);
  });

  it('is left as it is by a second start, which says the same', async () => {
    const count = await database.dataSource.manager.count(Stage);
    expect(await seedDemo(database.dataSource, new Date('2027-05-05T10:00:00Z'))).toEqual(lines);
    expect(await database.dataSource.manager.count(Stage)).toBe(count);
    expect(await database.dataSource.manager.count(IssuedPlan)).toBe(0);
  });

  it('no longer names people whose password was changed', async () => {
    const id = recordId('account:owner');
    const before = await database.dataSource.manager.findOneByOrFail(Account, { id });
    await database.dataSource.manager.update(Account, { id }, { passwordHash: null });
    const said = await seedDemo(database.dataSource, NOW);
    expect(said.join('\n')).not.toContain('owner@example.test');
    expect(said).toHaveLength(lines.length - 1);
    await database.dataSource.manager.update(Account, { id }, { passwordHash: before.passwordHash });
  });
});

describe('the library in an empty database', () => {
  const database = withDatabase();

  it('has crafts, materials and recipes without places, once', async () => {
    await seedLibrary(database.dataSource);
    await seedLibrary(database.dataSource);
    const { manager } = database.dataSource;
    expect(await manager.count(Craft)).toBe(12);
    expect(await manager.count(Recipe)).toBeGreaterThanOrEqual(8);
    expect(await manager.count(RecipeStepPlace)).toBe(0);
    expect(await manager.count(Account)).toBe(0);
  });

  it('keeps the demo out, which is for a database that holds nothing', async () => {
    expect(await seedDemo(database.dataSource, NOW)).toEqual([]);
    expect(await database.dataSource.manager.count(Stage)).toBe(0);
  });
});
