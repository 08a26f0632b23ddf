import type { z } from 'zod';
import type { CrewWanted, StageDraft } from '@common/contract/stage';

/** What the studio has that a row can name. */
export interface KnownWords {
  readonly crafts: readonly { readonly id: string; readonly key: string; readonly name: string }[];
  readonly bays: readonly { readonly id: string; readonly name: string }[];
  readonly materials: readonly KnownMaterial[];
  /** IANA zone in which visits are written. */
  readonly zone: string;
  /** Decimals of the studio's currency: 2 for pence, 0 for yen. */
  readonly currencyDecimals: number;
}

/** A material with the usual minutes of each of its milestones. */
export interface KnownMaterial {
  readonly id: string;
  readonly name: string;
  readonly attendedMinutes: number;
  readonly milestones: readonly { readonly milestone: string; readonly likelyMinutes: number }[];
}

/** What a row says of its place, `until` still by name. */
export interface RowPlace {
  readonly bayIds: readonly string[];
  readonly units: number;
  readonly hold: 'work' | 'dwell' | 'until-stage';
  readonly until: string | null;
}

/** A stage by name; `piece` null for the row's own. */
export interface StageName {
  readonly piece: string | null;
  readonly stage: string;
}

/** What a row waits for: the stage above it in its piece, nothing, or stages by name. */
export type RowAfter =
  | { readonly kind: 'above' }
  | { readonly kind: 'nothing' }
  | { readonly kind: 'named'; readonly names: readonly StageName[] };

/** One row that could be read by itself; what it names in other rows is still to be found. */
export interface RowStage {
  readonly line: number;
  readonly pieceName: string;
  readonly draft: Omit<z.output<typeof StageDraft>, 'places'>;
  readonly places: readonly RowPlace[];
  readonly after: RowAfter;
}

export type RowCrew = z.output<typeof CrewWanted>;
