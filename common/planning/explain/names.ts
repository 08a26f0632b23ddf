import type { Minute } from '../../time/span';

/** Names for sentences; each falls back on something sayable where a name is not known. */
export interface Names {
  readonly stage: (stageId: string) => string;
  readonly maker: (makerId: string) => string;
  readonly bay: (bayId: string) => string;
  readonly craft: (craftId: string) => string;
  readonly keyDate: (keyDateId: string) => string;
  /** The person who has a craft, as in "no laminator free". */
  readonly craftsperson: (craftId: string) => string;
}

/** Writes an instant in the reader's zone, such as "Tue 09:10". */
export type FormatInstant = (at: Minute) => string;
