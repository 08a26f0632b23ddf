import type { ValueTransformer } from 'typeorm';

const MS_PER_MINUTE = 60_000;

/** A half-open range of calendar days as a row holds it, both `YYYY-MM-DD`. */
export interface DayRangeValue {
  readonly from: string;
  readonly until: string;
}

/** A half-open range of instants as a row holds it, in whole minutes since 1970-01-01T00:00Z. */
export interface MinuteRangeValue {
  readonly start: number;
  readonly end: number;
}

/** `bigint`: the driver gives text because it may pass 2^53; every amount of ours is bounded far below. */
export const bigintAsNumber: ValueTransformer = {
  to: (value: unknown) => value,
  from: (value: string | null) => (value === null ? null : Number(value)),
};

/** `daterange`, always written and read half-open. */
export const dayRange: ValueTransformer = {
  to: (value: unknown) => (isDayRange(value) ? `[${value.from},${value.until})` : value),
  from: (text: string | null): DayRangeValue | null => {
    if (text === null) return null;
    const [from, until] = boundsOf(text);
    return { from, until };
  },
};

/** `tstzrange`, always written and read half-open. */
export const minuteRange: ValueTransformer = {
  to: (value: unknown) => (isMinuteRange(value) ? `[${isoOfMinute(value.start)},${isoOfMinute(value.end)})` : value),
  from: (text: string | null): MinuteRangeValue | null => {
    if (text === null) return null;
    const [start, end] = boundsOf(text);
    return { start: minuteOfText(start), end: minuteOfText(end) };
  },
};

/** An instant in minutes as ISO 8601 in UTC. */
export function isoOfMinute(minute: number): string {
  return new Date(minute * MS_PER_MINUTE).toISOString();
}

function boundsOf(range: string): [string, string] {
  const match = /^\["?([^",]+)"?,"?([^",]+)"?\)$/.exec(range);
  if (!match) throw new RangeError(`“${range}” is not a half-open range with both ends.`);
  return [match[1], match[2]];
}

function minuteOfText(text: string): number {
  // PostgreSQL writes `2026-01-05 08:00:00+00`; ISO 8601 wants the T and minutes in the offset.
  const iso = text.replace(' ', 'T').replace(/([+-]\d{2})$/, '$1:00');
  return Math.floor(Date.parse(iso) / MS_PER_MINUTE);
}

function isDayRange(value: unknown): value is DayRangeValue {
  return typeof value === 'object' && value !== null && 'from' in value && 'until' in value;
}

function isMinuteRange(value: unknown): value is MinuteRangeValue {
  return typeof value === 'object' && value !== null && 'start' in value && 'end' in value;
}
