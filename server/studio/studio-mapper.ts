import type { AuditEntryView, ClosureView, StudioView } from '@common/contract';
import type { AuditEntry, Closure, Studio } from '@database/entities';

/** The studio as everybody in it may see it. */
export function studioView(studio: Studio): StudioView {
  const { id, name, zone, currency, settings, forecast, rescue, version } = studio;
  return { id, name, zone, currency, settings, forecast, rescue: { ...rescue, allowed: [...rescue.allowed] }, version };
}

/** Days on which the studio is closed. */
export function closureView({ id, name, days, version }: Closure): ClosureView {
  return { id, name, days, version };
}

/** One line of the audit trail. */
export function auditEntryView(entry: AuditEntry): AuditEntryView {
  return {
    id: entry.id,
    at: entry.at.toISOString(),
    accountName: entry.accountName,
    action: entry.action,
    subjectKind: entry.subjectKind,
    subjectId: entry.subjectId,
    sentence: entry.sentence,
    before: entry.before,
    after: entry.after,
  };
}
