import type { LevelProgress } from '../problem/result';

/** What a search may spend and whom it tells. The clock, if any, is the caller's, behind `shouldStop`. */
export interface LevelOptions {
  /** Any integer; the same problem, seed and schedule limit give the same plan on every machine. */
  readonly seed: number;
  /** Most passes of a generation scheme, one for each forward or backward pass. */
  readonly maxSchedules: number;
  /** Asked between passes; true ends the search with the best plan so far. */
  readonly shouldStop: () => boolean;
  /** Called when a better plan is found, and now and then without one. */
  readonly onProgress?: (progress: LevelProgress) => void;
}
