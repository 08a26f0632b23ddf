import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault, MakerChange, MakerCreate, MakerView } from '@common/contract';
import { Maker } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import { patternFaults } from '../storage/patterns';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { makerView, makerViewFor } from './crew-mapper';
import { CrewRepository } from './crew-repository';

type MakerParts = Pick<z.output<typeof MakerChange>, 'crafts' | 'patterns'>;

/** The people who do the work. */
export class Makers {
  constructor(private readonly transactions: Transactions) {}

  list(viewer: Actor): Promise<MakerView[]> {
    return this.transactions.read(async (manager) =>
      (await new CrewRepository(manager).makers()).map((maker) => makerViewFor(viewer, maker)),
    );
  }

  read(viewer: Actor, id: string): Promise<MakerView> {
    return this.transactions.read(async (manager) =>
      makerViewFor(viewer, await requireMaker(new CrewRepository(manager), id)),
    );
  }

  create(actor: Actor, { crafts, patterns, ...fields }: z.output<typeof MakerCreate>): Promise<MakerView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new CrewRepository(unit.manager);
      await requireSound(repository, { crafts, patterns });
      const id = randomUUID();
      const maker = unit.manager.create(Maker, { ...fields, id, active: true, version: 1 });
      await repository.saveMaker(maker, { crafts, patterns });
      const after = makerView(await requireMaker(repository, id));
      const sentence = `Added ${maker.name} to the crew.`;
      await unit.record({ action: 'created', subject: { kind: 'maker', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof MakerChange>): Promise<MakerView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new CrewRepository(unit.manager);
      const maker = await requireMaker(repository, id);
      const before = makerView(maker);
      requireVersion(before, change);
      const { crafts, patterns, version: _version, ...fields } = change;
      await requireSound(repository, { crafts, patterns });
      Object.assign(maker, sentMembers(fields), { version: maker.version + 1 });
      await repository.saveMaker(maker, { crafts, patterns });
      const after = makerView(await requireMaker(repository, id));
      const sentence = `Changed ${maker.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'maker', id }, sentence, before, after });
      return after;
    });
  }
}

async function requireMaker(repository: CrewRepository, id: string): Promise<Maker> {
  const maker = await repository.maker(id);
  if (!maker) throw notFound('maker');
  return maker;
}

async function requireSound(repository: CrewRepository, { crafts, patterns }: MakerParts): Promise<void> {
  const known = new Set((await repository.crafts()).map((craft) => craft.id));
  const craftFaults: FieldFault[] = (crafts ?? []).flatMap(({ craftId }, i, all) => {
    if (!known.has(craftId)) return [{ pointer: `/crafts/${i}/craftId`, detail: 'There is no such craft.' }];
    const isAgain = all.findIndex((other) => other.craftId === craftId) < i;
    return isAgain ? [{ pointer: `/crafts/${i}/craftId`, detail: 'This craft is named twice.' }] : [];
  });
  const faults = [...craftFaults, ...patternFaults(patterns ?? [], '/patterns')];
  if (faults.length > 0) throw invalidFields(faults);
}
