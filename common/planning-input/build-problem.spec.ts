import { validate } from '@common/planning';
import { PLAIN_LINK } from '../domain/stage-draft';
import { constantClimate } from '../dwell/climate';
import { buildProblem, type SnapshotStage, type StudioSnapshot } from './index';

const at = (text: string) => Date.parse(`${text}Z`) / 60_000;

/** A Tuesday in winter, before work. */
const NOW = at('2026-12-01T07:30');

const weekdays = {
  kind: 'ordinary',
  firstDay: '2026-01-05',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  startMinuteOfDay: 8 * 60,
  lengthMinutes: 8 * 60,
  exceptDays: [],
} as const;

const maker = (
  id: string,
  given: Partial<StudioSnapshot['makers'][number]> = {},
): StudioSnapshot['makers'][number] => ({
  id,
  crafts: [{ craftId: 'laminating', pacePermille: 1000 }],
  patterns: [weekdays],
  leave: [],
  hourCostMinor: 2001,
  dayLimitMinutes: null,
  weekLimitMinutes: null,
  ...given,
});

const stage = (id: string, position: number, given: Partial<SnapshotStage> = {}): SnapshotStage => ({
  id,
  pieceId: 'piece',
  position,
  name: id,
  kind: 'make',
  handsOn: { lowMinutes: 60, likelyMinutes: 120, highMinutes: 240 },
  crew: [{ craftId: 'laminating', least: 1, most: 2 }],
  crewLossPermille: 0,
  continuity: 'shifts',
  places: [],
  dwell: null,
  cautions: [],
  note: '',
  visitAt: null,
  replyMinutes: 0,
  state: 'to-do',
  startedAt: null,
  finishedAt: null,
  spentMinutes: 0,
  remainingMinutes: null,
  makerIds: null,
  bayIds: null,
  pin: null,
  ...given,
});

const snapshot = (given: Partial<StudioSnapshot> = {}): StudioSnapshot => ({
  zone: 'Europe/London',
  settings: {
    changePenaltyMinor: 1,
    unevennessWeight: 2,
    earlinessWeight: 3,
    freezeMinutes: 600,
    restBetweenMinutes: 660,
    dayLimitMinutes: 600,
    weekLimitMinutes: 2880,
    overtimePermille: 1500,
  },
  closures: [],
  room: constantClimate({ celsius: 10, humidityPercent: 50 }),
  makers: [maker('ada')],
  bays: [
    { id: 'table', isMould: false, capacity: 2, openings: [], climate: null },
    {
      id: 'oven',
      isMould: false,
      capacity: 1,
      openings: [],
      climate: constantClimate({ celsius: 30, humidityPercent: 50 }),
    },
  ],
  materials: [
    {
      id: 'resin',
      family: 'resin',
      milestones: [
        {
          milestone: 'demould',
          minutes: { low: 600, likely: 720, high: 1440 },
          behaviour: {
            law: { kind: 'factor-per-10-degrees', factor: 2 },
            referenceCelsius: 20,
            referenceHumidityPercent: 50,
            minimumCelsius: 5,
            maximumCelsius: 40,
          },
        },
      ],
    },
  ],
  productions: [{ id: 'production', state: 'committed', keyDates: [] }],
  pieces: [{ id: 'piece', productionId: 'production' }],
  stages: [stage('first', 0), stage('second', 1)],
  links: [],
  purchases: [],
  issued: null,
  ...given,
});

function build(given: Partial<StudioSnapshot> = {}) {
  const problem = buildProblem(snapshot(given), { now: NOW, horizonEnd: at('2026-12-15T00:00') });
  expect(validate(problem)).toEqual([]);
  return problem;
}

const resinDwell = { materialId: 'resin', milestone: 'demould', minutes: 720, attendedMinutes: 30, window: null };
const place = (bayIds: string[], hold: 'work' | 'dwell') => ({ bayIds, units: 1, hold, untilStageId: null });

describe('time', () => {
  it('turns patterns, leave and closures into shifts, and overtime into what is beside them', () => {
    const problem = build({
      makers: [
        maker('ada', {
          patterns: [weekdays, { ...weekdays, kind: 'overtime', rule: 'FREQ=DAILY', lengthMinutes: 9 * 60 }],
          leave: [{ from: '2026-12-02', until: '2026-12-04' }],
        }),
      ],
      closures: [{ from: '2026-12-07', until: '2026-12-08' }],
    });
    const [ada] = problem.makers;
    expect(ada.shifts.slice(0, 3)).toEqual([
      { start: at('2026-12-01T08:00'), end: at('2026-12-01T16:00') },
      { start: at('2026-12-04T08:00'), end: at('2026-12-04T16:00') },
      { start: at('2026-12-08T08:00'), end: at('2026-12-08T16:00') },
    ]);
    expect(ada.overtime.slice(0, 3)).toEqual([
      { start: at('2026-12-01T16:00'), end: at('2026-12-01T17:00') },
      { start: at('2026-12-04T16:00'), end: at('2026-12-04T17:00') },
      { start: at('2026-12-05T08:00'), end: at('2026-12-05T17:00') },
    ]);
    expect(ada.overtimeHourCostMinor).toBe(3002);
    expect(ada.limits).toEqual({ dayMinutes: 600, weekMinutes: 2880, restBetweenMinutes: 660 });
    expect(problem.workingTime).toEqual(ada.shifts);
    expect(problem.days).toHaveLength(14);
    expect(problem.days[0]).toEqual({ day: '2026-12-01', start: at('2026-12-01T00:00'), end: at('2026-12-02T00:00') });
  });

  it('closes a bay outside its openings and in closures, and leaves one without them open', () => {
    const bays = [
      { id: 'booth', isMould: false, capacity: 1, openings: [{ ...weekdays, lengthMinutes: 60 }], climate: null },
      { id: 'table', isMould: false, capacity: 1, openings: [], climate: null },
    ];
    const problem = build({ bays, closures: [{ from: '2026-12-01', until: '2026-12-02' }] });
    expect(problem.bays[0].open?.at(0)).toEqual({ start: at('2026-12-02T08:00'), end: at('2026-12-02T09:00') });
    expect(problem.bays[1].open).toBeNull();
  });

  it('looks eight weeks past the last date, and twelve weeks ahead at least', () => {
    const end = (date: number) => {
      const keyDates = [{ id: 'd', at: date, strength: 'hard', weight: 1, pieceIds: [] } as const];
      const productions = [{ id: 'production', state: 'committed', keyDates } as const];
      return buildProblem(snapshot({ productions }), { now: NOW, horizonEnd: null }).horizon.end;
    };
    expect(end(NOW)).toBe(NOW + 84 * 1440);
    expect(end(NOW + 100 * 1440)).toBe(NOW + 156 * 1440);
  });
});

describe('dwells', () => {
  it('advance by the climate of the room, or of the bay that is kept', () => {
    const problem = build({
      stages: [
        stage('in-room', 0, { dwell: resinDwell, places: [place(['oven'], 'work')] }),
        stage('in-oven', 1, { dwell: resinDwell, places: [place(['oven'], 'dwell')] }),
        stage('in-either', 2, { dwell: resinDwell, places: [place(['table', 'oven'], 'dwell')] }),
        stage('plain', 3, { dwell: { ...resinDwell, materialId: null, milestone: null } }),
      ],
    });
    const rate = (id: string | undefined) => problem.advances.find((advance) => advance.id === id)?.permille;
    const advance = (index: number) => problem.stages[index].dwell?.advance ?? {};
    expect(rate(advance(0).room)).toEqual([500]);
    expect(rate(advance(1).oven)).toEqual([2000]);
    expect(Object.keys(advance(2))).toEqual(['table', 'oven']);
    expect(advance(2).table).toBe(advance(0).room);
    expect(advance(3)).toEqual({});
    expect(problem.advances).toHaveLength(2);
  });

  it('keep their window, and nobody attends what nobody did', () => {
    const window = { kind: 'soft', minutes: 900, extraMinutes: 30, costMinor: 1000 } as const;
    const clock = { crew: [], continuity: 'clock' } as const;
    const problem = build({
      stages: [stage('a', 0, { dwell: { ...resinDwell, window } }), stage('b', 1, { ...clock, dwell: resinDwell })],
    });
    expect(problem.stages[0].dwell).toMatchObject({ minutes: 720, attendedMinutes: 30, window });
    expect(problem.stages[1].dwell).toMatchObject({ attendedMinutes: 0, window: null });
  });
});

describe('links', () => {
  it('are the order of the stages where a piece has none of its own', () => {
    const stages = [stage('b', 1), stage('a', 0), stage('c', 2)];
    expect(build({ stages }).links.map((link) => [link.fromStageId, link.toStageId])).toEqual([
      ['a', 'b'],
      ['b', 'c'],
    ]);
  });

  it('are those given where there is one, and only between stages in the plan', () => {
    const links = [
      { fromStageId: 'b', toStageId: 'a', ...PLAIN_LINK },
      { fromStageId: 'gone', toStageId: 'a', ...PLAIN_LINK },
    ];
    const stages = [stage('a', 0), stage('b', 1), stage('c', 2)];
    expect(build({ stages, links }).links).toEqual([{ fromStageId: 'b', toStageId: 'a', ...PLAIN_LINK }]);
  });
});

describe('sign-offs', () => {
  const signOff = { kind: 'sign-off', crew: [], continuity: 'clock', replyMinutes: 2880 } as const;

  it('take the usual time to an answer, day and night', () => {
    const [first] = build({ stages: [stage('s', 0, signOff)] }).stages;
    expect(first).toMatchObject({ effort: { kind: 'duration', minutes: 2880 }, continuity: 'clock', fixedStart: null });
  });

  it('are held at the agreed visit, with whoever is wanted there', () => {
    const visitAt = '2026-12-03T11:00:00Z';
    const crew = [{ craftId: 'laminating', least: 1, most: 1 }];
    const [first] = build({
      stages: [
        stage('s', 0, { ...signOff, crew, visitAt, handsOn: { lowMinutes: 0, likelyMinutes: 0, highMinutes: 0 } }),
      ],
    }).stages;
    expect(first).toMatchObject({
      effort: { kind: 'duration', minutes: 60 },
      continuity: 'session',
      fixedStart: at('2026-12-03T11:00'),
    });
  });

  it('become a message awaited once the visit has gone by without a decision', () => {
    const [first] = build({ stages: [stage('s', 0, { ...signOff, visitAt: '2026-11-30T11:00:00Z' })] }).stages;
    expect(first).toMatchObject({ effort: { kind: 'duration', minutes: 2880 }, fixedStart: null });
  });
});

describe('purchases', () => {
  const purchase = { stageId: 'first', leadDays: 5, orderedOn: null, dueOn: null, receivedOn: null };
  const start = (given: object) => build({ purchases: [{ ...purchase, ...given }] }).stages[0].earliestStart;

  it('hold a stage until the morning after they are due', () => {
    expect(start({ dueOn: '2026-12-04', orderedOn: '2026-11-20' })).toBe(at('2026-12-05T00:00'));
    expect(start({ orderedOn: '2026-11-28' })).toBe(at('2026-12-04T00:00'));
    expect(start({})).toBe(at('2026-12-07T00:00'));
  });

  it('are looked for tomorrow when overdue, and no more once received', () => {
    expect(start({ dueOn: '2026-11-20' })).toBe(at('2026-12-02T00:00'));
    expect(start({ dueOn: '2026-12-04', receivedOn: '2026-11-30' })).toBe(NOW);
  });
});

describe('key dates', () => {
  const date = { id: 'date', at: at('2026-12-10T12:00'), strength: 'hard', weight: 3, pieceIds: [] } as const;
  const keyDates = (keyDate: object, stages: readonly SnapshotStage[], links: StudioSnapshot['links'] = []) => {
    const productions = [{ id: 'production', state: 'committed', keyDates: [{ ...date, ...keyDate }] } as const];
    const pieces = ['piece', 'other'].map((id) => ({ id, productionId: 'production' }));
    return build({ productions, pieces, stages, links }).keyDates;
  };

  it('wait for the last stages of every piece, or of those they name', () => {
    const stages = [stage('a', 0), stage('b', 1), stage('c', 0, { pieceId: 'other' })];
    expect(keyDates({}, stages)[0]).toEqual({
      id: 'date',
      productionId: 'production',
      at: date.at,
      strength: 'hard',
      weight: 3,
      stageIds: ['b', 'c'],
    });
    expect(keyDates({ pieceIds: ['other'] }, stages)[0].stageIds).toEqual(['c']);
  });

  it('wait for a dwell that its follower does not wait for', () => {
    const stages = [stage('a', 0, { dwell: resinDwell }), stage('b', 1)];
    const links = [{ fromStageId: 'a', toStageId: 'b', ...PLAIN_LINK, after: 'work' } as const];
    expect(keyDates({}, stages, links)[0].stageIds).toEqual(['a', 'b']);
  });

  it('have nothing left to ask when they are past and all is finished', () => {
    const finished = {
      state: 'finished',
      startedAt: at('2026-11-20T09:00'),
      finishedAt: at('2026-11-20T12:00'),
      makerIds: ['ada'],
    } as const;
    const past = { at: at('2026-11-25T12:00') };
    expect(keyDates(past, [stage('a', 0, finished)])).toEqual([]);
    expect(keyDates(past, [stage('a', 0, finished), stage('b', 1)])).toHaveLength(1);
    expect(keyDates({}, [stage('a', 0, finished)])).toHaveLength(1);
  });
});

describe('progress', () => {
  const started = {
    state: 'started',
    startedAt: at('2026-11-30T09:00'),
    spentMinutes: 50,
    places: [place(['table', 'oven'], 'work')],
  } as const;

  it('of a stage begun keeps crew and bays as reported, and what is said to be left', () => {
    const told = { ...started, makerIds: ['ada'], bayIds: ['oven'], remainingMinutes: 99 };
    expect(build({ stages: [stage('a', 0, told)] }).stages[0].progress).toEqual({
      kind: 'started',
      start: at('2026-11-30T09:00'),
      makerIds: ['ada'],
      bayIds: ['oven'],
      remainingMinutes: 99,
    });
  });

  it('falls back on the issued plan, then on the quickest who hold the craft', () => {
    const makers = [maker('ada'), maker('bo', { crafts: [{ craftId: 'laminating', pacePermille: 1200 }] })];
    const placement = {
      stageId: 'a',
      work: [{ start: NOW, end: NOW + 60 }],
      crew: [{ makerId: 'ada', craftId: 'laminating' }],
      bayIds: ['oven'],
      dwellEnd: NOW + 60,
    };
    const stages = [stage('a', 0, { ...started, makerIds: ['who left'] })];
    const progress = (issued: StudioSnapshot['issued'], own: typeof stages) =>
      build({ makers, stages: own, issued }).stages[0].progress;
    expect(progress({ placements: [placement] }, [stage('a', 0, started)])).toMatchObject({
      makerIds: ['ada'],
      bayIds: ['oven'],
    });
    expect(progress(null, stages)).toMatchObject({ makerIds: ['bo'], bayIds: ['table'], remainingMinutes: 70 });
  });

  it('of a stage finished lies in the past', () => {
    const finished = { state: 'finished', startedAt: at('2026-11-30T09:00'), finishedAt: NOW + 999 } as const;
    expect(build({ stages: [stage('a', 0, finished)] }).stages[0].progress).toMatchObject({
      kind: 'finished',
      end: NOW,
    });
  });
});

describe('what is in the plan', () => {
  it('leaves out productions delivered or declined', () => {
    const states = (state: 'tentative' | 'committed' | 'delivered' | 'declined') =>
      build({ productions: [{ id: 'production', state, keyDates: [] }] }).stages.length;
    expect([states('tentative'), states('committed'), states('delivered'), states('declined')]).toEqual([2, 2, 0, 0]);
  });

  it('freezes what was issued, of stages that are still there', () => {
    const placement = (stageId: string) => ({
      stageId,
      work: [{ start: NOW, end: NOW + 9 }],
      crew: [],
      bayIds: [],
      dwellEnd: NOW + 9,
    });
    const problem = build({ issued: { placements: [placement('first'), placement('gone')] } });
    expect(problem.issued?.placements.map((one) => one.stageId)).toEqual(['first']);
    expect(problem.freezeUntil).toBe(NOW + 600);
    expect(build().freezeUntil).toBe(NOW);
    expect(problem.weights).toEqual({ changePenaltyMinor: 1, unevenness: 2, earliness: 3 });
  });

  it('leaves out stages whose production is not there', () => {
    expect(build({ pieces: [{ id: 'piece', productionId: 'nowhere' }] }).stages).toEqual([]);
  });
});
