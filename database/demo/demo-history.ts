import type { DemoCalendar } from './demo-calendar';
import type { DemoMaker, DemoStage } from './demo-studio-types';

/** A stage before anything has happened to it. */
export type PlannedStage = Omit<
  DemoStage,
  'state' | 'startedAt' | 'finishedAt' | 'spentMinutes' | 'remainingMinutes' | 'makerIds' | 'bayIds' | 'decision'
>;

/** How far a piece has come: stages done in their order, and the share of the next that is left where it was begun. */
export interface Progress {
  readonly finished: number;
  readonly startedLeft: number | null;
}

const MINUTES_A_DAY = 420;

/** What stages took against what was likely: no two jobs go alike, and nothing here is random. */
const TOOK = [0.9, 1.15, 1, 1.25, 0.85, 1.05] as const;

/** Gives the stages of a piece their past: done on the weekdays before today, by makers who hold the crafts. */
export function withHistory(
  stages: readonly PlannedStage[],
  progress: Progress,
  calendar: DemoCalendar,
  makers: readonly DemoMaker[],
): readonly DemoStage[] {
  const past = new Map<string, DemoStage>();
  let lastDay = -1;
  const started = progress.startedLeft === null ? undefined : stages[progress.finished];
  if (started) {
    past.set(started.id, startedStage(started, progress.startedLeft ?? 1, calendar, makers));
    lastDay -= 1 + dwellDays(stages[progress.finished - 1]);
  }
  for (let i = progress.finished - 1; i >= 0; i -= 1) {
    const stage = stages[i];
    const spentMinutes = Math.round(stage.handsOn.likelyMinutes * TOOK[i % TOOK.length]);
    const days = stage.crew.length === 0 ? 2 : Math.max(1, Math.ceil(spentMinutes / MINUTES_A_DAY));
    past.set(stage.id, finishedStage(stage, { lastDay, days, spentMinutes }, calendar, makers));
    lastDay -= days + (i > 0 ? dwellDays(stages[i - 1]) : 0);
  }
  return stages.map((stage) => past.get(stage.id) ?? { ...stage, ...UNTOUCHED });
}

const UNTOUCHED = {
  state: 'to-do',
  startedAt: null,
  finishedAt: null,
  spentMinutes: 0,
  remainingMinutes: null,
  makerIds: [],
  bayIds: [],
  decision: null,
} as const;

interface Done {
  /** The weekday from today on which it ended, below zero. */
  readonly lastDay: number;
  readonly days: number;
  readonly spentMinutes: number;
}

function finishedStage(
  stage: PlannedStage,
  { lastDay, days, spentMinutes }: Done,
  calendar: DemoCalendar,
  makers: readonly DemoMaker[],
): DemoStage {
  const startedAt = calendar.at(lastDay - days + 1, '09:00');
  const onLastDay = stage.crew.length === 0 ? 390 : Math.max(15, spentMinutes - (days - 1) * MINUTES_A_DAY);
  return {
    ...stage,
    state: 'finished',
    startedAt,
    finishedAt: calendar.at(lastDay, '09:00') + onLastDay,
    spentMinutes: stage.crew.length === 0 ? 0 : spentMinutes,
    remainingMinutes: 0,
    makerIds: crewOf(stage, makers),
    bayIds: stage.places.map((place) => place.bayIds[0]),
    decision: stage.kind === 'sign-off' ? 'approved' : null,
  };
}

function startedStage(
  stage: PlannedStage,
  left: number,
  calendar: DemoCalendar,
  makers: readonly DemoMaker[],
): DemoStage {
  const likely = stage.handsOn.likelyMinutes;
  return {
    ...stage,
    state: 'started',
    startedAt: calendar.at(-1, '13:00'),
    finishedAt: null,
    spentMinutes: Math.round(likely * (1 - left)),
    remainingMinutes: Math.round(likely * left),
    makerIds: crewOf(stage, makers),
    bayIds: stage.places.map((place) => place.bayIds[0]),
    decision: null,
  };
}

/** The quickest at each craft, or the next one at every other stage. */
function crewOf(stage: PlannedStage, makers: readonly DemoMaker[]): readonly string[] {
  const ids = stage.crew.flatMap(({ craftId, least }) => {
    const pace = (maker: DemoMaker) => maker.crafts.find((craft) => craft.craftId === craftId)?.pacePermille ?? 0;
    const able = makers.filter((maker) => pace(maker) > 0).toSorted((a, b) => pace(b) - pace(a));
    const first = stage.position % Math.max(1, Math.min(2, able.length - least + 1));
    return able.slice(first, first + least).map((maker) => maker.id);
  });
  return [...new Set(ids)];
}

function dwellDays(stage: PlannedStage | undefined): number {
  return Math.ceil((stage?.dwell?.minutes ?? 0) / 1440);
}
