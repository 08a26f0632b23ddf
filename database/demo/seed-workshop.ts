import { Bay, BayOpening, Client, Closure, Leave, Maker, MakerCraft, MakerPattern, Studio } from '@database/entities';
import type { EntityManager } from 'typeorm';
import type { DemoBay, DemoStudio } from './demo-studio-types';
import { recordId, recordIdOrNull } from './record-id';

/** Names the studio and sets it up; its one row is there from the first migration. */
export async function seedStudio(manager: EntityManager, demo: DemoStudio): Promise<void> {
  const { name, zone, currency, settings } = demo;
  await manager.update(Studio, { single: true }, { name, zone, currency, settings });
  await manager.insert(
    Closure,
    demo.closures.map((closure) => ({ ...closure, id: recordId(closure.id) })),
  );
  await manager.insert(
    Client,
    demo.clients.map((client) => ({ ...client, id: recordId(client.id) })),
  );
}

/** Enters makers with crafts, patterns and leave. */
export async function seedMakers(manager: EntityManager, makers: DemoStudio['makers']): Promise<void> {
  await manager.insert(
    Maker,
    makers.map(({ id, name, initials, hourCostMinor, dayLimitMinutes, weekLimitMinutes, note }) => ({
      id: recordId(id),
      name,
      initials,
      hourCostMinor,
      dayLimitMinutes,
      weekLimitMinutes,
      note,
    })),
  );
  await manager.insert(
    MakerCraft,
    makers.flatMap(({ id, crafts }) =>
      crafts.map(({ craftId, pacePermille }) => ({ makerId: recordId(id), craftId: recordId(craftId), pacePermille })),
    ),
  );
  await manager.insert(
    MakerPattern,
    makers.flatMap(({ id, patterns }) =>
      patterns.map((pattern, position) => ({
        ...pattern,
        makerId: recordId(id),
        position,
        exceptDays: [...pattern.exceptDays],
      })),
    ),
  );
  await manager.insert(
    Leave,
    makers.flatMap(({ id, leave }) => leave.map((one) => ({ ...one, id: recordId(one.id), makerId: recordId(id) }))),
  );
}

/** Enters bays, or the moulds of pieces that are there. */
export async function seedBays(manager: EntityManager, bays: readonly DemoBay[]): Promise<void> {
  await manager.insert(
    Bay,
    bays.map(({ openings: _openings, ...bay }) => ({
      ...bay,
      id: recordId(bay.id),
      pieceId: recordIdOrNull(bay.pieceId),
    })),
  );
  await manager.insert(
    BayOpening,
    bays.flatMap(({ id, openings }) =>
      openings.map((opening, position) => ({
        ...opening,
        bayId: recordId(id),
        position,
        exceptDays: [...opening.exceptDays],
        kind: 'ordinary' as const,
      })),
    ),
  );
}
