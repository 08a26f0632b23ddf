import { z } from 'zod';
import { endpoint, OFFICE, OWNER, WORKSHOP, ById } from './endpoint';
import { ForecastSettings } from './forecast';
import { RescueSettings } from './rescues';
import { DayRange, Id, Instant, Minutes, Name, StoredDayRange, Version, ZoneName } from './primitives';

/** Weights and limits of the studio; see docs/planning.md for what each does. */
export const StudioSettings = z.object({
  changePenaltyMinor: z.int().min(0).max(1_000_000),
  unevennessWeight: z.int().min(0).max(1000),
  earlinessWeight: z.int().min(0).max(1000),
  /** Issued stages beginning within this time are not moved unless asked. */
  freezeMinutes: Minutes,
  restBetweenMinutes: Minutes,
  dayLimitMinutes: Minutes,
  weekLimitMinutes: Minutes,
  roomTemperatureCelsius: z.number().min(-20).max(60),
  roomHumidityPercent: z.number().min(0).max(100),
  /** Overtime costs this many per mille of an ordinary hour. */
  overtimePermille: z.int().min(1000).max(5000),
});
export type StudioSettings = z.infer<typeof StudioSettings>;

export const StudioView = z.object({
  id: Id,
  name: z.string(),
  zone: z.string(),
  currency: z.string(),
  settings: StudioSettings,
  forecast: ForecastSettings,
  rescue: RescueSettings,
  version: Version,
});
export type StudioView = z.infer<typeof StudioView>;
export const StudioChange = z
  .object({
    name: Name,
    zone: ZoneName,
    settings: StudioSettings.partial(),
    forecast: ForecastSettings.partial(),
    rescue: RescueSettings.partial(),
  })
  .partial()
  .extend({ version: Version });

export const ClosureView = z.object({ id: Id, name: z.string(), days: StoredDayRange, version: Version });
export type ClosureView = z.infer<typeof ClosureView>;
export const ClosureCreate = z.object({ name: Name, days: DayRange });
export const ClosureChange = ClosureCreate.partial().extend({ version: Version });

/** One line of the audit trail: who did what to which record, and how it was before and after. */
export const AuditEntryView = z.object({
  id: Id,
  at: Instant,
  accountName: z.string().nullable(),
  action: z.string(),
  subjectKind: z.string(),
  subjectId: z.string().nullable(),
  sentence: z.string(),
  before: z.unknown(),
  after: z.unknown(),
});
export type AuditEntryView = z.infer<typeof AuditEntryView>;

const AuditQuery = z.object({
  subjectId: Id.optional(),
  before: Instant.optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});

export const studioEndpoints = {
  readStudio: endpoint({
    method: 'GET',
    path: '/api/studio',
    who: WORKSHOP,
    summary: 'The studio and its settings',
    response: StudioView,
  }),
  changeStudio: endpoint({
    method: 'PATCH',
    path: '/api/studio',
    who: OWNER,
    summary: 'Change the studio and its settings',
    body: StudioChange,
    response: StudioView,
  }),
  listClosures: endpoint({
    method: 'GET',
    path: '/api/closures',
    who: WORKSHOP,
    summary: 'Days on which the studio is closed',
    response: z.array(ClosureView),
  }),
  createClosure: endpoint({
    method: 'POST',
    path: '/api/closures',
    who: OFFICE,
    summary: 'Close the studio for some days',
    body: ClosureCreate,
    response: ClosureView,
    status: 201,
  }),
  changeClosure: endpoint({
    method: 'PATCH',
    path: '/api/closures/:id',
    who: OFFICE,
    summary: 'Change a closure',
    params: ById,
    body: ClosureChange,
    response: ClosureView,
  }),
  removeClosure: endpoint({
    method: 'DELETE',
    path: '/api/closures/:id',
    who: OFFICE,
    summary: 'Open on those days after all',
    params: ById,
    query: z.object({ version: z.coerce.number().int() }),
  }),
  readAudit: endpoint({
    method: 'GET',
    path: '/api/audit',
    who: OFFICE,
    summary: 'What was changed, when and by whom, newest first',
    query: AuditQuery,
    response: z.array(AuditEntryView),
  }),
};
