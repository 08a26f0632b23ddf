import { AdvanceProfiles } from './advance-profiles';
import { buildKeyDates } from './build-key-dates';
import { buildLinks } from './build-links';
import { buildStage } from './build-stage';
import type { PlanningSettings, SnapshotBay, SnapshotMaker, SnapshotStage, StudioSnapshot } from './studio-snapshot';
import type { Plan } from '../planning/problem/plan';
import type { Bay, Maker, Problem } from '../planning/problem/problem';
import { availableSpans } from '../time/availability';
import { daySpansIn } from '../time/calendar-day';
import type { Minute, Span } from '../time/span';
import { normaliseSpans, subtractSpans } from '../time/span-list';
import { MINUTES_PER_DAY } from '../time/zone';

/** What a problem is built for. */
export interface BuildOptions {
  /** The instant that counts as now: nothing still to do is placed before it. */
  readonly now: Minute;
  /** What does not fit before this is unmet; null for `usualHorizonEnd`. */
  readonly horizonEnd: Minute | null;
}

/** Room after the last date for what comes too late, and the least that a studio looks ahead. */
const DAYS_AFTER_LAST_DATE = 56;
const LEAST_DAYS_AHEAD = 84;

/**
 * Turns the studio into a problem for the engine: patterns into spans, laws and climates into advance profiles, purchases
 * into earliest starts, key dates into the stages they wait for. Pure; the same snapshot and options give the same problem.
 */
export function buildProblem(snapshot: StudioSnapshot, options: BuildOptions): Problem {
  const { now } = options;
  const horizon: Span = { start: now, end: options.horizonEnd ?? usualHorizonEnd(snapshot, now) };
  const stages = stagesInPlan(snapshot);
  const advances = new AdvanceProfiles(snapshot);
  const links = buildLinks(stages, snapshot.links);
  const productionOf = productionByPiece(snapshot);
  const issued = issuedIn(snapshot.issued, stages);
  const issuedPlacements = new Map(issued?.placements.map((placement) => [placement.stageId, placement]));
  const around = { ...snapshot, now, productionOf, advances, issuedPlacements };
  const inPlan = snapshot.productions.filter(isInPlan);
  const makers = snapshot.makers.map((maker) => buildMaker(maker, snapshot, horizon));
  // Building the stages is what gathers the advances.
  const engineStages = stages.map((stage) => buildStage(stage, around));
  return {
    horizon,
    makers,
    bays: snapshot.bays.map((bay) => buildBay(bay, snapshot, horizon)),
    stages: engineStages,
    links,
    keyDates: buildKeyDates(inPlan, { stages, productionOf, links }, now),
    advances: advances.all(),
    days: daySpansIn(horizon, snapshot.zone),
    workingTime: normaliseSpans(makers.flatMap((maker) => maker.shifts)),
    freezeUntil: issued ? now + snapshot.settings.freezeMinutes : now,
    issued,
    weights: weightsOf(snapshot.settings),
  };
}

/** Eight weeks past the last key date in the plan, and twelve weeks from now at least. */
export function usualHorizonEnd(snapshot: StudioSnapshot, now: Minute): Minute {
  const dates = snapshot.productions.filter(isInPlan).flatMap((production) => production.keyDates);
  const lastDate = dates.reduce((last, date) => Math.max(last, date.at), now);
  return Math.max(lastDate + DAYS_AFTER_LAST_DATE * MINUTES_PER_DAY, now + LEAST_DAYS_AHEAD * MINUTES_PER_DAY);
}

function isInPlan(production: StudioSnapshot['productions'][number]): boolean {
  return production.state === 'tentative' || production.state === 'committed';
}

function stagesInPlan(snapshot: StudioSnapshot): readonly SnapshotStage[] {
  const productions = new Set(snapshot.productions.filter(isInPlan).map((production) => production.id));
  const pieces = new Set(
    snapshot.pieces.filter((piece) => productions.has(piece.productionId)).map((piece) => piece.id),
  );
  return snapshot.stages.filter((stage) => pieces.has(stage.pieceId));
}

function productionByPiece({ pieces }: StudioSnapshot): (pieceId: string) => string {
  const productionOf = new Map(pieces.map((piece) => [piece.id, piece.productionId]));
  return (pieceId) => {
    const productionId = productionOf.get(pieceId);
    if (productionId === undefined) {
      throw new RangeError(`No piece “${pieceId}” in the snapshot.`);
    }
    return productionId;
  };
}

function issuedIn(issued: Plan | null, stages: readonly SnapshotStage[]): Plan | null {
  const known = new Set(stages.map((stage) => stage.id));
  return issued && { placements: issued.placements.filter((placement) => known.has(placement.stageId)) };
}

function buildMaker(maker: SnapshotMaker, { zone, closures, settings }: StudioSnapshot, horizon: Span): Maker {
  const spansOf = (kind: 'ordinary' | 'overtime') => {
    const patterns = maker.patterns.filter((pattern) => pattern.kind === kind);
    return availableSpans({ patterns, away: [...maker.leave, ...closures] }, horizon, zone);
  };
  const shifts = spansOf('ordinary');
  return {
    id: maker.id,
    crafts: maker.crafts.map(({ craftId, pacePermille }) => ({ craftId, pacePermille })),
    shifts,
    overtime: subtractSpans(spansOf('overtime'), shifts),
    hourCostMinor: maker.hourCostMinor,
    overtimeHourCostMinor: Math.round((maker.hourCostMinor * settings.overtimePermille) / 1000),
    limits: {
      dayMinutes: maker.dayLimitMinutes ?? settings.dayLimitMinutes,
      weekMinutes: maker.weekLimitMinutes ?? settings.weekLimitMinutes,
      restBetweenMinutes: settings.restBetweenMinutes,
    },
  };
}

/** Without openings a bay is always open; in closures and at night there is nobody to use it. */
function buildBay({ id, capacity, openings }: SnapshotBay, snapshot: StudioSnapshot, horizon: Span): Bay {
  const availability = { patterns: openings, away: snapshot.closures };
  return { id, capacity, open: openings.length === 0 ? null : availableSpans(availability, horizon, snapshot.zone) };
}

function weightsOf(settings: PlanningSettings): Problem['weights'] {
  return {
    changePenaltyMinor: settings.changePenaltyMinor,
    unevenness: settings.unevennessWeight,
    earliness: settings.earlinessWeight,
  };
}
