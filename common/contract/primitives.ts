import { z } from 'zod';

/** An opaque record id. */
export const Id = z.uuid();
export type Id = z.infer<typeof Id>;

/** An instant on the wire: ISO 8601 in UTC, ending in Z. Plans carry `Minute` integers instead; see `planning.ts`. */
export const Instant = z.iso.datetime();
export type Instant = z.infer<typeof Instant>;

/** A calendar day in the studio's zone, `YYYY-MM-DD`. */
export const Day = z.iso.date();

/** Whole minutes since 1970-01-01T00:00Z, as the engine counts. */
export const MinuteStamp = z.int();

/** A length of time in whole minutes, none or more, ten years at most. */
export const Minutes = z.int().min(0).max(5_256_000);

/** Money in integer minor units of the studio's currency (pence, cents). */
export const Minor = z.int().min(0).max(1_000_000_000_00);

/** A record's version: sent back with every change so that nobody's work is overwritten unseen. */
export const Version = z.int().min(1);

/** A short name that a person typed: trimmed, never empty. */
export const Name = z.string().trim().min(1, 'Give it a name.').max(120, 'Keep the name within 120 characters.');

/** Longer text that a person typed; may be empty. */
export const Note = z.string().trim().max(4000, 'Keep the note within 4,000 characters.');

/** A craft's key, such as `laminating`: lower case, words joined by hyphens. */
export const CraftKey = z
  .string()
  .regex(/^[a-z][a-z0-9-]{0,39}$/, 'A craft key is lower-case words joined by hyphens.');

/** An IANA zone name that the runtime knows. */
export const ZoneName = z.string().refine(isKnownZone, 'Name a time zone such as Europe/London.');

function isKnownZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

/** A half-open range of calendar days: `from` inside, `until` outside. */
export const DayRange = z.object({ from: Day, until: Day }).refine((range) => range.from < range.until, {
  message: 'The last day must not come before the first.',
  path: ['until'],
});
export type DayRange = z.infer<typeof DayRange>;

/** A range of days as it stands in a stored record (already checked). */
export const StoredDayRange = z.object({ from: Day, until: Day });

/** Query of a removal: the version that was seen. */
export const Removal = z.object({ version: z.coerce.number().int().min(1) });
