import { z } from 'zod';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { CraftKey, Day, DayRange, Id, Minor, Minutes, Name, Note, StoredDayRange, Version } from './primitives';

export const CraftView = z.object({ id: Id, key: CraftKey, name: z.string(), version: Version });
export type CraftView = z.infer<typeof CraftView>;
export const CraftCreate = z.object({ key: CraftKey, name: Name });

/** A craft that a maker holds; pace 1000 is usual. */
export const MakerCraft = z.object({
  craftId: Id,
  pacePermille: z.int().min(100, 'A pace is at least 0.1.').max(3000, 'A pace is at most 3.0.'),
});

/**
 * When a maker works: an RFC 5545 recurrence rule over days, with a start on the clock of the studio's zone and a length.
 * `exceptDays` are the rule's EXDATEs.
 */
export const Pattern = z.object({
  firstDay: Day,
  rule: z
    .string()
    .max(300)
    .regex(/^FREQ=/, 'A rule begins with FREQ=, such as FREQ=WEEKLY;BYDAY=MO,TU,WE.'),
  startMinuteOfDay: z.int().min(0).max(1439),
  lengthMinutes: z.int().min(15).max(1440),
  exceptDays: z.array(Day).max(400).default([]),
  /** Whether this is time that the maker allows at the overtime price. */
  kind: z.enum(['ordinary', 'overtime']).default('ordinary'),
});
export type Pattern = z.infer<typeof Pattern>;

export const LeaveView = z.object({ id: Id, makerId: Id, days: StoredDayRange, note: z.string(), version: Version });
export type LeaveView = z.infer<typeof LeaveView>;
export const LeaveCreate = z.object({ makerId: Id, days: DayRange, note: Note.default('') });

export const MakerView = z.object({
  id: Id,
  name: z.string(),
  initials: z.string(),
  crafts: z.array(MakerCraft),
  patterns: z.array(Pattern),
  /** Absent for everybody but owner and manager. */
  hourCostMinor: Minor.optional(),
  dayLimitMinutes: Minutes.nullable(),
  weekLimitMinutes: Minutes.nullable(),
  active: z.boolean(),
  note: z.string(),
  version: Version,
});
export type MakerView = z.infer<typeof MakerView>;

const Initials = z
  .string()
  .trim()
  .regex(/^[\p{L}]{1,3}$/u, 'Initials are one to three letters.');
const makerFields = {
  name: Name,
  initials: Initials,
  crafts: z.array(MakerCraft).max(40),
  patterns: z.array(Pattern).max(20),
  hourCostMinor: Minor,
  dayLimitMinutes: Minutes.nullable(),
  weekLimitMinutes: Minutes.nullable(),
  note: Note,
};
export const MakerCreate = z.object({
  ...makerFields,
  note: Note.default(''),
  dayLimitMinutes: Minutes.nullable().default(null),
  weekLimitMinutes: Minutes.nullable().default(null),
});
export const MakerChange = z
  .object({ ...makerFields, active: z.boolean() })
  .partial()
  .extend({ version: Version });

export const crewEndpoints = {
  listCrafts: endpoint({
    method: 'GET',
    path: '/api/crafts',
    who: WORKSHOP,
    summary: "The studio's crafts",
    response: z.array(CraftView),
  }),
  createCraft: endpoint({
    method: 'POST',
    path: '/api/crafts',
    who: OFFICE,
    summary: 'Add a craft',
    body: CraftCreate,
    response: CraftView,
    status: 201,
  }),
  removeCraft: endpoint({
    method: 'DELETE',
    path: '/api/crafts/:id',
    who: OFFICE,
    summary: 'Remove a craft that nobody and nothing uses',
    params: ById,
  }),
  listMakers: endpoint({
    method: 'GET',
    path: '/api/makers',
    who: WORKSHOP,
    summary: 'The makers',
    response: z.array(MakerView),
  }),
  readMaker: endpoint({
    method: 'GET',
    path: '/api/makers/:id',
    who: WORKSHOP,
    summary: 'One maker',
    params: ById,
    response: MakerView,
  }),
  createMaker: endpoint({
    method: 'POST',
    path: '/api/makers',
    who: OFFICE,
    summary: 'Add a maker',
    body: MakerCreate,
    response: MakerView,
    status: 201,
  }),
  changeMaker: endpoint({
    method: 'PATCH',
    path: '/api/makers/:id',
    who: OFFICE,
    summary: 'Change a maker',
    params: ById,
    body: MakerChange,
    response: MakerView,
  }),
  listLeave: endpoint({
    method: 'GET',
    path: '/api/leave',
    who: WORKSHOP,
    summary: 'Leave of all makers',
    query: z.object({ makerId: Id.optional() }),
    response: z.array(LeaveView),
  }),
  createLeave: endpoint({
    method: 'POST',
    path: '/api/leave',
    who: OFFICE,
    summary: "Enter leave; it may not overlap the same maker's other leave",
    body: LeaveCreate,
    response: LeaveView,
    status: 201,
  }),
  removeLeave: endpoint({
    method: 'DELETE',
    path: '/api/leave/:id',
    who: OFFICE,
    summary: 'Take leave out again',
    params: ById,
  }),
};
