import type { CycleStep } from '../bounds/critical-path';
import type { Minute } from '../../time/span';
import type { Link } from '../problem/link';

/** What a search for a conflict may spend. */
export interface ConflictBudget {
  /** Conflicts of exact search for each question asked. */
  readonly maxConflicts: number;
  readonly shouldStop: () => boolean;
}

/** What says that a stage may not be later: the end of the horizon, its latest end, a visit or a pin. */
export type LateLimit = 'horizon' | 'latest' | 'fixed' | 'pin' | 'progress';

/**
 * Requirements that cannot all be kept, none of which could be left out: the smallest such set found, as data. `sayConflict`
 * makes the sentence.
 *
 * - `cycle`: gaps round a ring of stages that ask an instant to be `excessMinutes` after itself.
 * - `too-late`: a chain from `notBefore` on that leads past what the last stage's limit allows, by `excessMinutes`.
 * - `collision`: stages that time keeps close together and that ask for more than the bays or crafts have.
 */
export type Conflict =
  | { readonly kind: 'cycle'; readonly steps: readonly CycleStep[]; readonly excessMinutes: number }
  | {
      readonly kind: 'too-late';
      readonly steps: readonly CycleStep[];
      readonly notBefore: Minute;
      readonly firstStageId: string;
      readonly stageId: string;
      readonly limit: LateLimit;
      readonly notAfter: Minute;
      readonly excessMinutes: number;
    }
  | {
      readonly kind: 'collision';
      readonly stageIds: readonly string[];
      readonly bayIds: readonly string[];
      readonly craftIds: readonly string[];
      /** Maximum gaps that keep the stages together, and the links between them. */
      readonly links: readonly Link[];
    };
