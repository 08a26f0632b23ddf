import type { KEY_DATE_KINDS } from '@common/contract/productions';
import type { Plan } from '@common/planning/problem/plan';
import type { Minute } from '@common/time/span';

/**
 * The issued plan as calendars see it: where everything stood when it was issued, with today's names and key dates, which are
 * the studio's word whether a plan has been issued since or not.
 */
export interface IssuedView {
  /** Counts up from 1 with every issue; 0 before the first, with an empty plan. */
  readonly number: number;
  /** When it was issued, in whole seconds since 1970-01-01T00:00Z; 0 before the first issue. */
  readonly atSeconds: number;
  readonly plan: Plan;
  readonly names: IssuedNames;
}

/** What the ids of an issued plan stand for, and the key dates beside it. */
export interface IssuedNames {
  readonly productions: readonly IssuedProduction[];
  readonly pieces: readonly { readonly id: string; readonly name: string }[];
  readonly stages: readonly IssuedStage[];
  readonly makers: readonly { readonly id: string; readonly name: string }[];
  readonly bays: readonly { readonly id: string; readonly name: string }[];
  readonly keyDates: readonly IssuedKeyDate[];
}

/** A production of an issued plan. */
export interface IssuedProduction {
  readonly id: string;
  readonly name: string;
  readonly mark: string;
  /** `tentative` makes its events tentative; every other state is firm. */
  readonly state: string;
}

/** A stage of an issued plan. */
export interface IssuedStage {
  readonly id: string;
  readonly pieceId: string;
  readonly productionId: string;
  readonly name: string;
  readonly kind: 'make' | 'sign-off' | 'check' | 'transport';
  readonly nth: number | null;
  readonly of: number | null;
  readonly materialName: string | null;
  readonly milestone: string | null;
  readonly cautions: readonly string[];
}

/** A key date of a production that is still wanted. */
export interface IssuedKeyDate {
  readonly id: string;
  readonly productionId: string;
  readonly kind: (typeof KEY_DATE_KINDS)[number];
  readonly at: Minute;
  readonly strength: 'hard' | 'wished';
}
