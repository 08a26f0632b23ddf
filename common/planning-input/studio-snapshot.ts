import type { LinkDraft, StageDraft, StageState } from '../domain/stage-draft';
import type { ClimateHistory } from '../dwell/climate';
import type { DwellBehaviour } from '../dwell/law';
import type { Plan } from '../planning/problem/plan';
import type { Pin } from '../planning/problem/problem';
import type { DayRange } from '../time/calendar-day';
import type { Pattern } from '../time/pattern';
import type { CalendarDay, Minute } from '../time/span';

/**
 * The studio as it stands, in the words of the trade: what a plan is made from. Read from the database by the server, built
 * from constants by the demo; `buildProblem` turns it into integers for the engine. Ids are opaque strings.
 */
export interface StudioSnapshot {
  /** IANA zone of the studio. */
  readonly zone: string;
  readonly settings: PlanningSettings;
  readonly closures: readonly DayRange[];
  /** The climate wherever a bay has none of its own. */
  readonly room: ClimateHistory;
  /** Active makers only. */
  readonly makers: readonly SnapshotMaker[];
  /** Active bays and moulds only. */
  readonly bays: readonly SnapshotBay[];
  readonly materials: readonly SnapshotMaterial[];
  readonly productions: readonly SnapshotProduction[];
  readonly pieces: readonly SnapshotPiece[];
  readonly stages: readonly SnapshotStage[];
  readonly links: readonly SnapshotLink[];
  readonly purchases: readonly SnapshotPurchase[];
  /** The plan people work to, and the crew and bays of stages begun; null before the first issue. */
  readonly issued: Plan | null;
}

/** The studio's settings that bear on a plan. */
export interface PlanningSettings {
  readonly changePenaltyMinor: number;
  readonly unevennessWeight: number;
  readonly earlinessWeight: number;
  readonly freezeMinutes: number;
  readonly restBetweenMinutes: number;
  readonly dayLimitMinutes: number;
  readonly weekLimitMinutes: number;
  /** Overtime costs this many per mille of an ordinary hour. */
  readonly overtimePermille: number;
}

/** A maker with crafts, patterns and leave. */
export interface SnapshotMaker {
  readonly id: string;
  readonly crafts: readonly { readonly craftId: string; readonly pacePermille: number }[];
  readonly patterns: readonly MakerPattern[];
  readonly leave: readonly DayRange[];
  readonly hourCostMinor: number;
  /** Own limits, or null for the studio's. */
  readonly dayLimitMinutes: number | null;
  readonly weekLimitMinutes: number | null;
}

/** A maker's pattern: ordinary time, or time allowed at the overtime price. */
export interface MakerPattern extends Pattern {
  readonly kind: 'ordinary' | 'overtime';
}

/** A bay, or a mould where it belongs to a piece. */
export interface SnapshotBay {
  readonly id: string;
  readonly isMould: boolean;
  readonly capacity: number;
  /** When work may be done in it; empty for always. Closures close it too. */
  readonly openings: readonly Pattern[];
  /** Null for the room's. */
  readonly climate: ClimateHistory | null;
}

/** A material of the library: how each of its milestones advances. Materials of a family can stand in for each other. */
export interface SnapshotMaterial {
  readonly id: string;
  readonly family: string;
  readonly milestones: readonly SnapshotMilestone[];
}

/** One milestone of a material, such as `demould`, with its law and reference climate. */
export interface SnapshotMilestone {
  readonly milestone: string;
  readonly behaviour: DwellBehaviour;
  /** Least, likeliest and greatest minutes at the reference climate. */
  readonly minutes: { readonly low: number; readonly likely: number; readonly high: number };
}

/** A production with its key dates. `delivered` and `declined` ones leave the plan. */
export interface SnapshotProduction {
  readonly id: string;
  readonly state: 'tentative' | 'committed' | 'delivered' | 'declined';
  readonly keyDates: readonly SnapshotKeyDate[];
}

/** A key date; `pieceIds` empty means every piece of the production. */
export interface SnapshotKeyDate {
  readonly id: string;
  readonly at: Minute;
  readonly strength: 'hard' | 'wished';
  readonly weight: number;
  readonly pieceIds: readonly string[];
}

/** A piece, for the order of its stages. */
export interface SnapshotPiece {
  readonly id: string;
  readonly productionId: string;
}

/** A stage as asked for and as far as it has come. */
export interface SnapshotStage extends StageDraft {
  readonly id: string;
  readonly pieceId: string;
  /** Place among the piece's stages; they follow each other so where the piece has no links of its own. */
  readonly position: number;
  readonly state: StageState;
  readonly startedAt: Minute | null;
  readonly finishedAt: Minute | null;
  readonly spentMinutes: number;
  /** What the crew says is left, in person-minutes; null where nobody said. */
  readonly remainingMinutes: number | null;
  /** Who worked on it and where, for a stage begun; null where it is not known, and the issued plan is asked. */
  readonly makerIds: readonly string[] | null;
  readonly bayIds: readonly string[] | null;
  readonly pin: Pin | null;
}

/** A link between two stages. */
export interface SnapshotLink extends LinkDraft {
  readonly fromStageId: string;
  readonly toStageId: string;
}

/** A bought-in part and the stage that needs it. */
export interface SnapshotPurchase {
  readonly stageId: string;
  readonly leadDays: number;
  readonly orderedOn: CalendarDay | null;
  readonly dueOn: CalendarDay | null;
  readonly receivedOn: CalendarDay | null;
}
