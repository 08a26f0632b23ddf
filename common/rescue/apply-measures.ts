import type { ClimateHistory, ClimateStep } from '../dwell/climate';
import { climateAt } from '../dwell/climate';
import type { MakerPattern, SnapshotMaker, SnapshotStage, StudioSnapshot } from '../planning-input';
import { addDays } from '../time/calendar-day';
import type { Minute } from '../time/span';
import type { Measure } from './measure';

const MORNING_MINUTE = 9 * 60;
const DAY_MINUTES = 8 * 60;

/** The studio as it would be with the measures; what they name and is there no more is passed over. The order does not matter. */
export function applyMeasures(snapshot: StudioSnapshot, measures: readonly Measure[]): StudioSnapshot {
  return measures.reduce(applyMeasure, snapshot);
}

function applyMeasure(snapshot: StudioSnapshot, measure: Measure): StudioSnapshot {
  switch (measure.kind) {
    case 'overtime':
      return withMaker(snapshot, measure.makerId, (maker) => ({
        ...maker,
        patterns: [...maker.patterns, ...maker.patterns.flatMap((pattern) => evening(pattern, measure))],
      }));
    case 'weekend-shift':
      return withMaker(snapshot, measure.makerId, (maker) => ({
        ...maker,
        patterns: [...maker.patterns, oneDay(measure)],
      }));
    case 'freelancer':
      return { ...snapshot, makers: [...snapshot.makers, freelancer(measure)] };
    case 'heat':
      return {
        ...snapshot,
        bays: snapshot.bays.map((bay) =>
          bay.id === measure.bayId ? { ...bay, climate: warmed(bay.climate ?? snapshot.room, measure) } : bay,
        ),
      };
    case 'second-mould':
      return {
        ...snapshot,
        bays: snapshot.bays.map((bay) => (bay.id === measure.bayId ? { ...bay, capacity: bay.capacity + 1 } : bay)),
      };
    case 'faster-material':
      return withStage(snapshot, measure.stageId, (stage) => {
        const { materialId, milestone, minutes } = measure;
        return stage.dwell ? { ...stage, dwell: { ...stage.dwell, materialId, milestone, minutes } } : stage;
      });
    case 'earlier-sign-off':
      return withStage(snapshot, measure.stageId, (stage) => ({
        ...stage,
        replyMinutes: Math.min(stage.replyMinutes, measure.replyMinutes),
      }));
    case 'part-delivery':
      return withKeyDate(snapshot, measure.keyDateId, { pieceIds: measure.pieceIds });
    case 'later-date':
      return withKeyDate(snapshot, measure.keyDateId, { at: measure.at });
  }
}

function withMaker(
  snapshot: StudioSnapshot,
  makerId: string,
  change: (maker: SnapshotMaker) => SnapshotMaker,
): StudioSnapshot {
  return { ...snapshot, makers: snapshot.makers.map((maker) => (maker.id === makerId ? change(maker) : maker)) };
}

function withStage(
  snapshot: StudioSnapshot,
  stageId: string,
  change: (stage: SnapshotStage) => SnapshotStage,
): StudioSnapshot {
  return { ...snapshot, stages: snapshot.stages.map((stage) => (stage.id === stageId ? change(stage) : stage)) };
}

function withKeyDate(
  snapshot: StudioSnapshot,
  keyDateId: string,
  change: { readonly pieceIds: readonly string[] } | { readonly at: Minute },
): StudioSnapshot {
  return {
    ...snapshot,
    productions: snapshot.productions.map((production) => ({
      ...production,
      keyDates: production.keyDates.map((date) => (date.id === keyDateId ? { ...date, ...change } : date)),
    })),
  };
}

/** Time after a shift, on the days of its own rule; a rule that ends by itself keeps its end. */
function evening(pattern: MakerPattern, measure: Measure & { readonly kind: 'overtime' }): MakerPattern[] {
  const start = pattern.startMinuteOfDay + pattern.lengthMinutes;
  if (pattern.kind !== 'ordinary' || start + measure.minutesADay > 1440 || /COUNT=|UNTIL=/.test(pattern.rule))
    return [];
  const last = addDays(measure.until, -1).replaceAll('-', '');
  const rule = `${pattern.rule};UNTIL=${last}`;
  return [{ ...pattern, kind: 'overtime', rule, startMinuteOfDay: start, lengthMinutes: measure.minutesADay }];
}

function oneDay(measure: Measure & { readonly kind: 'weekend-shift' }): MakerPattern {
  const { day, startMinuteOfDay, minutes } = measure;
  return {
    kind: 'overtime',
    firstDay: day,
    rule: 'FREQ=DAILY;COUNT=1',
    startMinuteOfDay,
    lengthMinutes: minutes,
    exceptDays: [],
  };
}

function freelancer({ makerId, craftId, from, days }: Measure & { readonly kind: 'freelancer' }): SnapshotMaker {
  const rule = `FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR;COUNT=${days}`;
  return {
    id: makerId,
    crafts: [{ craftId, pacePermille: 1000 }],
    patterns: [
      {
        kind: 'ordinary',
        firstDay: from,
        rule,
        startMinuteOfDay: MORNING_MINUTE,
        lengthMinutes: DAY_MINUTES,
        exceptDays: [],
      },
    ],
    leave: [],
    // Paid by the day whether called or not: see `priceOf`.
    hourCostMinor: 0,
    dayLimitMinutes: null,
    weekLimitMinutes: null,
  };
}

/** The history with nothing colder than the heater allows while it is on; the air's moisture is left as it is told. */
function warmed(
  history: ClimateHistory,
  { celsius, from, until }: Measure & { readonly kind: 'heat' },
): ClimateHistory {
  const within = history.filter((step) => step.from > from && step.from < until);
  const warm = (step: ClimateStep): ClimateStep => ({ ...step, celsius: Math.max(step.celsius, celsius) });
  return [
    ...history.filter((step) => step.from < from),
    warm({ from, ...air(history, from) }),
    ...within.map(warm),
    { from: until, ...air(history, until) },
    ...history.filter((step) => step.from > until),
  ];
}

function air(history: ClimateHistory, at: Minute): { celsius: number; humidityPercent: number } {
  const { celsius, humidityPercent } = climateAt(history, at);
  return { celsius, humidityPercent };
}
