import type { KeyDate, Plan, Problem } from '@common/planning';
import type { Minute } from '@common/time/span';

/** How a key date stands in a plan; null where a stage that it waits for has no place. */
export interface DateMargin {
  readonly keyDate: KeyDate;
  /** When the last of its stages is done and firm. */
  readonly readyAt: Minute | null;
  /** Minutes by the clock from then to the date; negative where it is missed. */
  readonly marginMinutes: number | null;
}

/** A key date's margins before and after something is moved. */
export interface DateChange {
  readonly keyDate: KeyDate;
  readonly before: number | null;
  readonly after: number | null;
}

/** Less than a day in hand is little. */
export const CLOSE_MINUTES = 24 * 60;

/** How a margin is to be spoken of. */
export type MarginState = 'met' | 'close' | 'missed' | 'unplanned';

/** Every key date of a problem as a plan leaves it, earliest first. */
export function dateMargins(problem: Problem, plan: Plan): DateMargin[] {
  const firm = new Map(plan.placements.map((placement) => [placement.stageId, placement.dwellEnd]));
  return [...problem.keyDates]
    .sort((a, b) => a.at - b.at || (a.id < b.id ? -1 : 1))
    .map((keyDate) => {
      const ends = keyDate.stageIds.map((stageId) => firm.get(stageId));
      const placed = ends.filter((end) => end !== undefined);
      const whole = placed.length === ends.length && ends.length > 0;
      const readyAt = whole ? placed.reduce((latest, end) => Math.max(latest, end), -Infinity) : null;
      return { keyDate, readyAt, marginMinutes: readyAt === null ? null : keyDate.at - readyAt };
    });
}

/** The dates whose margin differs between two plans of one problem: those that lose most first, then those that gain most. */
export function dateChanges(before: readonly DateMargin[], after: readonly DateMargin[]): DateChange[] {
  const was = new Map(before.map((margin) => [margin.keyDate.id, margin.marginMinutes]));
  return after
    .map(({ keyDate, marginMinutes }) => ({ keyDate, before: was.get(keyDate.id) ?? null, after: marginMinutes }))
    .filter((change) => change.before !== change.after)
    .sort((a, b) => gainOf(a) - gainOf(b));
}

/** In words: missed, close, met, or not known yet. */
export function marginState(marginMinutes: number | null): MarginState {
  if (marginMinutes === null) return 'unplanned';
  if (marginMinutes < 0) return 'missed';
  return marginMinutes < CLOSE_MINUTES ? 'close' : 'met';
}

/** Minutes gained, negative for lost. A date that can no longer be met at all has lost most. */
function gainOf(change: DateChange): number {
  if (change.after === null) return -Infinity;
  return change.before === null ? Infinity : change.after - change.before;
}
