import { formatMinutes } from '@common/time/format-instant';
import { type DateChange, marginState } from '../date-margins';

/** "2 d 3 h in hand", "late by 4 h", "not planned yet": a margin by the clock. */
export function sayMargin(marginMinutes: number | null): string {
  switch (marginState(marginMinutes)) {
    case 'unplanned':
      return 'not planned yet';
    case 'missed':
      return `late by ${formatMinutes(-(marginMinutes ?? 0))}`;
    case 'close':
    case 'met':
      return `${formatMinutes(marginMinutes ?? 0)} in hand`;
  }
}

/** "margin 2 d 3 h → 4 h", with the word late on whichever side is. */
export function sayMarginChange(change: Pick<DateChange, 'before' | 'after'>): string {
  return `margin ${bare(change.before)} → ${bare(change.after)}`;
}

/** "loses 1 d 2 h", "gains 4 h": how much a date pays or wins; empty where either side is unknown. */
export function sayLoss(change: Pick<DateChange, 'before' | 'after'>): string {
  if (change.before === null || change.after === null) return '';
  const gain = change.after - change.before;
  if (gain === 0) return 'unchanged';
  return gain < 0 ? `loses ${formatMinutes(-gain)}` : `gains ${formatMinutes(gain)}`;
}

function bare(minutes: number | null): string {
  if (minutes === null) return 'unknown';
  return minutes < 0 ? `late ${formatMinutes(-minutes)}` : formatMinutes(minutes);
}
