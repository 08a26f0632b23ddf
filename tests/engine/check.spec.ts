import { check, level, type Placement, type Plan, type Problem, type Rule, type Stage } from '@common/planning';
import { at, D, link, maker, MON, stage, studio } from './support/small-studio';

/**
 * A valid plan is broken in one way at a time, and the checker has to name the rule that this breaks. Common practice (mutation
 * testing of an oracle), no source.
 */
const problem: Problem = studio({
  makers: [
    maker(
      'ana',
      { carving: 1000, painting: 800 },
      {
        limits: { dayMinutes: 480, weekMinutes: 2400, restBetweenMinutes: 660 },
        overtime: [{ start: at(1, 17), end: at(1, 19) }],
      },
    ),
    maker('ben', { carving: 1000, laminating: 1000 }),
  ],
  bays: [
    {
      id: 'booth',
      capacity: 1,
      open: [
        { start: at(0, 7), end: at(0, 20) },
        { start: at(1, 7), end: at(1, 20) },
        { start: at(2, 7), end: at(2, 20) },
      ],
    },
    { id: 'mould', capacity: 1, open: null },
    { id: 'yard', capacity: 1, open: null },
  ],
  advances: [{ id: 'cold', from: [MON, at(2, 0)], permille: [500, 1000] }],
  stages: [
    stage('carve', {
      effort: { kind: 'person-minutes', minutes: 600 },
      crew: [{ craftId: 'carving', least: 1, most: 2 }],
      continuity: 'shifts',
      pin: { start: at(0, 8), makerIds: ['ana'], bayIds: null },
    }),
    stage('lay-up', {
      effort: { kind: 'person-minutes', minutes: 120 },
      crew: [{ craftId: 'laminating', least: 1, most: 1 }],
      continuity: 'session',
      places: [{ bayIds: ['mould'], units: 1, hold: { kind: 'until-stage', stageId: 'demould' } }],
      dwell: { minutes: 600, advance: { mould: 'cold' }, attendedMinutes: 60, window: null },
    }),
    stage('demould', {
      effort: { kind: 'person-minutes', minutes: 60 },
      crew: [{ craftId: 'laminating', least: 1, most: 1 }],
      continuity: 'session',
    }),
    stage('coat-1', {
      effort: { kind: 'duration', minutes: 120 },
      crew: [{ craftId: 'painting', least: 1, most: 1 }],
      continuity: 'session',
      places: [{ bayIds: ['booth'], units: 1, hold: { kind: 'work' } }],
      dwell: { minutes: 60, advance: {}, attendedMinutes: 0, window: { kind: 'hard', minutes: 300 } },
      earliestStart: at(1, 13),
    }),
    stage('coat-2', {
      effort: { kind: 'duration', minutes: 60 },
      crew: [{ craftId: 'painting', least: 1, most: 1 }],
      continuity: 'session',
      latestEnd: at(4, 0),
      places: [{ bayIds: ['booth'], units: 1, hold: { kind: 'work' } }],
    }),
    stage('visit', { fixedStart: at(3, 10), effort: { kind: 'duration', minutes: 30 } }),
    stage('lorry', {
      progress: { kind: 'finished', start: at(0, 6), end: at(0, 7), makerIds: [], bayIds: ['yard'] },
      places: [{ bayIds: ['yard'], units: 1, hold: { kind: 'work' } }],
    }),
    stage('issued', { effort: { kind: 'duration', minutes: 45 } }),
  ],
  links: [
    link('lay-up', 'demould'),
    link('coat-1', 'coat-2', { maxGapMinutes: 200 }),
    link('carve', 'coat-1', { minGapMinutes: 30 }),
  ],
  keyDates: [
    {
      id: 'rehearsal',
      productionId: 'production',
      at: at(4, 12),
      strength: 'hard',
      weight: 1,
      stageIds: ['coat-2', 'demould'],
    },
  ],
  freezeUntil: at(1, 0),
  issued: {
    placements: [
      {
        stageId: 'issued',
        work: [{ start: at(0, 9), end: at(0, 9, 45) }],
        crew: [],
        bayIds: [],
        dwellEnd: at(0, 9, 45),
      },
    ],
  },
});

const valid: Plan = level(problem, { seed: 1, maxSchedules: 1, shouldStop: () => false }).plan;

const change = (stageId: string, how: (placement: Placement) => Partial<Placement>): Plan => ({
  placements: valid.placements.map((one) => (one.stageId === stageId ? { ...one, ...how(one) } : one)),
});
const shift = (stageId: string, minutes: number): Plan =>
  change(stageId, (one) => ({
    work: one.work.map((span) => ({ start: span.start + minutes, end: span.end + minutes })),
    dwellEnd: one.dwellEnd + minutes,
  }));
const to = (stageId: string, start: number): Plan => {
  const now = valid.placements.find((one) => one.stageId === stageId)?.work[0].start ?? 0;
  return shift(stageId, start - now);
};
const rules = (plan: Plan, changed: Problem = problem): Set<Rule> =>
  new Set(check(changed, plan).map((one) => one.rule));
const withStage = (id: string, changes: Partial<Stage>): Problem => ({
  ...problem,
  stages: problem.stages.map((one) => (one.id === id ? { ...one, ...changes } : one)),
});

describe('the checker', () => {
  it('finds nothing wrong with a valid plan', () => {
    expect(check(problem, valid)).toEqual([]);
  });

  const cases: [Rule, string, Plan][] = [
    ['placed-once', 'a stage without a place', { placements: valid.placements.slice(1) }],
    ['placed-once', 'a stage placed twice', { placements: [...valid.placements, valid.placements[0]] }],
    [
      'placed-once',
      'a stage that nobody asked for',
      { placements: [...valid.placements, { ...valid.placements[0], stageId: 'ghost' }] },
    ],
    [
      'effort',
      'too little work',
      change('demould', (one) => ({
        work: [{ start: one.work[0].start, end: one.work[0].end - 10 }],
        dwellEnd: one.dwellEnd - 10,
      })),
    ],
    ['effort', 'work in the wrong order', change('carve', (one) => ({ work: [...one.work].reverse() }))],
    ['crew-size', 'nobody there', change('demould', () => ({ crew: [] }))],
    ['crew-size', 'somebody there twice', change('carve', (one) => ({ crew: [...one.crew, ...one.crew] }))],
    [
      'crew-size',
      'somebody nobody asked for',
      change('visit', () => ({ crew: [{ makerId: 'ben', craftId: 'carving' }] })),
    ],
    [
      'crew-craft',
      'a maker without the craft',
      change('demould', () => ({ crew: [{ makerId: 'ana', craftId: 'laminating' }] })),
    ],
    ['crew-shift', 'work after the shift', to('demould', at(5, 18))],
    [
      'continuity',
      'a session in two parts',
      change('demould', (one) => ({
        work: [
          { start: one.work[0].start, end: one.work[0].start + 30 },
          { start: one.work[0].start + 40, end: one.work[0].start + 70 },
        ],
        dwellEnd: one.dwellEnd + 10,
      })),
    ],
    [
      'continuity',
      'a pause inside a shift',
      change('carve', (one) => ({
        work: [
          { start: at(0, 8), end: at(0, 11) },
          { start: at(0, 13), end: at(0, 17) },
          { start: at(1, 8), end: at(1, 11) },
        ],
        dwellEnd: at(1, 11),
        crew: one.crew,
      })),
    ],
    ['maker-double-booked', 'two stages at once', to('coat-1', at(0, 13))],
    ['bay-choice', 'a bay that is not its own', change('coat-2', () => ({ bayIds: ['yard'] }))],
    ['bay-choice', 'no bay at all', change('coat-2', () => ({ bayIds: [] }))],
    ['bay-open', 'a closed booth', to('coat-2', at(3, 9))],
    ['bay-capacity', 'two in one booth', to('coat-2', at(1, 14))],
    ['dwell', 'a cure too short', change('lay-up', (one) => ({ dwellEnd: one.dwellEnd - 1 }))],
    ['dwell', 'a cure too long', change('lay-up', (one) => ({ dwellEnd: one.dwellEnd + 1 }))],
    ['dwell', 'a dwell where there is none', change('visit', (one) => ({ dwellEnd: one.dwellEnd + 5 }))],
    ['attended', 'everybody gone home', to('lay-up', at(0, 14, 30))],
    ['window', 'the window closed', to('coat-2', at(2, 8))],
    ['link-min', 'a demould too soon', to('demould', at(0, 11))],
    ['link-max', 'a second coat too late', to('coat-2', at(2, 8))],
    ['earliest', 'before it can', to('coat-1', at(1, 9))],
    ['latest', 'after it may', to('coat-2', at(4, 9))],
    ['fixed', 'not when agreed', shift('visit', 15)],
    ['pin', 'not where pinned', change('carve', () => ({ crew: [{ makerId: 'ben', craftId: 'carving' }] }))],
    ['progress', 'not as it happened', shift('lorry', 15)],
    ['freeze', 'moved inside the freeze', shift('issued', 15)],
    ['horizon', 'past the end', to('issued', MON + 14 * D)],
    ['key-date', 'the rehearsal missed', to('demould', at(4, 13))],
  ];
  it.each(cases)('names %s for %s', (rule, _, plan) => {
    expect(rules(plan)).toContain(rule);
  });

  it('names limits where overtime adds up to too long a day', () => {
    const long = withStage('carve', { pin: null, earliestStart: MON });
    const plan = change('carve', (one) => ({
      crew: one.crew,
      work: [
        { start: at(1, 8), end: at(1, 12) },
        { start: at(1, 13), end: at(1, 19) },
      ],
      dwellEnd: at(1, 19),
    }));
    expect(rules(plan, long)).toContain('limits');
  });

  it('names a ring of links', () => {
    const ring = { ...problem, links: [...problem.links, link('demould', 'lay-up')] };
    expect(rules(valid, ring)).toContain('link-cycle');
  });

  it('asks for the extra work of a soft window that was missed, and for none where it was met', () => {
    const soft = withStage('coat-1', {
      dwell: {
        minutes: 60,
        advance: {},
        attendedMinutes: 0,
        window: { kind: 'soft', minutes: 300, extraMinutes: 30, costMinor: 5 },
      },
    });
    const loose = {
      ...soft,
      links: soft.links.filter((one) => one.fromStageId !== 'coat-1').concat(link('coat-1', 'coat-2')),
    };
    expect(rules(to('coat-2', at(2, 8)), loose)).toEqual(new Set(['effort']));
    const paid = change('coat-2', () => ({ work: [{ start: at(2, 8), end: at(2, 9, 30) }], dwellEnd: at(2, 9, 30) }));
    expect(check(loose, paid)).toEqual([]);
  });

  it('says by how much', () => {
    const [late] = check(problem, to('demould', at(4, 13))).filter((one) => one.rule === 'key-date');
    expect(late.by).toBe(120);
    expect(late.keyDateId).toBe('rehearsal');
  });
});
