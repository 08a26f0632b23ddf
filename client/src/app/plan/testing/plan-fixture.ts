import { WorkingPlanView } from '@common/contract';
import type { Placement, Problem, Stage } from '@common/planning';
import { daySpansIn, startOfDay } from '@common/time/calendar-day';
import type { Minute, Span } from '@common/time/span';

/** The zone of the studio in specs. */
export const ZONE = 'Europe/London';
/** Monday 7 December 2026, midnight in the studio. */
export const MONDAY: Minute = startOfDay('2026-12-07', ZONE);

/** An instant so many days and hours after that Monday. */
export function at(day: number, hour: number, minute = 0): Minute {
  return MONDAY + day * 1440 + hour * 60 + minute;
}

/** A readable uuid: the kind of record in its first group, its number in the last. */
export function idOf(kind: 'maker' | 'bay' | 'stage' | 'piece' | 'production' | 'craft' | 'date', n: number): string {
  const first = { maker: 'a', bay: 'b', stage: '5', piece: '9', production: 'd', craft: 'c', date: 'e' }[kind];
  return `${first.repeat(8)}-0000-4000-8000-${n.toString().padStart(12, '0')}`;
}

const CRAFTS = ['Carving', 'Laminating', 'Painting', 'Metalwork'];
const MAKERS = ['Ines Amadi', 'Tom Varga', 'Wren Okafor', 'Petra Lind', 'Sol Marchetti', 'Hob Ferris'];
const BAYS = ['Hot-wire table', 'Lay-up bench', 'Spray booth', 'Welding bay'];
const STEPS = [
  { name: 'Carve the shape', craft: 0, bay: 0, minutes: 420, dwell: 0, kind: 'make' },
  { name: 'Foam sign-off', craft: null, bay: null, minutes: 0, dwell: 0, kind: 'sign-off' },
  { name: 'Laminate the shell', craft: 1, bay: 1, minutes: 300, dwell: 960, kind: 'make' },
  { name: 'Paint, first coat', craft: 2, bay: 2, minutes: 150, dwell: 240, kind: 'make' },
  { name: 'Load test', craft: 3, bay: 3, minutes: 90, dwell: 0, kind: 'check' },
  { name: 'To the house', craft: null, bay: null, minutes: 240, dwell: 0, kind: 'transport' },
] as const;

/** How large a studio to make up. */
export interface FixtureSize {
  readonly productions: number;
  readonly piecesEach: number;
}

/**
 * A made-up working plan: every piece goes through the same six steps, one maker a step, laid end to end in working time with
 * nobody's bench shared out. It answers the contract, not the engine: makers may be asked twice at once.
 */
export function planFixture(size: FixtureSize = { productions: 3, piecesEach: 3 }): WorkingPlanView {
  const horizon = { start: at(0, 9), end: at(84, 0) };
  const days = daySpansIn({ start: MONDAY, end: horizon.end }, ZONE);
  const shifts = days
    .filter((_, index) => index % 7 < 5)
    .flatMap((day) => [
      { start: day.start + 480, end: day.start + 750 },
      { start: day.start + 780, end: day.start + 1020 },
    ]);
  const pieces = Array.from({ length: size.productions * size.piecesEach }, (_, index) => index);
  const laid = pieces.flatMap((piece) => layPiece(piece, size, shifts));
  const stages = laid.map((one) => one.stage);
  const problem: Problem = {
    horizon,
    makers: MAKERS.map((_, n) => makerOf(n, shifts)),
    bays: BAYS.map((_, n) => ({ id: idOf('bay', n), capacity: n === 1 ? 2 : 1, open: null })),
    stages,
    links: stages.slice(1).flatMap((stage, index) => linkOf(stages[index], stage)),
    keyDates: Array.from({ length: size.productions }, (_, n) => keyDateOf(n, stages)),
    advances: [],
    days: days.map(({ day, start, end }) => ({ day, start, end })),
    workingTime: shifts,
    freezeUntil: at(1, 0),
    issued: null,
    weights: { changePenaltyMinor: 100, unevenness: 1, earliness: 1 },
  };
  return WorkingPlanView.parse(viewOf(problem, laid, pieces, size));
}

type ProblemMaker = Problem['makers'][number];

function makerOf(n: number, shifts: readonly Span[]): ProblemMaker {
  const crafts = [n % CRAFTS.length, (n + 1) % CRAFTS.length];
  return {
    id: idOf('maker', n),
    crafts: crafts.map((craft) => ({ craftId: idOf('craft', craft), pacePermille: 1000 })),
    shifts,
    overtime: [],
    hourCostMinor: 2400,
    overtimeHourCostMinor: 3600,
    limits: null,
  };
}

interface LaidStage {
  readonly stage: Stage;
  readonly placement: Placement;
  readonly step: (typeof STEPS)[number];
}

function layPiece(piece: number, size: FixtureSize, shifts: readonly Span[]): LaidStage[] {
  let free = at(Math.floor(piece / 3) % 40, 9);
  return STEPS.map((step, index) => {
    const id = idOf('stage', piece * STEPS.length + index);
    const work =
      step.craft === null ? [{ start: free, end: free + step.minutes }] : layWork(free, step.minutes, shifts);
    const end = work[work.length - 1].end;
    free = end + step.dwell;
    const crew = step.craft === null ? [] : [{ craftId: idOf('craft', step.craft), least: 1, most: 1 }];
    const bayIds = step.bay === null ? [] : [idOf('bay', step.bay)];
    const stage: Stage = {
      id,
      pieceId: idOf('piece', piece),
      productionId: idOf('production', Math.floor(piece / size.piecesEach)),
      effort: { kind: step.craft === null ? 'duration' : 'person-minutes', minutes: step.minutes },
      crew,
      crewLossPermille: 0,
      continuity: step.craft === null ? 'clock' : 'shifts',
      places: bayIds.map((bayId) => ({ bayIds: [bayId], units: 1, hold: { kind: 'dwell' } })),
      dwell: step.dwell === 0 ? null : { minutes: step.dwell, advance: {}, attendedMinutes: 60, window: null },
      earliestStart: at(0, 9),
      latestEnd: null,
      fixedStart: null,
      pin: null,
      progress: { kind: 'to-do' },
    };
    const makers = crew.map(({ craftId }) => ({ makerId: idOf('maker', (piece + index) % MAKERS.length), craftId }));
    return { stage, placement: { stageId: id, work, crew: makers, bayIds, dwellEnd: free }, step };
  });
}

function layWork(from: Minute, minutes: number, shifts: readonly Span[]): Span[] {
  const work: Span[] = [];
  let left = minutes;
  for (const shift of shifts) {
    const start = Math.max(from, shift.start);
    const end = Math.min(shift.end, start + left);
    if (start >= shift.end || left <= 0) continue;
    work.push({ start, end });
    left -= end - start;
  }
  return work;
}

function linkOf(from: Stage, to: Stage): Problem['links'][number][] {
  if (from.pieceId !== to.pieceId) return [];
  return [
    {
      fromStageId: from.id,
      toStageId: to.id,
      kind: 'finish-start',
      after: 'dwell',
      minGapMinutes: 0,
      maxGapMinutes: null,
      time: 'clock',
    },
  ];
}

function keyDateOf(n: number, stages: readonly Stage[]): Problem['keyDates'][number] {
  const productionId = idOf('production', n);
  return {
    id: idOf('date', n),
    productionId,
    at: at(11 + 7 * n, 10),
    strength: n % 2 === 0 ? 'hard' : 'wished',
    weight: 10,
    stageIds: stages.filter((stage) => stage.productionId === productionId).map((stage) => stage.id),
  };
}

const PRODUCTIONS = [
  'The Drowned Garden',
  'Lanterns',
  'A Winter Market',
  'The Glass Orchard',
  'Tidework',
  'Moonrakers',
];
const MARKS = ['DG', 'LA', 'WM', 'GO', 'TW', 'MR'];
const PIECES = ['Moon', 'Bell', 'Heron', 'Gate', 'Urn', 'Wave'];

function viewOf(problem: Problem, laid: readonly LaidStage[], pieces: readonly number[], size: FixtureSize): unknown {
  const nameOf = (names: readonly string[], n: number): string => names[n % names.length];
  return {
    revision: 7,
    label: 'Working plan',
    changedAt: '2026-12-07T08:45:00Z',
    changedBy: 'Ada Quill',
    canUndo: true,
    canRedo: false,
    undoLabel: 'Move Carve the shape',
    redoLabel: null,
    stale: false,
    fingerprint: '0'.repeat(32),
    zone: ZONE,
    now: problem.horizon.start,
    problem,
    plan: { placements: laid.map((one) => one.placement) },
    unmet: [],
    objective: {
      unplaced: 0,
      hardLateness: 0,
      wishedLateness: 0,
      costMinor: 0,
      unevenness: 0,
      changes: 0,
      finishSum: 0,
    },
    directory: {
      productions: Array.from({ length: size.productions }, (_, n) => ({
        id: idOf('production', n),
        name: nameOf(PRODUCTIONS, n),
        mark: nameOf(MARKS, n),
        hue: n % 12,
        state: n === 2 ? 'tentative' : 'committed',
        clientName: 'Northgate Opera',
      })),
      pieces: pieces.map((piece) => ({
        id: idOf('piece', piece),
        productionId: idOf('production', Math.floor(piece / size.piecesEach)),
        name: nameOf(PIECES, piece),
        position: piece,
      })),
      stages: laid.map(({ stage, step }, index) => ({
        id: stage.id,
        pieceId: stage.pieceId,
        productionId: stage.productionId,
        name: step.name,
        position: index % STEPS.length,
        kind: step.kind,
        state: 'to-do',
        nth: null,
        of: null,
        materialName: step.dwell > 0 ? 'Polyester laminating resin' : null,
        milestone: step.dwell > 0 ? 'demould' : null,
        cautions: step.craft === 1 ? ['Styrene vapour: extraction on, masks with fresh filters.'] : [],
        version: 1,
      })),
      makers: MAKERS.map((name, n) => ({ id: idOf('maker', n), name, initials: name.slice(0, 2).toUpperCase() })),
      crafts: CRAFTS.map((name, n) => ({ id: idOf('craft', n), key: name.toLowerCase(), name })),
      bays: BAYS.map((name, n) => ({ id: idOf('bay', n), name, kind: 'bench', pieceId: null })),
      keyDates: problem.keyDates.map((date) => ({
        id: date.id,
        productionId: date.productionId,
        kind: 'technical-rehearsal',
      })),
    },
    issued: null,
  };
}
