import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault, KeyDateChange, KeyDateDraft, KeyDateView } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { KeyDate } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { keyDateView } from './production-mapper';
import { ProductionRepository } from './production-repository';

type Draft = z.output<typeof KeyDateDraft>;

/** The dates by which productions have to be ready. */
export class KeyDates {
  constructor(private readonly transactions: Transactions) {}

  create(actor: Actor, productionId: string, draft: Draft): Promise<KeyDateView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const production = await repository.production(productionId);
      if (!production) throw notFound('production');
      const faults = keyDateFaults(draft, { now: unit.at, pieceIds: await repository.pieceIds(productionId) });
      if (faults.length > 0) throw invalidFields(faults);
      const { pieceIds, ...fields } = draft;
      const id = randomUUID();
      const row = { ...fields, at: new Date(fields.at), id, productionId, version: 1 };
      await repository.saveKeyDate(unit.manager.create(KeyDate, row), pieceIds);
      const after = keyDateView(await requireKeyDate(repository, id));
      const sentence = `Added a key date to ${production.name}: ${KEY_DATE_NAMES[draft.kind].toLowerCase()}.`;
      await unit.record({ action: 'created', subject: { kind: 'key-date', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof KeyDateChange>): Promise<KeyDateView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const keyDate = await requireKeyDate(repository, id);
      const before = keyDateView(keyDate);
      requireVersion(before, change);
      const pieces = await repository.pieceIds(keyDate.productionId);
      // A date that has gone by may still change otherwise.
      const moved = change.at === undefined || change.at === before.at ? null : change.at;
      const faults = keyDateFaults({ at: moved, pieceIds: change.pieceIds ?? [] }, { now: unit.at, pieceIds: pieces });
      if (faults.length > 0) throw invalidFields(faults);
      const { pieceIds, at, version: _version, ...fields } = change;
      Object.assign(keyDate, sentMembers(fields), at && { at: new Date(at) }, { version: keyDate.version + 1 });
      await repository.saveKeyDate(keyDate, pieceIds);
      const after = keyDateView(await requireKeyDate(repository, id));
      const name = KEY_DATE_NAMES[after.kind].toLowerCase();
      const sentence = `Changed the ${name} of ${keyDate.production.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'key-date', id }, sentence, before, after });
      return after;
    });
  }

  remove(actor: Actor, id: string, version: number): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new ProductionRepository(unit.manager);
      const keyDate = await requireKeyDate(repository, id);
      const before = keyDateView(keyDate);
      requireVersion(before, { version });
      await repository.removeKeyDate(id);
      const name = KEY_DATE_NAMES[keyDate.kind].toLowerCase();
      const sentence = `Removed the ${name} of ${keyDate.production.name}.`;
      await unit.record({ action: 'removed', subject: { kind: 'key-date', id }, sentence, before });
    });
  }
}

/** What is wrong with a key date where it would stand; `at` null where it does not move. */
export function keyDateFaults(
  { at, pieceIds }: { readonly at: string | null; readonly pieceIds: readonly string[] },
  known: { readonly now: Date; readonly pieceIds: ReadonlySet<string> },
  pointer = '',
): FieldFault[] {
  const faults: FieldFault[] = pieceIds.flatMap((pieceId, i) =>
    known.pieceIds.has(pieceId)
      ? []
      : [{ pointer: `${pointer}/pieceIds/${String(i)}`, detail: 'The production has no such piece.' }],
  );
  if (at !== null && new Date(at) < known.now) {
    faults.unshift({ pointer: `${pointer}/at`, detail: 'This date has gone by. Choose one that is still ahead.' });
  }
  return faults;
}

async function requireKeyDate(repository: ProductionRepository, id: string): Promise<KeyDate> {
  const keyDate = await repository.keyDate(id);
  if (!keyDate) throw notFound('key date');
  return keyDate;
}
