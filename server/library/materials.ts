import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault, MaterialChange, MaterialCreate, MaterialView } from '@common/contract';
import { Material } from '@database/entities';
import { invalidFields, notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { materialView } from './library-mapper';
import { LibraryRepository } from './library-repository';

/** The library's materials and their dwells. */
export class Materials {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<MaterialView[]> {
    return this.transactions.read(async (manager) =>
      (await new LibraryRepository(manager).materials()).map(materialView),
    );
  }

  create(actor: Actor, { dwells, ...fields }: z.output<typeof MaterialCreate>): Promise<MaterialView> {
    return this.transactions.write(actor, async (unit) => {
      requireSound(dwells);
      const repository = new LibraryRepository(unit.manager);
      const id = randomUUID();
      await repository.saveMaterial(unit.manager.create(Material, { ...fields, id, version: 1 }), dwells);
      const after = materialView(await requireMaterial(repository, id));
      const sentence = `Added the material ${fields.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'material', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof MaterialChange>): Promise<MaterialView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new LibraryRepository(unit.manager);
      const material = await requireMaterial(repository, id);
      const before = materialView(material);
      requireVersion(before, change);
      const { dwells, version: _version, ...fields } = change;
      requireSound(dwells ?? []);
      Object.assign(material, sentMembers(fields), { version: material.version + 1 });
      await repository.saveMaterial(material, dwells);
      const after = materialView(await requireMaterial(repository, id));
      const sentence = `Changed the material ${material.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'material', id }, sentence, before, after });
      return after;
    });
  }
}

async function requireMaterial(repository: LibraryRepository, id: string): Promise<Material> {
  const material = await repository.material(id);
  if (!material) throw notFound('material');
  return material;
}

function requireSound(dwells: MaterialView['dwells']): void {
  const faults: FieldFault[] = dwells.flatMap(({ milestone, minimumCelsius, maximumCelsius }, i) => {
    if (dwells.findIndex((other) => other.milestone === milestone) < i) {
      return [
        { pointer: `/dwells/${i}/milestone`, detail: 'This is said twice; a material has one dwell of each kind.' },
      ];
    }
    const isReversed = minimumCelsius !== null && maximumCelsius !== null && minimumCelsius > maximumCelsius;
    return isReversed
      ? [{ pointer: `/dwells/${i}/maximumCelsius`, detail: 'The highest temperature lies below the lowest.' }]
      : [];
  });
  if (faults.length > 0) throw invalidFields(faults);
}
