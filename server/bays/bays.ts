import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { BayChange, BayCreate, BayView, FieldFault, Pattern } from '@common/contract';
import { Bay } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import { patternFaults } from '../storage/patterns';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { bayView } from './bay-mapper';
import { BayRepository } from './bay-repository';

/** Places, machines and moulds. */
export class Bays {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<BayView[]> {
    return this.transactions.read(async (manager) => (await new BayRepository(manager).all()).map(bayView));
  }

  create(actor: Actor, { openings, ...fields }: z.output<typeof BayCreate>): Promise<BayView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new BayRepository(unit.manager);
      const id = randomUUID();
      const bay = unit.manager.create(Bay, { ...fields, id, active: true, version: 1 });
      await requireSound(repository, bay, openings);
      await repository.save(bay, openings);
      const after = bayView(await requireBay(repository, id));
      const sentence = `Added the ${bay.kind === 'mould' ? 'mould' : 'bay'} ${bay.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'bay', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof BayChange>): Promise<BayView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new BayRepository(unit.manager);
      const bay = await requireBay(repository, id);
      const before = bayView(bay);
      requireVersion(before, change);
      const { openings, version: _version, ...fields } = change;
      Object.assign(bay, sentMembers(fields), { version: bay.version + 1 });
      await requireSound(repository, bay, openings);
      await repository.save(bay, openings);
      const after = bayView(await requireBay(repository, id));
      const sentence = `Changed ${bay.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'bay', id }, sentence, before, after });
      return after;
    });
  }
}

async function requireBay(repository: BayRepository, id: string): Promise<Bay> {
  const bay = await repository.byId(id);
  if (!bay) throw notFound('bay');
  return bay;
}

async function requireSound(
  repository: BayRepository,
  { kind, pieceId }: Bay,
  openings: readonly Pattern[] | undefined,
): Promise<void> {
  const faults: FieldFault[] = patternFaults(openings ?? [], '/openings');
  if (pieceId !== null && kind !== 'mould') {
    faults.push({ pointer: '/pieceId', detail: 'Only a mould belongs to a piece.' });
  } else if (pieceId !== null && !(await repository.isPiece(pieceId))) {
    faults.push({ pointer: '/pieceId', detail: 'There is no such piece.' });
  }
  if (faults.length > 0) throw invalidFields(faults);
}
