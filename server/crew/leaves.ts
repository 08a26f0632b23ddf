import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { LeaveCreate, LeaveView } from '@common/contract';
import { Leave } from '@database/entities';
import { invalidField, notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { leaveView, leaveViewFor } from './crew-mapper';
import { CrewRepository } from './crew-repository';

/** When makers are away. */
export class Leaves {
  constructor(private readonly transactions: Transactions) {}

  list(viewer: Actor, makerId?: string): Promise<LeaveView[]> {
    return this.transactions.read(async (manager) =>
      (await new CrewRepository(manager).leave(makerId)).map((leave) => leaveViewFor(viewer, leave)),
    );
  }

  create(actor: Actor, fields: z.output<typeof LeaveCreate>): Promise<LeaveView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new CrewRepository(unit.manager);
      const maker = await repository.maker(fields.makerId);
      if (!maker) throw invalidField('/makerId', 'There is no such maker.');
      const overlapping = (await repository.leave(maker.id)).find(
        ({ days }) => days.from < fields.days.until && fields.days.from < days.until,
      );
      if (overlapping) {
        const { from, until } = overlapping.days;
        throw invalidField('/days', `${maker.name} is on leave from ${from} until ${until} already; the two overlap.`);
      }
      const leave = unit.manager.create(Leave, { ...fields, id: randomUUID(), version: 1 });
      await repository.addLeave(leave);
      const after = leaveView(leave);
      const sentence = `Entered leave of ${maker.name} from ${leave.days.from} until ${leave.days.until}.`;
      await unit.record({ action: 'created', subject: { kind: 'leave', id: leave.id }, sentence, after });
      return after;
    });
  }

  remove(actor: Actor, id: string): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new CrewRepository(unit.manager);
      const leave = await repository.leaveById(id);
      if (!leave) throw notFound('leave');
      await repository.removeLeave(id);
      const sentence = `Took out the leave of ${leave.maker.name} from ${leave.days.from} until ${leave.days.until}.`;
      await unit.record({ action: 'removed', subject: { kind: 'leave', id }, sentence, before: leaveView(leave) });
    });
  }
}
