import type { Instant } from '@common/contract';
import { addDays, dayFromNumber, dayNumber, type DayRange, weekdayOf } from '@common/time/calendar-day';
import { formatDay, formatDayAndTime } from '@common/time/format-instant';
import { isLocalTime, minuteOfDay } from '@common/time/local-time';
import { instantOfLocal, localOfInstant, MINUTES_PER_DAY } from '@common/time/zone';

const MS_PER_MINUTE = 60_000;

/** Whole minutes since 1970 of an instant on the wire; seconds are cut off. */
export function minuteOf(instant: Instant): number {
  return Math.floor(Date.parse(instant) / MS_PER_MINUTE);
}

/** An instant on the wire from whole minutes since 1970. */
export function instantOf(minute: number): Instant {
  return new Date(minute * MS_PER_MINUTE).toISOString();
}

/** "09:10" in a zone. */
export function sayTime(instant: Instant, zone: string): string {
  return formatDayAndTime(minuteOf(instant), zone).slice(-5);
}

/** "Tue 14 Apr 09:10" in a zone. */
export function sayDayAndTime(instant: Instant, zone: string): string {
  return formatDayAndTime(minuteOf(instant), zone);
}

/** "Tue 14 Apr", with the year where it is not the one given. */
export function sayDay(day: string, thisYear: string): string {
  const year = day.slice(0, 4);
  return year === thisYear ? formatDay(day) : `${formatDay(day)} ${year}`;
}

/** "Tue 14 – Thu 16 Apr" for days from the first to the last that are inside. */
export function sayDays(days: DayRange, thisYear: string): string {
  const last = addDays(days.until, -1);
  return last === days.from ? sayDay(last, thisYear) : `${sayDay(days.from, thisYear)} – ${sayDay(last, thisYear)}`;
}

/** Hands-on time: "7 h 30", "45 min", "0 h". Never in days, since a day's hours differ from maker to maker. */
export function sayHours(minutes: number): string {
  const size = Math.round(Math.abs(minutes));
  const sign = minutes < 0 ? '−' : '';
  if (size > 0 && size < 60) {
    return `${sign}${size} min`;
  }
  const rest = size % 60;
  return `${sign}${Math.floor(size / 60)} h${rest === 0 ? '' : ` ${String(rest).padStart(2, '0')}`}`;
}

/** Hours as a person types them, "7.5", "7:30", "7 h 30" or "45 min", in minutes; null where they can't be read. */
export function readHours(text: string): number | null {
  const plain = text.trim().toLowerCase().replace(',', '.');
  const clock = /^(\d{1,4})(?::|\s*h\s*)(\d{1,2})?(?:\s*min|\s*m)?$/.exec(plain);
  if (clock) {
    return Number(clock[1]) * 60 + Number(clock[2] ?? 0);
  }
  const minutes = /^(\d{1,6})\s*(?:min|m)$/.exec(plain);
  if (minutes) {
    return Number(minutes[1]);
  }
  return /^\d{1,5}(?:\.\d{1,3})?$/.test(plain) ? Math.round(Number(plain) * 60) : null;
}

/** Minutes as `readHours` reads them back, short: "7:30", "7". */
export function writeHours(minutes: number): string {
  const rest = minutes % 60;
  return rest === 0 ? String(minutes / 60) : `${Math.floor(minutes / 60)}:${String(rest).padStart(2, '0')}`;
}

const MINUTES_IN = { d: MINUTES_PER_DAY, h: 60, min: 1 } as const;

/** A length of time by the clock as a person types it, "2 d 4 h", "36 h", "90 min", "36" for hours; null where it can't be read. */
export function readClockTime(text: string): number | null {
  const plain = text.trim().toLowerCase().replaceAll(',', '.');
  const parts = [...plain.matchAll(/(\d{1,5}(?:\.\d{1,3})?)\s*(min|m|h|d)(?![a-z])/g)];
  const rest = plain.replace(/\d{1,5}(?:\.\d{1,3})?\s*(?:min|m|h|d)(?![a-z])/g, '').trim();
  if (parts.length === 0 || rest !== '') {
    return readHours(text);
  }
  const minutes = parts.map(([, figure, unit]) => Number(figure) * MINUTES_IN[unit === 'm' ? 'min' : (unit as 'd')]);
  return Math.round(minutes.reduce((sum, part) => sum + part, 0));
}

/** A length of time exact to the minute, as `readClockTime` reads it back: "1 d 12 h". */
export function writeClockTime(minutes: number): string {
  const days = Math.floor(minutes / MINUTES_PER_DAY);
  const hours = Math.floor((minutes % MINUTES_PER_DAY) / 60);
  const parts = [days && `${days} d`, hours && `${hours} h`, minutes % 60 && `${minutes % 60} min`];
  return parts.filter(Boolean).join(' ') || '0 min';
}

/** The day and the clock reading of an instant in a zone, for a form. */
export function toDayAndTime(instant: Instant, zone: string): { readonly day: string; readonly time: string } {
  const local = localOfInstant(minuteOf(instant), zone);
  const day = Math.floor(local / MINUTES_PER_DAY);
  const rest = local - day * MINUTES_PER_DAY;
  const time = `${String(Math.floor(rest / 60)).padStart(2, '0')}:${String(rest % 60).padStart(2, '0')}`;
  return { day: dayFromNumber(day), time };
}

/** The instant of a day and a clock reading in a zone; null where the reading is none. */
export function fromDayAndTime(day: string, time: string, zone: string): Instant | null {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(day) || !isLocalTime(time)) {
    return null;
  }
  return instantOf(instantOfLocal(dayNumber(day) * MINUTES_PER_DAY + minuteOfDay(time), zone));
}

/** Whether a calendar day is a Saturday or a Sunday. */
export function isWeekend(day: string): boolean {
  return weekdayOf(day) > 5;
}
