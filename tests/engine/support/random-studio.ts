import type { Bay, Dwell, Link, Maker, Problem, Stage, StudioDay } from '@common/planning';
import type { Span } from '@common/time/span';
import { seededRandom } from './seeded-random';

/** Monday 2026-01-05, 00:00 UTC, in minutes since 1970. */
export const MONDAY = 29_459_520;
const DAY = 1440;
const CRAFTS = ['carving', 'metalwork', 'laminating', 'painting', 'filling'] as const;

/** How large and how hard an invented studio is. */
export interface StudioSize {
  readonly seed: number;
  readonly productions: number;
  readonly piecesPerProduction: number;
  readonly makers: number;
  readonly weeks: number;
  /** Hard windows, maximum gaps, pins, visits and progress as well, which may leave no plan without fault. */
  readonly tricky: boolean;
}

/** An invented studio: pieces carved, moulded, laminated, filled and painted by few people in few bays. */
export function randomStudio(size: StudioSize): Problem {
  const random = seededRandom(size.seed);
  const horizon = { start: MONDAY, end: MONDAY + size.weeks * 7 * DAY };
  const days = inventDays(size.weeks);
  const workingTime = days
    .filter((_, d) => d % 7 < 5)
    .map((day) => ({ start: day.start + 480, end: day.start + 1020 }));
  const makers = Array.from({ length: size.makers }, (_, m) => inventMaker(m, size.weeks, random));
  const bays: Bay[] = [
    { id: 'booth-a', capacity: 1, open: days.map((day) => ({ start: day.start + 360, end: day.start + 1320 })) },
    { id: 'booth-b', capacity: 1, open: null },
    { id: 'long-table', capacity: 2, open: null },
    { id: 'welding-bay', capacity: 1, open: workingTime },
  ];
  const stages: Stage[] = [];
  const links: Link[] = [];
  const keyDates: Problem['keyDates'][number][] = [];
  for (let p = 0; p < size.productions; p += 1) {
    const ends: string[] = [];
    for (let q = 0; q < size.piecesPerProduction; q += 1) {
      const piece = inventPiece(`p${p}`, `p${p}-q${q}`, random, size.tricky);
      bays.push(...piece.moulds);
      stages.push(...piece.stages);
      links.push(...piece.links);
      ends.push(piece.stages[piece.stages.length - 1].id);
    }
    const at = MONDAY + random.between(2, size.weeks * 5) * DAY + 720;
    const strength = random.chance(0.5) ? 'hard' : 'wished';
    keyDates.push({
      id: `date-p${p}`,
      productionId: `p${p}`,
      at,
      strength,
      weight: random.between(1, 5),
      stageIds: ends,
    });
  }
  return {
    horizon,
    makers,
    bays,
    stages: size.tricky ? stages.map((stage) => withTricks(stage, random)) : stages,
    links,
    keyDates,
    advances: [
      {
        id: 'cold-nights',
        from: Array.from({ length: size.weeks * 14 }, (_, k) => MONDAY + k * 720),
        permille: Array.from({ length: size.weeks * 14 }, (_, k) => (k % 2 === 0 ? 600 : 1100)),
      },
      { id: 'oven', from: [MONDAY], permille: [2500] },
    ],
    days,
    workingTime,
    freezeUntil: MONDAY,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 1, earliness: 1 },
  };
}

function inventDays(weeks: number): StudioDay[] {
  return Array.from({ length: weeks * 7 }, (_, d) => ({
    day: new Date((MONDAY + d * DAY) * 60_000).toISOString().slice(0, 10),
    start: MONDAY + d * DAY,
    end: MONDAY + (d + 1) * DAY,
  }));
}

type Random = ReturnType<typeof seededRandom>;

function inventMaker(m: number, weeks: number, random: Random): Maker {
  // Every craft is held by somebody, however few the makers.
  const held = new Set<string>(m < 2 ? CRAFTS.filter((_, c) => c % 2 === m) : [random.pick(CRAFTS)]);
  if (m < 2) held.add(CRAFTS[4]);
  while (held.size < 3 && random.chance(0.6)) held.add(random.pick(CRAFTS));
  const shifts: Span[] = [];
  const overtime: Span[] = [];
  const from = random.pick([420, 480, 540]);
  for (let d = 0; d < weeks * 7; d += 1) {
    if (d % 7 >= 5 || random.chance(0.03)) continue;
    const start = MONDAY + d * DAY;
    shifts.push(
      { start: start + from, end: start + from + 240 },
      { start: start + from + 270, end: start + from + 510 },
    );
    if (m % 3 === 0) overtime.push({ start: start + from + 510, end: start + from + 630 });
  }
  return {
    id: `maker-${m}`,
    crafts: [...held].map((craftId) => ({ craftId, pacePermille: random.pick([700, 850, 1000, 1000, 1200]) })),
    shifts,
    overtime,
    hourCostMinor: 2500,
    overtimeHourCostMinor: 4000,
    limits: m % 3 === 0 ? { dayMinutes: 600, weekMinutes: 2880, restBetweenMinutes: 660 } : null,
    paidByTheHour: m === 3,
  };
}

interface Piece {
  readonly stages: Stage[];
  readonly links: Link[];
  readonly moulds: Bay[];
}

function inventPiece(productionId: string, pieceId: string, random: Random, tricky: boolean): Piece {
  const make = (name: string, craftId: string | null, minutes: number, changes: Partial<Stage>): Stage => ({
    id: `${pieceId}-${name}`,
    pieceId,
    productionId,
    effort: { kind: craftId === null ? 'duration' : 'person-minutes', minutes },
    crew: craftId === null ? [] : [{ craftId, least: 1, most: random.between(1, 2) }],
    crewLossPermille: 50,
    continuity: 'shifts',
    places: [],
    dwell: null,
    earliestStart: MONDAY,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
    ...changes,
  });
  const cure = (minutes: number, window: Dwell['window'], changes: Partial<Dwell> = {}): Dwell => ({
    minutes,
    window,
    advance: {},
    attendedMinutes: 0,
    ...changes,
  });
  const booth = (hold: 'work' | 'dwell') => ({
    bayIds: ['booth-a', 'booth-b'],
    units: 1,
    hold: { kind: hold } as const,
  });
  const mould = `${pieceId}-mould`;
  const stages: Stage[] = [
    make('carve', 'carving', random.between(2, 30) * 60, { continuity: random.pick(['shifts', 'free']) }),
    make('approve', null, random.between(1, 3) * DAY, { continuity: 'clock' }),
    make('frame', 'metalwork', random.between(1, 10) * 60, {
      places: [{ bayIds: ['welding-bay'], units: 1, hold: { kind: 'work' } }],
    }),
    make('mould', 'laminating', random.between(2, 8) * 60, {
      dwell: cure(random.between(6, 30) * 60, null),
      places: [{ bayIds: ['long-table'], units: 1, hold: { kind: 'dwell' } }],
    }),
  ];
  const links: Link[] = [];
  const follow = (a: number, b: number, changes: Partial<Link> = {}): void => {
    links.push({
      fromStageId: stages[a].id,
      toStageId: stages[b].id,
      kind: 'finish-start',
      after: 'dwell',
      minGapMinutes: 0,
      maxGapMinutes: null,
      time: 'clock',
      ...changes,
    });
  };
  follow(0, 1);
  follow(1, 2, { kind: 'start-start', minGapMinutes: 60 });
  follow(1, 3);
  const casts = random.between(1, 2);
  for (let cast = 0; cast < casts; cast += 1) {
    const at = stages.length;
    stages.push(
      make(`lay-up-${cast}`, 'laminating', random.between(2, 4) * 30, {
        continuity: 'session',
        dwell: cure(random.between(8, 20) * 60, null, {
          attendedMinutes: random.pick([0, 30]),
          advance: { [mould]: 'cold-nights' },
        }),
        places: [{ bayIds: [mould], units: 1, hold: { kind: 'until-stage', stageId: `${pieceId}-demould-${cast}` } }],
      }),
      make(`demould-${cast}`, 'laminating', 45, { continuity: 'session' }),
      make(`fill-${cast}`, 'filling', random.between(1, 8) * 60, { continuity: 'free' }),
      make(`coat-1-${cast}`, 'painting', random.between(1, tricky ? 6 : 3) * 30, {
        continuity: 'session',
        dwell: cure(
          random.between(2, 6) * 60,
          random.chance(0.7)
            ? {
                kind: tricky && random.chance(0.5) ? 'hard' : 'soft',
                minutes: random.between(20, 60) * 60,
                extraMinutes: 60,
                costMinor: 1500,
              }
            : null,
          { advance: { 'booth-a': 'oven', 'booth-b': 'cold-nights' } },
        ),
        places: [booth('dwell')],
      }),
      make(`coat-2-${cast}`, 'painting', random.between(1, tricky ? 6 : 3) * 30, {
        continuity: 'session',
        dwell: cure(240, null),
        places: [booth('work')],
      }),
    );
    follow(3, at);
    follow(at, at + 1);
    follow(at + 1, at + 2, { minGapMinutes: 30, time: 'working' });
    follow(2, at + 2, { kind: 'finish-finish', after: 'work' });
    follow(at + 2, at + 3);
    follow(at + 3, at + 4, tricky && random.chance(0.4) ? { maxGapMinutes: random.between(1, 4) * DAY } : {});
  }
  stages.push(make('pack', 'carving', 60, { continuity: 'shifts' }));
  for (let cast = 0; cast < casts; cast += 1) follow(8 + 5 * cast, stages.length - 1);
  return { stages, links, moulds: [{ id: mould, capacity: 1, open: null }] };
}

/** Pins, visits, purchases and deadlines that a manager might set without asking whether they can be kept. */
function withTricks(stage: Stage, random: Random): Stage {
  const at = MONDAY + random.between(0, 15) * DAY + random.between(8, 16) * 60;
  if (random.chance(0.05)) return { ...stage, pin: { start: at, makerIds: null, bayIds: null } };
  if (random.chance(0.05)) return { ...stage, earliestStart: at };
  if (random.chance(0.03)) return { ...stage, latestEnd: at + 20 * DAY };
  if (random.chance(0.02) && stage.crew.length > 0) return { ...stage, fixedStart: at };
  return stage;
}
