import { IANAZone } from 'luxon';
import type { Minute } from './span';

/**
 * A wall-clock reading as minutes since 1970-01-01T00:00 *of that wall*: what the clock in the studio says, with no offset.
 * It becomes an instant only with a zone, through `instantOfLocal`.
 */
export type LocalMinute = number;

/** Minutes in a calendar day that no change of clocks touches. */
export const MINUTES_PER_DAY = 1440;

const MS_PER_MINUTE = 60_000;

/** Whether `zone` is a time zone of the IANA database that this machine knows, such as `Europe/London`. */
export function isZone(zone: string): boolean {
  return IANAZone.isValidZone(zone);
}

/** Minutes by which the clocks of `zone` are ahead of UTC at an instant; a part of a minute (before 1972) is rounded. */
export function offsetMinutes(instant: Minute, zone: string): number {
  const offset = IANAZone.create(zone).offset(instant * MS_PER_MINUTE);
  if (Number.isNaN(offset)) {
    throw new RangeError(`“${zone}” is not a time zone that this machine knows.`);
  }
  return Math.round(offset);
}

/** What the clock on the wall reads at an instant. */
export function localOfInstant(instant: Minute, zone: string): LocalMinute {
  return instant + offsetMinutes(instant, zone);
}

/**
 * The instant at which the clock on the wall reads `local`. Where clocks go back and the reading comes twice, the first; where
 * they go forward and it never comes, the reading that the offset before the gap gives (02:30 becomes 03:30). That is the rule
 * of RFC 5545 section 3.3.5, form 3. It assumes that a zone does not change its clocks twice within three days.
 */
export function instantOfLocal(local: LocalMinute, zone: string): Minute {
  const day = Math.floor(local / MINUTES_PER_DAY);
  const before = offsetAtMidnight(day - 1, zone);
  const after = offsetAtMidnight(day + 2, zone);
  const byBefore = local - before;
  if (before === after || offsetMinutes(byBefore, zone) === before) {
    return byBefore;
  }
  const byAfter = local - after;
  return offsetMinutes(byAfter, zone) === after ? byAfter : byBefore;
}

/** Offsets at midnight UTC by zone and day: asking the platform takes microseconds, and patterns ask for every day of a year. */
const offsetsByZone = new Map<string, Map<number, number>>();
const MOST_DAYS_KEPT = 20_000;

function offsetAtMidnight(day: number, zone: string): number {
  let offsets = offsetsByZone.get(zone);
  if (!offsets || offsets.size > MOST_DAYS_KEPT) {
    offsets = new Map();
    offsetsByZone.set(zone, offsets);
  }
  let offset = offsets.get(day);
  if (offset === undefined) {
    offset = offsetMinutes(day * MINUTES_PER_DAY, zone);
    offsets.set(day, offset);
  }
  return offset;
}
