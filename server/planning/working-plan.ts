import type { EntityManager } from 'typeorm';
import type { WorkingPlanView } from '@common/contract';
import { comparePlans, layOutInOrder, measure } from '@common/planning';
import { buildProblem } from '@common/planning-input';
import { IssuedPlan } from '@database/entities';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { nameOfContent, planningFrom, readDesk, type Desk } from './desk';
import { RevisionRepository } from './revision-repository';
import { minuteOf, snapshotOf } from './snapshot';
import { readStudioRows } from './snapshot-repository';

const FIRST_LABEL = 'Laid out in the order of entry';

/** The working plan as its readers see it. */
export class WorkingPlan {
  constructor(private readonly transactions: Transactions) {}

  /** The working plan; where there is none yet, or only an outdated first one, it is laid out first. */
  async read(): Promise<WorkingPlanView> {
    const found = await this.#readUnlessUnmade();
    if (found) return found;
    await this.transactions.write(null, async (unit) => {
      if (await wantsFirstLayout(unit.manager, await readDesk(unit.manager, unit.at))) await layOutFirst(unit);
    });
    return this.transactions.read(async (manager) =>
      viewOf(manager, await readDesk(manager, this.transactions.clock())),
    );
  }

  #readUnlessUnmade(): Promise<WorkingPlanView | null> {
    return this.transactions.read(async (manager) => {
      const desk = await readDesk(manager, this.transactions.clock());
      return (await wantsFirstLayout(manager, desk)) ? null : viewOf(manager, desk);
    });
  }
}

/**
 * Until somebody has changed the working plan or issued one, it is what a studio has that takes work as it comes: everything in
 * the order of entry, each at its earliest. As more is entered it is laid out anew.
 */
async function wantsFirstLayout(manager: EntityManager, { head, isStale }: Desk): Promise<boolean> {
  if (head === null) return true;
  if (head.label !== FIRST_LABEL || head.parentId !== null || !isStale) return false;
  const isUntouched = (await new RevisionRepository(manager).newestChild(head.id)) === null;
  return isUntouched && !(await manager.exists(IssuedPlan));
}

async function layOutFirst(unit: Unit): Promise<void> {
  const rows = await readStudioRows(unit.manager);
  const plannedFrom = planningFrom(null, minuteOf(unit.at), rows.studio.zone);
  const problem = buildProblem(snapshotOf(rows, {}), { now: plannedFrom, horizonEnd: null });
  const plan = layOutInOrder(
    problem,
    rows.stages.map((stage) => stage.id),
  );
  await new RevisionRepository(unit.manager).add(unit, rows.studio, {
    parentId: null,
    label: FIRST_LABEL,
    layout: { plan, pins: {} },
    fingerprint: nameOfContent(problem),
    plannedFrom,
  });
}

async function viewOf(manager: EntityManager, desk: Desk): Promise<WorkingPlanView> {
  const { head, rows, problem, plan, unmet } = desk;
  if (head === null) throw new Error('There is no working plan although one was laid out.');
  const revisions = new RevisionRepository(manager);
  const next = await revisions.newestChild(head.id);
  const issued = await manager.findOne(IssuedPlan, {
    where: {},
    order: { number: 'DESC' },
    relations: { issuer: true },
  });
  return {
    revision: rows.studio.planRevision,
    label: head.label,
    changedAt: head.changedAt.toISOString(),
    changedBy: head.changer?.name ?? null,
    canUndo: head.parentId !== null,
    canRedo: next !== null,
    undoLabel: head.parentId === null ? null : head.label,
    redoLabel: next?.label ?? null,
    stale: desk.isStale,
    fingerprint: head.fingerprint,
    zone: rows.studio.zone,
    now: desk.now,
    problem: problem as WorkingPlanView['problem'],
    plan: plan as WorkingPlanView['plan'],
    unmet: unmet as WorkingPlanView['unmet'],
    objective: measure(problem, plan, unmet),
    directory: desk.directory,
    issued: issued && {
      number: issued.number,
      at: issued.issuedAt.toISOString(),
      by: issued.issuer?.name ?? null,
      differs: comparePlans(rows.issued ?? { placements: [] }, plan).length > 0,
    },
  };
}
