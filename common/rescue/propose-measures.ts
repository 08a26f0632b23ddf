import { climateAt } from '../dwell/climate';
import type { SnapshotMilestone, SnapshotStage, StudioSnapshot } from '../planning-input';
import { addDays, dayNumber, dayOfInstant } from '../time/calendar-day';
import type { CalendarDay, Minute } from '../time/span';
import { instantOfLocal, MINUTES_PER_DAY } from '../time/zone';
import type { MeasureKind } from '../domain/measure-kind';
import type { Measure, RescueTerms } from './measure';

/** What is known of a date at risk when measures are looked for. */
export interface AtRisk {
  readonly keyDateId: string;
  /** When it is ready in nine of ten draws. */
  readonly p90: Minute;
  /** Stages most often on its driving chain, most often first. */
  readonly driverIds: readonly string[];
  /** Who works on a stage in the plan, and where. */
  readonly makersOf: (stageId: string) => readonly string[];
  readonly baysOf: (stageId: string) => readonly string[];
  readonly now: Minute;
}

/** At most so many of a kind, the most promising first: more would repeat each other. */
const MOST_OF_A_KIND = 3;
const WEEKEND_START = 9 * 60;
const END_OF_DAY = 17 * 60;

/** Every single measure that the terms allow and that touches what drives the date. Deterministic, each once. */
export function proposeMeasures(snapshot: StudioSnapshot, risk: AtRisk, terms: RescueTerms): readonly Measure[] {
  const drivers = risk.driverIds.flatMap((id) => snapshot.stages.find((stage) => stage.id === id) ?? []);
  const about: About = { snapshot, risk, terms, drivers, today: dayOfInstant(risk.now, snapshot.zone) };
  return terms.allowed.flatMap((kind) => PROPOSERS[kind](about).slice(0, MOST_OF_A_KIND));
}

interface About {
  readonly snapshot: StudioSnapshot;
  readonly risk: AtRisk;
  readonly terms: RescueTerms;
  readonly drivers: readonly SnapshotStage[];
  readonly today: CalendarDay;
}

const PROPOSERS: Readonly<Record<MeasureKind, (about: About) => readonly Measure[]>> = {
  overtime: ({ risk, terms, drivers, today }) =>
    makersOn(drivers, risk).map((makerId) => ({
      kind: 'overtime',
      makerId,
      from: today,
      until: addDays(today, terms.eveningDays),
      minutesADay: terms.eveningMinutes,
    })),
  'weekend-shift': ({ risk, terms, drivers, today }) =>
    makersOn(drivers, risk).map((makerId) => ({
      kind: 'weekend-shift',
      makerId,
      day: nextSaturday(today),
      startMinuteOfDay: WEEKEND_START,
      minutes: terms.weekendMinutes,
    })),
  freelancer: ({ snapshot, terms, drivers, today }) =>
    unique(drivers.flatMap((stage) => stage.crew.map(({ craftId }) => craftId)))
      .filter((craftId) => !snapshot.makers.some((maker) => maker.id === freelancerId(craftId)))
      .map((craftId) => ({
        kind: 'freelancer',
        makerId: freelancerId(craftId),
        craftId,
        from: addDays(today, 1),
        days: terms.freelancerDays,
      })),
  heat: proposeHeat,
  'second-mould': ({ snapshot, risk, drivers }) =>
    unique(drivers.flatMap((stage) => risk.baysOf(stage.id)))
      .filter((bayId) => snapshot.bays.some((bay) => bay.id === bayId && bay.isMould))
      .map((bayId) => ({ kind: 'second-mould', bayId })),
  'faster-material': ({ snapshot, drivers }) => drivers.flatMap((stage) => fasterFor(stage, snapshot)),
  'earlier-sign-off': ({ drivers }) =>
    drivers
      .filter((stage) => stage.kind === 'sign-off' && stage.visitAt === null && stage.replyMinutes > MINUTES_PER_DAY)
      .map((stage) => ({
        kind: 'earlier-sign-off',
        stageId: stage.id,
        replyMinutes: Math.round(stage.replyMinutes / 2),
      })),
  'part-delivery': proposePart,
  'later-date': proposeLater,
};

/** One id for the freelancer of a craft: the craft's own with version 8 (RFC 9562), which no stored record has. */
function freelancerId(craftId: string): string {
  return `${craftId.slice(0, 14)}8${craftId.slice(15)}`;
}

function makersOn(drivers: readonly SnapshotStage[], risk: AtRisk): readonly string[] {
  return unique(drivers.flatMap((stage) => risk.makersOf(stage.id)));
}

/** Bays in which a driving stage dwells by a law that warmth moves, and that are colder than the heater makes them. */
function proposeHeat({ snapshot, risk, terms, drivers }: About): readonly Measure[] {
  const curing = drivers.filter((stage) => {
    const law = milestoneOf(stage, snapshot)?.behaviour.law.kind;
    return law !== undefined && law !== 'none';
  });
  return unique(curing.flatMap((stage) => risk.baysOf(stage.id)))
    .filter((bayId) => {
      const bay = snapshot.bays.find((one) => one.id === bayId);
      return bay && climateAt(bay.climate ?? snapshot.room, risk.now).celsius < terms.heatCelsius;
    })
    .map((bayId) => ({ kind: 'heat', bayId, celsius: terms.heatCelsius, from: risk.now, until: risk.p90 }));
}

/** Materials of the same family that reach the same milestone sooner. */
function fasterFor(stage: SnapshotStage, snapshot: StudioSnapshot): readonly Measure[] {
  const { dwell } = stage;
  const now = snapshot.materials.find((material) => material.id === dwell?.materialId);
  if (!dwell || !now || dwell.milestone === null || stage.state !== 'to-do') return [];
  return snapshot.materials.flatMap(({ id, family, milestones }): Measure[] => {
    const same = milestones.find(({ milestone }) => milestone === dwell.milestone);
    if (id === now.id || family !== now.family || !same || same.minutes.likely >= dwell.minutes) return [];
    const { milestone, minutes } = same;
    return [{ kind: 'faster-material', stageId: stage.id, materialId: id, milestone, minutes: minutes.likely }];
  });
}

/** The date without the pieces that drive it, where others are left to deliver. */
function proposePart({ snapshot, risk, drivers }: About): readonly Measure[] {
  const date = snapshot.productions.flatMap(({ id, keyDates }) =>
    keyDates.filter((one) => one.id === risk.keyDateId).map((one) => ({ ...one, productionId: id })),
  )[0];
  if (date === undefined) return [];
  const asked =
    date.pieceIds.length > 0
      ? date.pieceIds
      : snapshot.pieces.filter((piece) => piece.productionId === date.productionId).map((piece) => piece.id);
  const late = new Set(drivers.slice(0, 1).map((stage) => stage.pieceId));
  const pieceIds = asked.filter((id) => !late.has(id));
  return pieceIds.length > 0 && pieceIds.length < asked.length
    ? [{ kind: 'part-delivery', keyDateId: risk.keyDateId, pieceIds }]
    : [];
}

/** The end of the first day by which nine of ten draws are ready, if that is no more days later than the studio would ask for. */
function proposeLater({ snapshot, risk, terms }: About): readonly Measure[] {
  const at = snapshot.productions.flatMap(({ keyDates }) => keyDates).find((one) => one.id === risk.keyDateId)?.at;
  if (at === undefined || risk.p90 <= at) return [];
  let day = dayOfInstant(risk.p90, snapshot.zone);
  if (endOf(day, snapshot.zone) < risk.p90) day = addDays(day, 1);
  const until = endOf(day, snapshot.zone);
  return until - at <= terms.laterDays * MINUTES_PER_DAY
    ? [{ kind: 'later-date', keyDateId: risk.keyDateId, at: until }]
    : [];
}

function endOf(day: CalendarDay, zone: string): Minute {
  return instantOfLocal(dayNumber(day) * MINUTES_PER_DAY + END_OF_DAY, zone);
}

function milestoneOf({ dwell }: SnapshotStage, { materials }: StudioSnapshot): SnapshotMilestone | undefined {
  return materials
    .find((material) => material.id === dwell?.materialId)
    ?.milestones.find(({ milestone }) => milestone === dwell?.milestone);
}

function nextSaturday(today: CalendarDay): CalendarDay {
  let day = addDays(today, 1);
  while (new Date(`${day}T00:00Z`).getUTCDay() !== 6) day = addDays(day, 1);
  return day;
}

function unique<T>(items: readonly T[]): readonly T[] {
  return [...new Set(items)];
}
