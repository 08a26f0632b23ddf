import type { DrivingChain, LoadRow, Move, Placement, Plan, Problem, StageReasons, Unmet } from '@common/planning';

/** The protocol's version: a page that was loaded before an update must not talk past its worker. */
export const PROTOCOL = 1;

/** What the page asks of the planning worker. Every question but `hold-plan` is about the plan held last. */
export type Question = { readonly protocol: typeof PROTOCOL; readonly ask: number } & (
  | { readonly kind: 'hold-plan'; readonly problem: Problem; readonly plan: Plan }
  | { readonly kind: 'try-move'; readonly move: Move }
  | { readonly kind: 'try-moves'; readonly moves: readonly Move[] }
  | { readonly kind: 'read-reasons' }
  | { readonly kind: 'read-chains' }
  | { readonly kind: 'read-load' }
);

/** A question before it has a number. */
export type QuestionBody = Question extends infer Q
  ? Q extends Question
    ? Omit<Q, 'protocol' | 'ask'>
    : never
  : never;

/** The plan after a move, told by what differs: a frame's budget does not pay for copying what stands still. */
export interface Trial {
  readonly moved: readonly string[];
  /** Where the moved stages stand now; a moved stage that has none has lost its place. */
  readonly placements: readonly Placement[];
  readonly unmet: readonly Unmet[];
}

/** Load rows of the plan held. */
export interface LoadRows {
  readonly crafts: readonly LoadRow[];
}

/** What the worker answers, `ask` being the number of the question. A crash is an answer too. */
export type Answer = { readonly protocol: typeof PROTOCOL; readonly ask: number } & (
  | { readonly kind: 'plan-held' }
  | { readonly kind: 'moved'; readonly trial: Trial }
  | { readonly kind: 'tried'; readonly trials: readonly Trial[] }
  | { readonly kind: 'reasons'; readonly reasons: readonly StageReasons[] }
  | { readonly kind: 'chains'; readonly chains: readonly DrivingChain[] }
  | { readonly kind: 'load'; readonly load: LoadRows }
  | { readonly kind: 'failed'; readonly message: string }
);

/** An answer before it is addressed. */
export type AnswerBody = Answer extends infer A ? (A extends Answer ? Omit<A, 'protocol' | 'ask'> : never) : never;
