import type { z } from 'zod';
import type { StageMove } from '@common/contract';
import { replaceAfterMove } from '@common/planning';
import type { Studio } from '@database/entities';
import { invalidField, Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { nameOfContent, problemOf, readDesk, type Desk } from './desk';
import { RevisionRepository } from './revision-repository';
import type { Pins } from './snapshot';

type Revised = { readonly revision: number };

/** What hands do to the working plan: moves, releases, undo and redo. Each leaves a revision behind, and none is ever lost. */
export class Revisions {
  constructor(private readonly transactions: Transactions) {}

  /** Puts a stage elsewhere and pins it there; what it runs into, and what follows, gives way. */
  move(actor: Actor, move: z.output<typeof StageMove>): Promise<Revised> {
    return this.transactions.write(actor, async (unit) => {
      const desk = await requireDesk(unit, move.revision);
      const { stageId, start, makerIds, bayIds } = move;
      requireMovable(desk, move);
      const pins = { ...desk.pins, [stageId]: { start, makerIds, bayIds } };
      const pinned = problemOf(desk, { from: desk.from, pins });
      const { plan } = replaceAfterMove(pinned, desk.plan, { stageId, start, makerIds, bayIds });
      const label = `Move ${desk.names.stage(stageId)}`;
      return this.#store(unit, desk, { label, pins: onlyKnown(pins, desk), plan });
    });
  }

  /** Lets a pinned stage go; it stays where it is until something moves it. */
  release(
    actor: Actor,
    { revision, stageId }: { readonly revision: number; readonly stageId: string },
  ): Promise<Revised> {
    return this.transactions.write(actor, async (unit) => {
      const desk = await requireDesk(unit, revision);
      if (!(stageId in desk.pins)) throw invalidField('/stageId', 'This stage is not pinned.');
      const { [stageId]: _released, ...pins } = desk.pins;
      const label = `Release ${desk.names.stage(stageId)}`;
      return this.#store(unit, desk, { label, pins: onlyKnown(pins, desk), plan: desk.plan });
    });
  }

  undo(actor: Actor, revision: number): Promise<Revised> {
    return this.#step(actor, revision, 'undo');
  }

  redo(actor: Actor, revision: number): Promise<Revised> {
    return this.#step(actor, revision, 'redo');
  }

  #step(actor: Actor, revision: number, direction: 'undo' | 'redo'): Promise<Revised> {
    return this.transactions.write(actor, async (unit) => {
      const { rows, head } = await requireDesk(unit, revision);
      const revisions = new RevisionRepository(unit.manager);
      const child = direction === 'redo' && head ? await revisions.newestChild(head.id) : null;
      const target = direction === 'redo' ? (child?.id ?? null) : (head?.parentId ?? null);
      const label = direction === 'redo' ? child?.label : head?.label;
      if (target === null) throw invalidField('', `There is nothing to ${direction}.`);
      const count = await revisions.standAt(unit, rows.studio, target);
      const sentence = `${direction === 'undo' ? 'Took back' : 'Did again'}: ${label ?? 'a change'}.`;
      await recordRevised(unit, rows.studio, direction, sentence);
      return { revision: count };
    });
  }

  async #store(
    unit: Unit,
    desk: Desk,
    made: Pick<Desk, 'pins' | 'plan'> & { readonly label: string },
  ): Promise<Revised> {
    const { label, pins, plan } = made;
    const count = await new RevisionRepository(unit.manager).add(unit, desk.rows.studio, {
      parentId: desk.head?.id ?? null,
      label,
      layout: { plan, pins, measures: desk.measures },
      fingerprint: nameOfContent(problemOf(desk, { from: desk.from, pins })),
      plannedFrom: desk.from,
    });
    await recordRevised(unit, desk.rows.studio, 'revised', `Working plan: ${label}.`);
    return { revision: count };
  }
}

/** Writes down that the working plan now stands otherwise. */
export async function recordRevised(unit: Unit, studio: Studio, action: string, sentence: string): Promise<void> {
  const after = { revision: studio.planRevision, head: studio.headRevisionId };
  await unit.record({ action, subject: { kind: 'working-plan', id: studio.id }, sentence, after });
}

/** The desk, if the working plan is still the one that was looked at. */
export async function requireDesk(unit: Unit, revision: number): Promise<Desk> {
  const desk = await readDesk(unit.manager, unit.at);
  const { planRevision } = desk.rows.studio;
  if (planRevision !== revision) {
    throw new Problem('version-conflict', 'Somebody else changed the working plan meanwhile. Look at it, then go on.', {
      current: { revision: planRevision, label: desk.head?.label ?? null, changedBy: desk.head?.changer?.name ?? null },
      sent: { revision },
    });
  }
  return desk;
}

/** Pins of stages that are no more go with them. */
function onlyKnown(pins: Pins, { rows }: Desk): Pins {
  const known = new Set(rows.stages.map((stage) => stage.id));
  return Object.fromEntries(Object.entries(pins).filter(([stageId]) => known.has(stageId)));
}

function requireMovable(desk: Desk, { stageId, start, makerIds, bayIds }: z.output<typeof StageMove>): void {
  const stage = desk.problem.stages.find((one) => one.id === stageId);
  if (!stage) throw invalidField('/stageId', 'There is no such stage in the plan.');
  if (stage.progress.kind !== 'to-do') {
    throw invalidField('/stageId', `${desk.names.stage(stageId)} has begun; it stays where it is.`);
  }
  if (start === null && makerIds === null && bayIds === null) {
    throw invalidField('', 'Say where the stage goes: when, to whom or in which bay.');
  }
  if (start !== null && start < desk.problem.horizon.start) throw invalidField('/start', 'This lies in the past.');
  if (start !== null && start >= desk.problem.horizon.end) {
    throw invalidField('/start', 'This lies beyond the end of what is planned.');
  }
  const makers = new Set(desk.problem.makers.map((maker) => maker.id));
  if (makerIds?.some((id) => !makers.has(id))) throw invalidField('/makerIds', 'There is no such maker at work.');
  const bays = new Set(desk.problem.bays.map((bay) => bay.id));
  if (bayIds?.some((id) => !bays.has(id))) throw invalidField('/bayIds', 'There is no such bay in use.');
  if (bayIds && bayIds.length !== stage.places.length) {
    throw invalidField(
      '/bayIds',
      `${desk.names.stage(stageId)} works in ${String(stage.places.length)} places; name a bay for each.`,
    );
  }
}
