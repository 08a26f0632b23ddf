import { type DayRange, dayRangeSpan } from './calendar-day';
import { expandPatterns, type Pattern } from './pattern';
import type { Span } from './span';
import { normaliseSpans, type SpanList, subtractSpans } from './span-list';

/** When someone or something is there: its patterns less the runs of days away (a maker's leave, the studio's closures). */
export interface Availability {
  readonly patterns: readonly Pattern[];
  readonly away: readonly DayRange[];
}

/**
 * The spans of an availability inside `frame`. A day away is taken out from midnight to midnight of the zone, so a night
 * shift into it ends at midnight.
 */
export function availableSpans(availability: Availability, frame: Span, zone: string): SpanList {
  const away = normaliseSpans(availability.away.map((days) => dayRangeSpan(days, zone)));
  return subtractSpans(expandPatterns(availability.patterns, frame, zone), away);
}
