import type { Minute } from '../../time/span';

/** Time that passes by the clock after the work of a stage. */
export interface Dwell {
  /** Minutes at the reference temperature (rate 1000); 0 or more. */
  readonly minutes: number;
  /**
   * Which advance profile holds where: keyed by the bay of the first place that the stage keeps through its dwell, and `room`
   * for anywhere else. A missing key means rate 1000 throughout.
   */
  readonly advance: Readonly<Record<string, string>>;
  /** Minutes after the end of work during which one of the crew stays on site; 0 for none. */
  readonly attendedMinutes: number;
  readonly window: Window | null;
}

/**
 * The latest end of a dwell: every stage linked from its dwell end must start within `minutes` (at the reference temperature)
 * of the end of work. A `soft` window may be missed at a price: `extraMinutes` more effort for the late follower (abrade first).
 */
export type Window =
  | { readonly kind: 'hard'; readonly minutes: number }
  | { readonly kind: 'soft'; readonly minutes: number; readonly extraMinutes: number; readonly costMinor: number };

/**
 * A piecewise constant rate of curing: `permille[i]` holds from `from[i]` until `from[i+1]`, the last one for ever, and the
 * first one before `from[0]` too. 1000 is the reference temperature; 0 means that nothing advances (too cold).
 */
export interface AdvanceProfile {
  readonly id: string;
  readonly from: readonly Minute[];
  readonly permille: readonly number[];
}
