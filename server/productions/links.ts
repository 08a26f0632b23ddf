import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { LinkCreate, StageLink } from '@common/contract';
import { PLAIN_LINK } from '@common/domain/stage-draft';
import { Link } from '@database/entities';
import { invalidField, notFound, Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { circleClosedBy, understoodWaits } from './link-circle';
import { linkView } from './production-mapper';
import { stageName } from './stage-name';
import { StageRepository } from './stage-repository';

/** How stages follow each other. */
export class Links {
  constructor(private readonly transactions: Transactions) {}

  create(actor: Actor, fields: z.output<typeof LinkCreate>): Promise<StageLink> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const stages = new Map((await repository.outline()).map((stage) => [stage.id, stage]));
      const [from, to] = [stages.get(fields.fromStageId), stages.get(fields.toStageId)];
      if (!from) throw invalidField('/fromStageId', 'There is no such stage.');
      if (!to) throw invalidField('/toStageId', 'There is no such stage.');
      if (from === to) throw invalidField('/toStageId', 'A stage can not wait for itself.');
      if (fields.maxGapMinutes !== null && fields.maxGapMinutes < fields.minGapMinutes) {
        throw invalidField('/maxGapMinutes', 'The most time between can not be less than the least.');
      }
      const links = await repository.links();
      const waits = [...links, ...understoodWaits([...stages.values()], links)];
      const circle = circleClosedBy(fields, waits);
      if (circle) {
        const names = [...circle, circle[0]].map((id) => stageName(stages.get(id) ?? from));
        const detail = `${names.join(' → ')}: each would wait for the one before, and the first for the last.`;
        throw new Problem('link-cycle', detail, { errors: [{ pointer: '/toStageId', detail }] });
      }
      if (from.pieceId === to.pieceId) await writeUnderstoodWaits(repository, [from.pieceId]);
      const isPlainAgain = (await repository.links()).find((link) => isSameLink(link, fields));
      const link = isPlainAgain ?? unit.manager.create(Link, { ...fields, id: randomUUID() });
      if (!isPlainAgain) await repository.addLinks([link]);
      const after = linkView(link);
      const sentence = `Let ${stageName(to)} wait for ${stageName(from)}.`;
      await unit.record({ action: 'created', subject: { kind: 'link', id: link.id }, sentence, after });
      return after;
    });
  }

  remove(actor: Actor, id: string): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const link = await repository.link(id);
      if (!link) throw notFound('link');
      await repository.removeLink(id);
      const sentence = `“${link.toStage.name}” no longer waits for “${link.fromStage.name}”.`;
      await unit.record({ action: 'removed', subject: { kind: 'link', id }, sentence, before: linkView(link) });
    });
  }
}

/**
 * Writes down the order that was understood in pieces without links of their own, before the first is set: one link more must not
 * make all others vanish.
 */
export async function writeUnderstoodWaits(repository: StageRepository, pieceIds: readonly string[]): Promise<void> {
  const stages = (await repository.outline()).filter((stage) => pieceIds.includes(stage.pieceId));
  const waits = understoodWaits(stages, await repository.links());
  await repository.addLinks(waits.map((wait) => ({ ...PLAIN_LINK, ...wait, id: randomUUID() })));
}

function isSameLink(link: Link, fields: z.output<typeof LinkCreate>): boolean {
  const { id: _id, ...view } = linkView(link);
  return (Object.keys(view) as (keyof typeof view)[]).every((name) => view[name] === fields[name]);
}
