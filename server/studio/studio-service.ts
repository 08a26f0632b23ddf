import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type {
  AuditEntryView,
  ClosureChange,
  ClosureCreate,
  ClosureView,
  StudioChange,
  StudioView,
} from '@common/contract';
import { Closure } from '@database/entities';
import { notFound } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { auditEntryView, closureView, studioView } from './studio-mapper';
import { StudioRepository } from './studio-repository';

/** The studio: its settings, when it is closed, and what was done in it. */
export class StudioService {
  constructor(private readonly transactions: Transactions) {}

  read(): Promise<StudioView> {
    return this.transactions.read(async (manager) => studioView(await new StudioRepository(manager).studio()));
  }

  change(actor: Actor, change: z.output<typeof StudioChange>): Promise<StudioView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StudioRepository(unit.manager);
      const studio = await repository.studio();
      const before = studioView(studio);
      requireVersion(before, change);
      const { settings, forecast, rescue, version: _version, ...fields } = change;
      Object.assign(studio, sentMembers(fields), { version: studio.version + 1 });
      studio.settings = { ...studio.settings, ...(settings && sentMembers(settings)) };
      studio.forecast = { ...studio.forecast, ...(forecast && sentMembers(forecast)) };
      studio.rescue = { ...studio.rescue, ...(rescue && sentMembers(rescue)) };
      await repository.saveStudio(studio);
      const after = studioView(studio);
      const what = changedFields(
        { ...before, ...before.settings, ...before.forecast, ...before.rescue },
        {
          ...after,
          ...after.settings,
          ...after.forecast,
          ...after.rescue,
          settings: before.settings,
          forecast: before.forecast,
          rescue: before.rescue,
        },
      );
      const sentence = `Changed the studio: ${what}.`;
      await unit.record({ action: 'changed', subject: { kind: 'studio', id: studio.id }, sentence, before, after });
      return after;
    });
  }

  closures(): Promise<ClosureView[]> {
    return this.transactions.read(async (manager) => (await new StudioRepository(manager).closures()).map(closureView));
  }

  createClosure(actor: Actor, fields: z.output<typeof ClosureCreate>): Promise<ClosureView> {
    return this.transactions.write(actor, async (unit) => {
      const closure = unit.manager.create(Closure, { ...fields, id: randomUUID(), version: 1 });
      await new StudioRepository(unit.manager).saveClosure(closure);
      const after = closureView(closure);
      const sentence = `Closed the studio for ${closure.name}.`;
      await unit.record({ action: 'created', subject: { kind: 'closure', id: closure.id }, sentence, after });
      return after;
    });
  }

  changeClosure(actor: Actor, id: string, change: z.output<typeof ClosureChange>): Promise<ClosureView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StudioRepository(unit.manager);
      const closure = await repository.closure(id);
      if (!closure) throw notFound('closure');
      const before = closureView(closure);
      requireVersion(before, change);
      Object.assign(closure, sentMembers(change), { version: closure.version + 1 });
      await repository.saveClosure(closure);
      const after = closureView(closure);
      const sentence = `Changed the closure ${closure.name}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'closure', id }, sentence, before, after });
      return after;
    });
  }

  removeClosure(actor: Actor, id: string, version: number): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StudioRepository(unit.manager);
      const closure = await repository.closure(id);
      if (!closure) throw notFound('closure');
      const before = closureView(closure);
      requireVersion(before, { version });
      await repository.removeClosure(id);
      const sentence = `Opened the studio on the days of ${closure.name} after all.`;
      await unit.record({ action: 'removed', subject: { kind: 'closure', id }, sentence, before });
    });
  }

  audit(of: { subjectId?: string; before?: string; limit: number }): Promise<AuditEntryView[]> {
    const before = of.before === undefined ? undefined : new Date(of.before);
    return this.transactions.read(async (manager) =>
      (await new StudioRepository(manager).audit({ ...of, before })).map(auditEntryView),
    );
  }
}
