import type { SnapshotBay, SnapshotMaker, SnapshotStage, StudioSnapshot } from '@common/planning-input';
import { ROOM_PLACE, type Bay, type Maker, type PinValue, type Stage } from '@database/entities';
import { draftOf } from '../storage/drafts';
import { patternOf } from '../storage/patterns';
import type { StudioRows } from './snapshot-repository';

/** Pins of the working plan by stage. */
export type Pins = Readonly<Record<string, PinValue>>;

const MS_PER_MINUTE = 60_000;

/** The studio in the words of the trade, from its rows and the pins of one working plan. */
export function snapshotOf(rows: StudioRows, pins: Pins): StudioSnapshot {
  const { zone, settings } = rows.studio;
  const { history } = rows.climates;
  return {
    zone,
    settings,
    closures: rows.closures.map((closure) => closure.days),
    room: history(ROOM_PLACE) ?? [],
    makers: rows.makers.filter((maker) => maker.active).map(makerOf),
    bays: rows.bays.filter((bay) => bay.active).map((bay) => bayOf(bay, history(bay.id))),
    materials: rows.materials.map(({ id, family, dwells, referenceCelsius, referenceHumidityPercent }) => ({
      id,
      family,
      milestones: inOrder(dwells).map(
        ({ milestone, law, minimumCelsius, maximumCelsius, lowMinutes, likelyMinutes, highMinutes }) => ({
          milestone,
          behaviour: { law, referenceCelsius, referenceHumidityPercent, minimumCelsius, maximumCelsius },
          minutes: { low: lowMinutes, likely: likelyMinutes, high: highMinutes },
        }),
      ),
    })),
    productions: rows.productions.map(({ id, state, keyDates }) => ({
      id,
      state,
      keyDates: keyDates
        .map((keyDate) => ({
          id: keyDate.id,
          at: minuteOf(keyDate.at),
          strength: keyDate.strength,
          weight: keyDate.weight,
          pieceIds: keyDate.pieces.map((piece) => piece.pieceId).sort(),
        }))
        .sort((a, b) => a.at - b.at || a.id.localeCompare(b.id)),
    })),
    pieces: rows.pieces.map(({ id, productionId }) => ({ id, productionId })),
    stages: rows.stages.map((stage) => stageOf(stage, pins[stage.id] ?? null)),
    links: rows.links.map(({ fromStageId, toStageId, kind, after, minGapMinutes, maxGapMinutes, time }) => ({
      fromStageId,
      toStageId,
      kind,
      after,
      minGapMinutes,
      maxGapMinutes,
      time,
    })),
    purchases: rows.purchases.map(({ stageId, leadDays, orderedOn, dueOn, receivedOn }) => ({
      stageId,
      leadDays,
      orderedOn,
      dueOn,
      receivedOn,
    })),
    issued: rows.issued,
  };
}

function makerOf(maker: Maker): SnapshotMaker {
  return {
    id: maker.id,
    crafts: maker.crafts
      .map(({ craftId, pacePermille }) => ({ craftId, pacePermille }))
      .sort((a, b) => a.craftId.localeCompare(b.craftId)),
    patterns: inOrder(maker.patterns).map(patternOf),
    leave: maker.leave.map((leave) => leave.days),
    hourCostMinor: maker.hourCostMinor,
    dayLimitMinutes: maker.dayLimitMinutes,
    weekLimitMinutes: maker.weekLimitMinutes,
  };
}

function bayOf(bay: Bay, climate: SnapshotBay['climate']): SnapshotBay {
  return {
    id: bay.id,
    isMould: bay.pieceId !== null,
    capacity: bay.capacity,
    openings: inOrder(bay.openings).map(patternOf),
    climate,
  };
}

function stageOf(stage: Stage, pin: PinValue | null): SnapshotStage {
  return {
    ...draftOf(stage),
    crew: inOrder(stage.crew).map(({ craftId, least, most }) => ({ craftId, least, most })),
    places: inOrder(stage.places).map(({ bays, units, hold, untilStageId }) => ({
      bayIds: inOrder(bays).map((bay) => bay.bayId),
      units,
      hold,
      untilStageId,
    })),
    id: stage.id,
    pieceId: stage.pieceId,
    position: stage.position,
    state: stage.state,
    startedAt: stage.startedAt && minuteOf(stage.startedAt),
    finishedAt: stage.finishedAt && minuteOf(stage.finishedAt),
    spentMinutes: stage.spentMinutes,
    remainingMinutes: stage.remainingMinutes,
    makerIds: stage.makers.length === 0 ? null : stage.makers.map((maker) => maker.makerId).sort(),
    bayIds: stage.bays.length === 0 ? null : inOrder(stage.bays).map((bay) => bay.bayId),
    pin,
  };
}

/** An instant in whole minutes, as the engine counts. */
export function minuteOf(instant: Date): number {
  return Math.floor(instant.getTime() / MS_PER_MINUTE);
}

function inOrder<T extends { readonly position: number }>(rows: readonly T[]): T[] {
  return [...rows].sort((a, b) => a.position - b.position);
}
