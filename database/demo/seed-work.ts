import type { Minute } from '@common/time/span';
import {
  KeyDate,
  KeyDatePiece,
  Link,
  Piece,
  Production,
  Purchase,
  Stage,
  StageBay,
  StageCrew,
  StageMaker,
  StagePlace,
  StagePlaceBay,
} from '@database/entities';
import type { EntityManager } from 'typeorm';
import type { DemoStage, DemoStudio } from './demo-studio-types';
import { recordId, recordIdOrNull } from './record-id';
import { crewColumns, draftColumns } from './seed-library';

const MS_PER_MINUTE = 60_000;

/** Enters productions, their pieces and key dates. */
export async function seedProductions(manager: EntityManager, demo: DemoStudio): Promise<void> {
  await manager.insert(
    Production,
    demo.productions.map(({ id, clientId, name, mark, hue, state, note, createdAt }) => ({
      id: recordId(id),
      clientId: recordId(clientId),
      name,
      mark,
      hue,
      state,
      note,
      createdAt: dateOf(createdAt),
    })),
  );
  await manager.insert(
    Piece,
    demo.pieces.map(({ id, productionId, recipeId, name, position, note }) => ({
      id: recordId(id),
      productionId: recordId(productionId),
      recipeId: recordIdOrNull(recipeId),
      name,
      position,
      note,
    })),
  );
  const dates = demo.productions.flatMap(({ id, keyDates }) => keyDates.map((date) => ({ ...date, productionId: id })));
  await manager.insert(
    KeyDate,
    dates.map(({ id, productionId, kind, at, strength, weight }) => ({
      id: recordId(id),
      productionId: recordId(productionId),
      kind,
      at: dateOf(at),
      strength,
      weight,
    })),
  );
  await manager.insert(
    KeyDatePiece,
    dates.flatMap(({ id, pieceIds }) => pieceIds.map((key) => ({ keyDateId: recordId(id), pieceId: recordId(key) }))),
  );
}

/** Enters stages with crews, places and what has happened to them, then links and purchases. */
export async function seedStages(manager: EntityManager, demo: DemoStudio): Promise<void> {
  const { stages } = demo;
  await manager.insert(Stage, stages.map(stageRow));
  await manager.insert(
    StageCrew,
    stages.flatMap(({ id, crew }) =>
      crew.map((wanted, position) => ({ ...crewColumns(wanted, position), stageId: recordId(id) })),
    ),
  );
  await manager.insert(
    StagePlace,
    stages.flatMap(({ id, places }) =>
      places.map(({ units, hold, untilStageId }, position) => ({
        stageId: recordId(id),
        position,
        units,
        hold,
        untilStageId: recordIdOrNull(untilStageId),
      })),
    ),
  );
  await manager.insert(
    StagePlaceBay,
    stages.flatMap(({ id, places }) =>
      places.flatMap((place, placePosition) =>
        place.bayIds.map((key, position) => ({ stageId: recordId(id), placePosition, position, bayId: recordId(key) })),
      ),
    ),
  );
  await manager.insert(
    StageMaker,
    stages.flatMap(({ id, makerIds }) => makerIds.map((key) => ({ stageId: recordId(id), makerId: recordId(key) }))),
  );
  await manager.insert(
    StageBay,
    stages.flatMap(({ id, bayIds }) =>
      bayIds.map((key, position) => ({ stageId: recordId(id), position, bayId: recordId(key) })),
    ),
  );
  await seedLinks(manager, demo);
}

async function seedLinks(manager: EntityManager, { links, purchases }: DemoStudio): Promise<void> {
  await manager.insert(
    Link,
    links.map(({ fromStageId, toStageId, ...link }) => ({
      ...link,
      id: recordId(`link:${fromStageId}>${toStageId}`),
      fromStageId: recordId(fromStageId),
      toStageId: recordId(toStageId),
    })),
  );
  await manager.insert(
    Purchase,
    purchases.map(({ id, productionId, stageId, ...purchase }) => ({
      ...purchase,
      id: recordId(id),
      productionId: recordId(productionId),
      stageId: recordId(stageId),
    })),
  );
}

function stageRow(stage: DemoStage) {
  return {
    ...draftColumns(stage),
    id: recordId(stage.id),
    pieceId: recordId(stage.pieceId),
    position: stage.position,
    nth: stage.nth,
    repeats: stage.of,
    state: stage.state,
    startedAt: dateOrNull(stage.startedAt),
    finishedAt: dateOrNull(stage.finishedAt),
    spentMinutes: stage.spentMinutes,
    remainingMinutes: stage.remainingMinutes,
    decision: stage.decision,
    decidedAt: stage.decision === null ? null : dateOrNull(stage.finishedAt),
    decisionNote: stage.decision === null ? '' : 'Approved as shown.',
  };
}

function dateOf(minute: Minute): Date {
  return new Date(minute * MS_PER_MINUTE);
}

function dateOrNull(minute: Minute | null): Date | null {
  return minute === null ? null : dateOf(minute);
}
