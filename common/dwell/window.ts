import type { Minute } from '../time/span';
import type { ClimateHistory } from './climate';
import { type DwellTime, readyAt } from './ready';

/** When a surface may be worked on again: from the end of the least dwell until the end of its window. */
export interface WorkableSpan {
  /** Null where the dwell is never over. */
  readonly from: Minute | null;
  /** Null where the window never closes. */
  readonly until: Minute | null;
}

/**
 * The span in which the next coat or layer may begin, after work that ended at `end`. The least dwell and the window each
 * move with the climate by their own law: warmth brings both forward, and may leave no time between them.
 */
export function workableSpan(
  end: Minute,
  least: DwellTime,
  window: DwellTime | null,
  history: ClimateHistory,
): WorkableSpan {
  return {
    from: readyAt(end, least, history),
    until: window === null ? null : readyAt(end, window, history),
  };
}

/** Minutes by which `start` comes after the window has closed; 0 where it does not, and where there is no window. */
export function windowMissMinutes(span: WorkableSpan, start: Minute): number {
  return span.until === null ? 0 : Math.max(0, start - span.until);
}
