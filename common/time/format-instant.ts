import { dayFromNumber, weekdayOf } from './calendar-day';
import { localTimeOf } from './local-time';
import type { CalendarDay, Minute } from './span';
import { localOfInstant, MINUTES_PER_DAY } from './zone';

const WEEKDAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'] as const;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** "Tue 09:10": weekday and clock in `zone`, for sentences about the days around now. */
export function formatInstant(instant: Minute, zone: string): string {
  const { day, time } = wallOf(instant, zone);
  return `${WEEKDAYS[weekdayOf(day) - 1]} ${time}`;
}

/** "Tue 14 Apr 09:10": day, month and clock in `zone`, for instants that may be weeks away. */
export function formatDayAndTime(instant: Minute, zone: string): string {
  const { day, time } = wallOf(instant, zone);
  return `${formatDay(day)} ${time}`;
}

/** "Tue 14 Apr": a calendar day without its year. */
export function formatDay(day: CalendarDay): string {
  const [, month, date] = day.split('-').map(Number);
  return `${WEEKDAYS[weekdayOf(day) - 1]} ${date} ${MONTHS[month - 1]}`;
}

/** "3 h 20 min", "45 min", "2 d 4 h" by the clock: a length of time, to the minute under a day and to the hour above. */
export function formatMinutes(minutes: number): string {
  const size = Math.round(Math.abs(minutes));
  const sign = minutes < 0 ? '−' : '';
  if (size < 60) {
    return `${sign}${size} min`;
  }
  if (size < MINUTES_PER_DAY) {
    return `${sign}${Math.floor(size / 60)} h${size % 60 === 0 ? '' : ` ${size % 60} min`}`;
  }
  const hours = Math.round(size / 60);
  return `${sign}${Math.floor(hours / 24)} d${hours % 24 === 0 ? '' : ` ${hours % 24} h`}`;
}

function wallOf(instant: Minute, zone: string): { readonly day: CalendarDay; readonly time: string } {
  const local = localOfInstant(instant, zone);
  const dayCount = Math.floor(local / MINUTES_PER_DAY);
  return { day: dayFromNumber(dayCount), time: localTimeOf(local - dayCount * MINUTES_PER_DAY) };
}
