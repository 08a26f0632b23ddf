import type { DateRisk } from '@common/contract';
import { formatMinutes } from '@common/time/format-instant';
import { sayHours } from '../ui/say-time';

/** How a date stands, in a word. */
export const STATE_WORDS: Readonly<Record<DateRisk['state'], string>> = {
  met: 'in time',
  close: 'close',
  missed: 'late',
  unplanned: 'not planned',
};

/** "2 d 3 h in hand, 11 h 30 of it working time": a date's margin by the clock and in working time. */
export function sayDateMargin(risk: Pick<DateRisk, 'marginMinutes' | 'workingMarginMinutes'>): string {
  if (risk.marginMinutes === null) return 'No margin is known yet';
  const late = risk.marginMinutes < 0;
  const size = formatMinutes(Math.abs(risk.marginMinutes));
  const working =
    risk.workingMarginMinutes === null ? '' : `, ${sayHours(Math.abs(risk.workingMarginMinutes))} of it working time`;
  return late ? `Late by ${size}${working}` : `${size} in hand${working}`;
}

/** Where on a line of margin a date stands, 0 to 1: missed at the left, two weeks and more at the right, most room near the brink. */
export function marginPlace(marginMinutes: number | null): number | null {
  if (marginMinutes === null) return null;
  const days = marginMinutes / 1440;
  const reach = 14;
  const bent = Math.sign(days) * Math.sqrt(Math.min(1, Math.abs(days) / reach));
  return (bent + 1) / 2;
}
