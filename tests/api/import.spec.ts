import { BayView, MaterialView, ProblemDetails, StageImportResult, WorkingPlanView } from '@common/contract';
import { DEMO_PASSWORD } from '@database/demo/seed-accounts';
import { seedDemo } from '@database/demo/seed';
import { Link, Piece, Production, Stage } from '@database/entities';
import { withDatabase } from '../support/test-database';
import { bodyOf } from './body-of';
import { withStudio, type Answer, type Visitor } from './studio';

const HEAD = 'piece,stage,craft,likely hours,after';

describe('importing stages', () => {
  const database = withDatabase();
  beforeAll(async () => {
    await seedDemo(database.dataSource, new Date('2026-12-01T07:30:00Z'));
  }, 60_000);
  const studio = withStudio({ database, clock: () => new Date('2026-12-01T07:30:00Z') });
  let manager: Visitor;
  let production: Production;
  beforeAll(async () => {
    manager = await studio.as('manager');
    production = await database.dataSource.manager.findOneOrFail(Production, { where: { state: 'committed' } });
  });

  const send = (csv: string, mode: 'try' | 'take', by: Visitor = manager): Promise<Answer> =>
    by.post(`/api/productions/${production.id}/import`, { csv, mode });
  const stagesOf = async (pieceName: string): Promise<Stage[]> => {
    const piece = await database.dataSource.manager.findOneByOrFail(Piece, {
      productionId: production.id,
      name: pieceName,
    });
    return database.dataSource.manager.find(Stage, {
      where: { pieceId: piece.id },
      relations: { crew: true, places: { bays: true }, dwellMaterial: true },
      order: { position: 'ASC' },
    });
  };

  it('tries without writing, then takes what it said', async () => {
    const csv = [
      'piece;stage;craft;makers least;makers most;low hours;likely hours;high hours;bay;hold;material;milestone;after',
      'Comet;Carve;carving;1;2;6;8,5;12;;;;;',
      'Comet;Lay up;laminating;1;2;4;5;8;Spray booth;until Demould;Polyester laminating resin;demould;',
      'Comet;Demould;laminating;;;;1;;;;;;',
      'Tail;Weld;metalwork;;;;3;;;;;;Comet > Carve',
    ].join('\r\n');
    const known = await knownNames(manager);
    const named = csv.replace('Spray booth', known.bay).replace('Polyester laminating resin', known.material);
    const milestone = named.replace(';demould;', `;${known.milestone};`);
    const tried = await send(milestone, 'try');
    expect([tried.status, tried.body]).toEqual([200, { pieces: 2, stages: 4, faults: [], taken: false }]);
    expect(await database.dataSource.manager.countBy(Piece, { name: 'Comet' })).toBe(0);

    const taken = await send(milestone, 'take');
    expect(taken.body).toEqual({ pieces: 2, stages: 4, faults: [], taken: true });
    const [carve, layUp, demould] = await stagesOf('Comet');
    expect([carve.lowMinutes, carve.likelyMinutes, carve.highMinutes]).toEqual([360, 510, 720]);
    expect(layUp.places[0]).toMatchObject({ hold: 'until-stage', untilStageId: demould.id });
    expect(layUp.places[0].bays).toHaveLength(1);
    expect(layUp.dwellMaterial?.name).toBe(known.material);
    expect(layUp.dwellMinutes).toBeGreaterThan(0);
    const [weld] = await stagesOf('Tail');
    const links = await database.dataSource.manager.findBy(Link, { fromStageId: carve.id });
    expect(links.map((link) => link.toStageId).sort()).toEqual([layUp.id, weld.id].sort());
    expect((await studio.trail(production.id))[0]).toMatchObject({ action: 'imported' });
    expect((await manager.get(`/api/productions/${production.id}`)).status).toBe(200);
    const { directory } = bodyOf(WorkingPlanView, await manager.get('/api/plan'));
    expect(directory.stages.map((stage) => stage.id)).toContain(weld.id);
  });

  it('takes nothing where one row is at fault, and names it', async () => {
    const before = await database.dataSource.manager.count(Stage);
    const body = bodyOf(
      StageImportResult,
      await send(`${HEAD}\nGhost,Carve,carving,2,\nGhost,Paint,paintig,2,\n`, 'take'),
    );
    expect(body).toMatchObject({ pieces: 0, stages: 0, taken: false });
    expect(body.faults).toEqual([
      { pointer: '/csv', line: 3, detail: expect.stringContaining('“paintig” is not known') as string },
    ]);
    expect(await database.dataSource.manager.count(Stage)).toBe(before);
    expect(await database.dataSource.manager.countBy(Piece, { name: 'Ghost' })).toBe(0);
  });

  it('keeps the order that was understood in a piece that it links into', async () => {
    await send('piece,stage,craft,likely hours,after\nFin,Cut,carving,1,-\nFin,Fit,carving,1,-', 'take');
    const [cut, fit] = await stagesOf('Fin');
    expect(await database.dataSource.manager.countBy(Link, { toStageId: fit.id })).toBe(0);
    await send('piece,stage,craft,likely hours,after\nFin,Paint,carving,1,Cut', 'take');
    const links = await database.dataSource.manager.findBy(Link, { fromStageId: cut.id });
    expect(links).toHaveLength(2);
  });

  it('refuses the same rows a second time', async () => {
    const body = bodyOf(StageImportResult, await send(`${HEAD}\nFin,Cut,carving,1,-`, 'take'));
    expect(body.faults[0].detail).toBe('“Fin: Cut” is in the production already. Give this one another name.');
  });

  it('is for the office, and for a production that there is', async () => {
    const csv = `${HEAD}\nA,B,carving,1,`;
    for (const role of ['maker', 'client'] as const)
      expect((await send(csv, 'try', await studio.as(role))).status).toBe(403);
    const nowhere = await manager.post(`/api/productions/${studio.makerId}/import`, { csv, mode: 'try' });
    expect(nowhere.status).toBe(404);
    const demo = studio.visitor();
    expect((await demo.signIn('manager@example.test', DEMO_PASSWORD)).status).toBe(200);
    expect((await send(csv, 'try', demo)).status).toBe(200);
  });

  it('says clearly what is too long', async () => {
    const long = await send('x'.repeat(1_500_001), 'try');
    expect([long.status, bodyOf(ProblemDetails, long).detail]).toEqual([
      422,
      'The file is longer than 1,500,000 characters. Split it.',
    ]);
    // Within the limit, though three bytes each.
    expect((await send('字'.repeat(1_400_000), 'try')).status).toBe(200);
  });

  it('takes 10,000 rows, all of them', async () => {
    const rows = Array.from({ length: 10_000 }, (_, index) => `Swarm ${index % 40},Stage ${index},carving,1,`);
    const body = bodyOf(StageImportResult, await send([HEAD, ...rows].join('\n'), 'take'));
    expect(body).toEqual({ pieces: 40, stages: 10_000, faults: [], taken: true });
    expect(await stagesOf('Swarm 7')).toHaveLength(250);
  }, 120_000);
});

async function knownNames(manager: Visitor): Promise<{ bay: string; material: string; milestone: string }> {
  const [bay] = bodyOf(BayView.array(), await manager.get('/api/bays'));
  const materials = bodyOf(MaterialView.array(), await manager.get('/api/materials'));
  const material = materials.find((one) => one.dwells.some((dwell) => dwell.milestone === 'demould'));
  if (!material) throw new Error('The demo has no material that is demoulded.');
  return { bay: bay.name, material: material.name, milestone: 'demould' };
}
