import type { LevelProgress, LevelResult, Plan, Problem } from '@common/planning';

/** Counts up when a message changes, so that a worker of another build is not misunderstood. */
export const PROTOCOL = 1;

/** What a worker is asked to do. `cancel` is one shared word: 1 tells it to stop. */
export interface LevelJob {
  readonly protocol: typeof PROTOCOL;
  readonly problem: Problem;
  /** `dates` levels from the start; `within-dates` evens `current` out. */
  readonly mode: 'dates' | 'within-dates';
  /** The plan as it stands: what is found is never worse than it. */
  readonly current: Plan;
  readonly seed: number;
  readonly milliseconds: number;
  readonly cancel: SharedArrayBuffer;
}

/** What a worker says. */
export type LevelMessage =
  | { readonly protocol: typeof PROTOCOL; readonly kind: 'progress'; readonly progress: LevelProgress }
  | {
      readonly protocol: typeof PROTOCOL;
      readonly kind: 'found';
      readonly result: LevelResult;
      readonly endedBy: LevelEnd;
    }
  | { readonly protocol: typeof PROTOCOL; readonly kind: 'failed'; readonly failure: string };

/** Why a levelling ended: by itself, by the time it was given, or because it was told to. */
export type LevelEnd = 'search' | 'time' | 'cancel';
