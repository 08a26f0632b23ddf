import type { Problem, Stage } from '@common/planning';

/** A small problem of stages that run by the clock; every part may be given over. */
export interface TimedSketch {
  readonly durations: readonly number[];
  /** [from, to, least minutes between the starts, most or null]. */
  readonly gaps?: readonly (readonly [number, number, number, number | null])[];
  /** Capacity and what each stage takes. */
  readonly bays?: readonly { readonly capacity: number; readonly demands: readonly number[] }[];
  /** Crafts of each maker, and how many each stage needs of each craft. */
  readonly holds?: readonly (readonly boolean[])[];
  readonly needs?: readonly (readonly number[])[];
  readonly end: number;
}

/** The sketch as a planning problem: stages s0, s1 …, bays b0 …, makers m0 …, crafts c0 …; minutes from 0. */
export function timedProblem(sketch: TimedSketch): Problem {
  const horizon = { start: 0, end: sketch.end };
  return {
    horizon,
    makers: (sketch.holds ?? []).map((holds, m) => ({
      id: `m${m}`,
      crafts: holds.flatMap((holdsIt, c) => (holdsIt ? [{ craftId: `c${c}`, pacePermille: 1000 }] : [])),
      shifts: [horizon],
      overtime: [],
      hourCostMinor: 0,
      overtimeHourCostMinor: 0,
      limits: null,
    })),
    bays: (sketch.bays ?? []).map((bay, b) => ({ id: `b${b}`, capacity: bay.capacity, open: null })),
    stages: sketch.durations.map((minutes, s) => timedStage(sketch, s, minutes)),
    links: (sketch.gaps ?? []).map(([from, to, least, most]) => ({
      fromStageId: `s${from}`,
      toStageId: `s${to}`,
      kind: 'start-start',
      after: 'work',
      minGapMinutes: least,
      maxGapMinutes: most,
      time: 'clock',
    })),
    keyDates: [],
    advances: [],
    days: [],
    workingTime: [horizon],
    freezeUntil: 0,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 0, earliness: 1 },
  };
}

function timedStage(sketch: TimedSketch, s: number, minutes: number): Stage {
  const crew = (sketch.needs?.[s] ?? []).flatMap((count, c) =>
    count > 0 && minutes > 0 ? [{ craftId: `c${c}`, least: count, most: count }] : [],
  );
  return {
    id: `s${s}`,
    pieceId: 'piece',
    productionId: 'production',
    effort: { kind: 'duration', minutes },
    crew,
    crewLossPermille: 0,
    continuity: crew.length > 0 ? 'session' : 'clock',
    places: (sketch.bays ?? []).flatMap((bay, b) =>
      bay.demands[s] > 0 ? [{ bayIds: [`b${b}`], units: bay.demands[s], hold: { kind: 'work' as const } }] : [],
    ),
    dwell: null,
    earliestStart: 0,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
  };
}
