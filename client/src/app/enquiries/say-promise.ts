import type { KeyDateView, PromiseWayView } from '@common/contract';
import { formatDayAndTime, formatMinutes } from '@common/time/format-instant';
import { minuteOf } from '../ui/say-time';

/** "Tue 14 Apr 10:00", or that nobody can say. Minutes since 1970. */
export function sayEarliest(at: number | null, zone: string): string {
  return at === null ? 'not within the months ahead' : formatDayAndTime(at, zone);
}

/** "3 d 2 h before the date asked for", "1 d after it", against the date asked for. */
export function sayAgainst(at: number | null, asked: KeyDateView | null): string {
  if (at === null || asked === null) return '';
  const minutes = minuteOf(asked.at) - at;
  if (minutes === 0) return 'just at the date asked for';
  return `${formatMinutes(Math.abs(minutes))} ${minutes > 0 ? 'before' : 'after'} the date asked for`;
}

/** The delivery that an enquiry asks for: its delivery, else its first key date; null where it has none. */
export function askedFor(dates: readonly KeyDateView[]): KeyDateView | null {
  const inOrder = dates.toSorted((a, b) => a.at.localeCompare(b.at));
  return inOrder.find(({ kind }) => kind === 'delivery') ?? inOrder.at(0) ?? null;
}

/** Key dates of others that a way moves, or makes likelier to be missed by a per cent or more; the worst hit first. */
export function pushedBy(way: PromiseWayView): PromiseWayView['others'] {
  return way.others
    .filter(
      (date) =>
        date.marginAfter !== date.marginBefore || Math.abs(date.missChanceAfter - date.missChanceBefore) >= LEAST_TOLD,
    )
    .toSorted(
      (a, b) =>
        b.missChanceAfter - b.missChanceBefore - (a.missChanceAfter - a.missChanceBefore) ||
        a.marginAfter - a.marginBefore - (b.marginAfter - b.marginBefore),
    );
}

const LEAST_TOLD = 0.01;

/** A margin by the clock: "2 d 3 h", "late by 5 h". */
export function sayMargin(minutes: number): string {
  return minutes < 0 ? `late by ${formatMinutes(-minutes)}` : formatMinutes(minutes);
}

/** "just now", "12 min ago", "3 d 2 h ago". */
export function sayAge(at: string, nowMs: number): string {
  const minutes = Math.floor((nowMs - Date.parse(at)) / 60_000);
  return minutes < 1 ? 'just now' : `${formatMinutes(minutes)} ago`;
}
