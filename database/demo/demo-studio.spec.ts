import { keyDateCautions } from '@common/domain/key-date';
import { isMark } from '@common/domain/production-hue';
import { recipeFaults } from '@common/domain/recipe';
import { stageFaults } from '@common/domain/stage-rules';
import { patternFault } from '@common/time/pattern';
import { validate } from '@common/planning';
import { buildDemoStudio } from './build-demo-studio';
import { demoCalendar } from './demo-calendar';
import { demoProblem } from './demo-problem';
import { MATERIALS } from './materials';
import { RECIPES } from './recipes';

/** A Tuesday in winter. */
const TODAY = '2026-12-01';
const demo = buildDemoStudio(TODAY);

describe('the library', () => {
  it('has some thirty materials, each figure in order and with its source', () => {
    expect(MATERIALS.length).toBeGreaterThanOrEqual(25);
    for (const { name, dwells, cautions } of MATERIALS) {
      expect([name, cautions.length]).not.toEqual([name, 0]);
      for (const { milestone, minutes, source, minimumCelsius, maximumCelsius } of dwells) {
        expect([name, milestone, minutes.low <= minutes.likely && minutes.likely <= minutes.high]).toEqual([
          name,
          milestone,
          true,
        ]);
        expect(source.length).toBeGreaterThan(10);
        expect(source.length).toBeLessThanOrEqual(400);
        expect((minimumCelsius ?? -99) < (maximumCelsius ?? 99)).toBe(true);
      }
      expect(new Set(dwells.map((dwell) => dwell.milestone)).size).toBe(dwells.length);
    }
    expect(new Set(MATERIALS.map((material) => material.id)).size).toBe(MATERIALS.length);
  });

  // Published figures, in hours: silicone (kcmouldings.co.uk/html/siliconerubber.html), PU casting resin
  // (davidneat.wordpress.com/materials/casting/polyurethane-resin), alginate (introsculpture11.blogspot.com 2011/03),
  // glass-fibre concrete (reynoldsam.com/curing-procedure-gfrc and its faq), red oxide (idoc.tips, red-oxide primer).
  it.each([
    ['silicone-tin', 'pot-life', 0.75, 1.25],
    ['pu-casting', 'demould', 0.33, 0.5],
    ['alginate', 'next-layer-until', 0.7, 0.8],
    ['fibre-concrete', 'demould', 12, 16],
    ['fibre-concrete', 'full-cure', 168, 168],
    ['red-oxide', 'next-layer-until', 240, 336],
  ])('%s, %s, lies between %d and %d hours as published', (key, milestone, least, most) => {
    const dwell = MATERIALS.find((one) => one.id === `material:${key}`)?.dwells.find(
      (one) => one.milestone === milestone,
    );
    expect(dwell?.minutes.likely).toBeGreaterThanOrEqual(least * 60 - 1);
    expect(dwell?.minutes.likely).toBeLessThanOrEqual(most * 60 + 1);
  });

  it('has recipes without faults', () => {
    for (const recipe of RECIPES) {
      expect([recipe.name, recipeFaults(recipe), recipe.steps.flatMap((step) => stageFaults(step.stage))]).toEqual([
        recipe.name,
        [],
        [],
      ]);
      expect(recipe.steps.every((step) => step.stage.cautions.every((caution) => caution.length <= 400))).toBe(true);
    }
  });
});

describe('the demo studio', () => {
  it('is the same for the same day, and the same work for another', () => {
    expect(buildDemoStudio(TODAY)).toEqual(demo);
    const other = buildDemoStudio('2027-03-27');
    expect(other.stages.map(({ id, state }) => [id, state])).toEqual(demo.stages.map(({ id, state }) => [id, state]));
    expect(other.productions[0].keyDates[0].at).not.toBe(demo.productions[0].keyDates[0].at);
  });

  it('is as large as a workshop’s autumn', () => {
    expect(demo.makers).toHaveLength(8);
    expect(demo.bays.filter((bay) => bay.kind !== 'mould')).toHaveLength(5);
    expect(demo.productions).toHaveLength(5);
    expect(demo.pieces.length).toBeGreaterThanOrEqual(25);
    expect(demo.stages.length).toBeGreaterThanOrEqual(180);
    expect(demo.accounts.map((account) => account.role).sort()).toEqual([
      'client',
      'client',
      'maker',
      'maker',
      'maker',
      'manager',
      'owner',
    ]);
  });

  it('has weeks of every kind', () => {
    const rules = demo.makers.map((maker) =>
      maker.patterns.map((pattern) => `${pattern.rule} ${pattern.startMinuteOfDay}`).join(),
    );
    expect(new Set(rules).size).toBeGreaterThanOrEqual(6);
    expect(demo.makers.flatMap((maker) => maker.patterns).map(patternFault)).toEqual(expect.arrayContaining([null]));
    expect(demo.makers.flatMap((maker) => maker.patterns).filter((pattern) => patternFault(pattern) !== null)).toEqual(
      [],
    );
  });

  it('refers to nothing that is not there', () => {
    const ids = new Set(
      [
        demo.crafts,
        demo.materials,
        demo.makers,
        demo.bays,
        demo.clients,
        demo.productions,
        demo.pieces,
        demo.stages,
        demo.recipes,
      ].flatMap((records) => records.map((record) => record.id)),
    );
    const named = [
      ...demo.stages.flatMap((stage) => [
        stage.pieceId,
        ...stage.crew.map((wanted) => wanted.craftId),
        ...stage.places.flatMap((place) => [
          ...place.bayIds,
          ...(place.untilStageId === null ? [] : [place.untilStageId]),
        ]),
        ...stage.makerIds,
        ...stage.bayIds,
        ...(stage.dwell?.materialId ? [stage.dwell.materialId] : []),
      ]),
      ...demo.links.flatMap((link) => [link.fromStageId, link.toStageId]),
      ...demo.purchases.flatMap((purchase) => [purchase.stageId, purchase.productionId]),
      ...demo.pieces.flatMap((piece) => [piece.productionId, ...(piece.recipeId === null ? [] : [piece.recipeId])]),
      ...demo.productions.flatMap((production) => [
        production.clientId,
        ...production.keyDates.flatMap((date) => date.pieceIds),
      ]),
      ...demo.accounts.flatMap((account) => [account.makerId, account.clientId].filter((id) => id !== null)),
      ...demo.bays.flatMap((bay) => (bay.pieceId === null ? [] : [bay.pieceId])),
    ];
    expect(named.filter((id) => !ids.has(id))).toEqual([]);
    expect(new Set(demo.stages.map((stage) => stage.id)).size).toBe(demo.stages.length);
  });

  it('is without faults in the trade’s own rules', () => {
    expect(demo.stages.flatMap((stage) => stageFaults(stage))).toEqual([]);
    expect(demo.productions.flatMap((production) => keyDateCautions(production.keyDates))).toEqual([]);
    expect(demo.productions.every((production) => isMark(production.mark))).toBe(true);
    expect(new Set(demo.productions.map((production) => production.mark)).size).toBe(5);
    expect(new Set(demo.productions.map((production) => production.hue)).size).toBe(5);
  });

  it('has casts, coats, sign-offs and checks, work done and work begun', () => {
    const count = (test: (stage: (typeof demo.stages)[number]) => boolean) => demo.stages.filter(test).length;
    expect(count((stage) => stage.of === 8)).toBe(16);
    expect(count((stage) => stage.kind === 'sign-off')).toBeGreaterThanOrEqual(8);
    expect(count((stage) => stage.kind === 'check')).toBeGreaterThanOrEqual(8);
    expect(count((stage) => stage.state === 'finished')).toBeGreaterThanOrEqual(30);
    expect(count((stage) => stage.state === 'started')).toBeGreaterThanOrEqual(4);
    expect(count((stage) => stage.dwell !== null)).toBeGreaterThanOrEqual(100);
  });

  it('has a past that lies behind and in order', () => {
    const morning = demoCalendar(TODAY).at(0, '00:00');
    for (const { startedAt, finishedAt, state } of demo.stages) {
      expect(state === 'to-do').toBe(startedAt === null);
      expect(startedAt ?? 0).toBeLessThan(morning);
      expect(finishedAt ?? 0).toBeLessThan(morning);
      expect((finishedAt ?? Infinity) > (startedAt ?? 0)).toBe(true);
    }
    const stages = new Map(demo.stages.map((stage) => [stage.id, stage]));
    for (const { fromStageId, toStageId } of demo.links) {
      const [from, to] = [stages.get(fromStageId), stages.get(toStageId)];
      if (to?.startedAt) {
        expect(from?.finishedAt).toBeLessThanOrEqual(to.startedAt);
      }
    }
  });

  it('makes a sound problem on every day of the week', () => {
    for (let date = 1; date <= 7; date += 1) {
      expect(validate(demoProblem(`2026-12-0${date}`))).toEqual([]);
    }
  });
});

describe('the demo’s calendar', () => {
  it('counts weekdays from today, and from Monday at a weekend', () => {
    const days = (today: string) => [-1, 0, 1, 5].map(demoCalendar(today).workday);
    expect(days('2026-12-01')).toEqual(['2026-11-30', '2026-12-01', '2026-12-02', '2026-12-08']);
    expect(days('2026-12-05')).toEqual(['2026-12-04', '2026-12-07', '2026-12-08', '2026-12-14']);
    expect(days('2026-12-06')).toEqual(['2026-12-04', '2026-12-07', '2026-12-08', '2026-12-14']);
    expect(days('2026-12-04')).toEqual(['2026-12-03', '2026-12-04', '2026-12-07', '2026-12-11']);
  });
});
