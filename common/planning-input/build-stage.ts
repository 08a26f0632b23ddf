import type { AdvanceProfiles } from './advance-profiles';
import type { SnapshotMaker, SnapshotPurchase, SnapshotStage } from './studio-snapshot';
import type { PlaceWanted } from '../domain/stage-draft';
import type { Dwell } from '../planning/problem/dwell';
import type { Placement } from '../planning/problem/plan';
import type { Continuity, Effort, PlaceNeed, Stage, StageProgress } from '../planning/problem/problem';
import { addDays, dayOfInstant, startOfDay } from '../time/calendar-day';
import type { Minute } from '../time/span';

/** How long a visit takes where the stage says nothing. */
const VISIT_MINUTES = 60;

const MS_PER_MINUTE = 60_000;

/** What the stages of one problem are made against. */
export interface StageSurroundings {
  readonly now: Minute;
  readonly zone: string;
  readonly productionOf: (pieceId: string) => string;
  readonly advances: AdvanceProfiles;
  readonly makers: readonly SnapshotMaker[];
  readonly purchases: readonly SnapshotPurchase[];
  readonly issuedPlacements: ReadonlyMap<string, Placement>;
}

/** One stage of the snapshot as the engine sees it. */
export function buildStage(stage: SnapshotStage, around: StageSurroundings): Stage {
  const visit = visitOf(stage, around.now);
  const begun = stage.state !== 'to-do';
  return {
    id: stage.id,
    pieceId: stage.pieceId,
    productionId: around.productionOf(stage.pieceId),
    effort: effortOf(stage, visit),
    crew: stage.crew.map(({ craftId, least, most }) => ({ craftId, least, most })),
    crewLossPermille: stage.crewLossPermille,
    continuity: continuityOf(stage, visit),
    places: stage.places.map(placeOf),
    dwell: dwellOf(stage, around.advances),
    earliestStart: begun ? around.now : Math.max(around.now, partsThere(stage.id, around)),
    latestEnd: null,
    fixedStart: begun ? null : visit,
    pin: begun ? null : stage.pin,
    progress: progressOf(stage, around),
  };
}

/** The agreed instant of a visit still ahead; one gone by without a decision has become a message awaited. */
function visitOf(stage: SnapshotStage, now: Minute): Minute | null {
  const visit = stage.visitAt === null ? null : Math.floor(Date.parse(stage.visitAt) / MS_PER_MINUTE);
  return visit === null || visit < now ? null : visit;
}

function effortOf(stage: SnapshotStage, visit: Minute | null): Effort {
  if (stage.kind === 'sign-off') {
    const visitMinutes = stage.handsOn.likelyMinutes || VISIT_MINUTES;
    return { kind: 'duration', minutes: visit === null ? stage.replyMinutes : visitMinutes };
  }
  const kind = stage.crew.length === 0 ? 'duration' : 'person-minutes';
  return { kind, minutes: stage.handsOn.likelyMinutes };
}

/** Where nobody's hands are asked for there is no shift to keep to. */
function continuityOf(stage: SnapshotStage, visit: Minute | null): Continuity {
  if (stage.crew.length === 0) {
    return 'clock';
  }
  if (stage.kind === 'sign-off') {
    return visit === null ? 'shifts' : 'session';
  }
  return stage.continuity === 'clock' ? 'shifts' : stage.continuity;
}

function placeOf({ bayIds, units, hold, untilStageId }: PlaceWanted): PlaceNeed {
  if (hold !== 'until-stage') {
    return { bayIds, units, hold: { kind: hold } };
  }
  // A hold whose last stage was taken out lets go with the dwell.
  return { bayIds, units, hold: untilStageId === null ? { kind: 'dwell' } : { kind: hold, stageId: untilStageId } };
}

function dwellOf(stage: SnapshotStage, advances: AdvanceProfiles): Dwell | null {
  if (stage.dwell === null) {
    return null;
  }
  const { minutes, attendedMinutes, window } = stage.dwell;
  return {
    minutes,
    attendedMinutes: stage.crew.length === 0 ? 0 : attendedMinutes,
    advance: advances.advanceOf(stage),
    window: window?.kind === 'hard' ? { kind: 'hard', minutes: window.minutes } : softWindow(window),
  };
}

function softWindow(window: NonNullable<SnapshotStage['dwell']>['window']): Dwell['window'] {
  return (
    window && { kind: 'soft', minutes: window.minutes, extraMinutes: window.extraMinutes, costMinor: window.costMinor }
  );
}

/**
 * The instant from which all parts bought for a stage are counted on: the morning after the day each is due, since a carrier
 * names a day and not an hour. A part not ordered yet is due as if ordered today; an overdue one as if it came today.
 */
function partsThere(stageId: string, { now, zone, purchases }: StageSurroundings): Minute {
  const today = dayOfInstant(now, zone);
  const awaited = purchases.filter((purchase) => purchase.stageId === stageId && purchase.receivedOn === null);
  return awaited.reduce((latest, purchase) => {
    const due = purchase.dueOn ?? addDays(purchase.orderedOn ?? today, purchase.leadDays);
    return Math.max(latest, startOfDay(addDays(due < today ? today : due, 1), zone));
  }, -Infinity);
}

function progressOf(stage: SnapshotStage, around: StageSurroundings): StageProgress {
  if (stage.state === 'to-do') {
    return { kind: 'to-do' };
  }
  const start = Math.min(stage.startedAt ?? stage.finishedAt ?? around.now, around.now);
  const makerIds = crewOf(stage, around);
  const bayIds = baysOf(stage, around);
  if (stage.state === 'finished') {
    const end = Math.max(start, Math.min(stage.finishedAt ?? around.now, around.now));
    return { kind: 'finished', start, end, makerIds, bayIds };
  }
  const remainingMinutes = stage.remainingMinutes ?? Math.max(0, stage.handsOn.likelyMinutes - stage.spentMinutes);
  return { kind: 'started', start, makerIds, bayIds, remainingMinutes };
}

/**
 * Who is on a stage begun: those who reported it, else those it was issued to, else, so that the work still counts on
 * somebody, the least crew of the quickest who hold its crafts. Makers who have left are not counted on.
 */
function crewOf(stage: SnapshotStage, { makers, issuedPlacements }: StageSurroundings): readonly string[] {
  const known = new Set(makers.map((maker) => maker.id));
  const issued = issuedPlacements.get(stage.id)?.crew.map((member) => member.makerId);
  const told = (stage.makerIds ?? issued ?? []).filter((id) => known.has(id));
  return told.length > 0 || stage.state === 'finished' ? told : quickestCrew(stage, makers);
}

function quickestCrew(stage: SnapshotStage, makers: readonly SnapshotMaker[]): readonly string[] {
  const chosen = new Set<string>();
  for (const { craftId, least } of stage.crew) {
    const pace = (maker: SnapshotMaker) => maker.crafts.find((craft) => craft.craftId === craftId)?.pacePermille ?? 0;
    makers
      .filter((maker) => pace(maker) > 0 && !chosen.has(maker.id))
      .toSorted((a, b) => pace(b) - pace(a) || (a.id < b.id ? -1 : 1))
      .slice(0, least)
      .forEach((maker) => chosen.add(maker.id));
  }
  return [...chosen];
}

/** Where a stage begun stands: as reported, else as issued, else in the first bay that each place allows. */
function baysOf(stage: SnapshotStage, { issuedPlacements }: StageSurroundings): readonly string[] {
  const told = stage.bayIds ?? issuedPlacements.get(stage.id)?.bayIds ?? [];
  return stage.places.map((place, i) => told[i] ?? place.bayIds[0]);
}
