import type { Minute } from '../../time/span';

/**
 * Why a stage starts when it does, as data: the sentence is made from it, in the trade's words, by `explain/`.
 * `until` is the instant that the cause lets go, equal to the stage's start unless several causes meet.
 */
export type Reason =
  | { readonly kind: 'pinned'; readonly until: Minute }
  | { readonly kind: 'started'; readonly until: Minute }
  | { readonly kind: 'frozen'; readonly until: Minute }
  | { readonly kind: 'visit'; readonly until: Minute }
  | { readonly kind: 'earliest'; readonly until: Minute }
  | { readonly kind: 'horizon'; readonly until: Minute }
  | { readonly kind: 'work-before'; readonly stageId: string; readonly until: Minute }
  | { readonly kind: 'dwell-before'; readonly stageId: string; readonly until: Minute }
  | { readonly kind: 'gap-after'; readonly stageId: string; readonly gapMinutes: number; readonly until: Minute }
  | { readonly kind: 'bay-taken'; readonly bayId: string; readonly stageId: string; readonly until: Minute }
  | { readonly kind: 'bay-closed'; readonly bayId: string; readonly until: Minute }
  | {
      readonly kind: 'crew-busy';
      readonly makerId: string;
      readonly craftId: string;
      readonly stageId: string;
      readonly until: Minute;
    }
  | { readonly kind: 'crew-off-shift'; readonly craftId: string; readonly until: Minute }
  | { readonly kind: 'too-long-for-shift'; readonly until: Minute }
  | { readonly kind: 'held-for-window'; readonly stageId: string; readonly until: Minute }
  | { readonly kind: 'kept-for-evenness'; readonly until: Minute };

/** A stage and the reasons for its start, the one that binds last (the latest `until`) first. */
export interface StageReasons {
  readonly stageId: string;
  readonly reasons: readonly Reason[];
}

/** One step of a driving chain, from the key date back: a stage and what made it wait. `slackMinutes` is 0 on a tight chain. */
export interface ChainStep {
  readonly stageId: string;
  readonly because: Reason;
}

/** The stages, dwells and waits that lead to a key date without slack, last first; they may belong to any production. */
export interface DrivingChain {
  readonly keyDateId: string;
  readonly finish: Minute;
  readonly marginMinutes: number;
  readonly steps: readonly ChainStep[];
}

/** Minutes asked against minutes there, for one craft, maker or bay on one studio day. */
export interface LoadCell {
  readonly day: string;
  readonly loadMinutes: number;
  readonly capacityMinutes: number;
}
