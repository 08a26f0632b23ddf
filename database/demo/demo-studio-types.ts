import type { Craft } from '@common/domain/craft';
import type { KeyDateKind } from '@common/domain/key-date';
import type { RecipeDraft } from '@common/domain/recipe';
import type { LinkDraft, StageDraft, StageState } from '@common/domain/stage-draft';
import type { MakerPattern, PlanningSettings } from '@common/planning-input';
import type { DayRange } from '@common/time/calendar-day';
import type { Pattern } from '@common/time/pattern';
import type { CalendarDay, Minute } from '@common/time/span';
import type { DemoMaterial } from './demo-material';

/**
 * A whole studio as plain data. Ids are readable keys such as `bay:booth`; who stores it gives each a record id of its own.
 * Instants are minutes since 1970-01-01T00:00Z.
 */
export interface DemoStudio {
  readonly name: string;
  readonly zone: string;
  readonly currency: string;
  readonly settings: DemoSettings;
  readonly closures: readonly DemoClosure[];
  readonly crafts: readonly DemoCraft[];
  readonly materials: readonly DemoMaterial[];
  readonly recipes: readonly DemoRecipe[];
  readonly makers: readonly DemoMaker[];
  /** Moulds among them, each with its piece. */
  readonly bays: readonly DemoBay[];
  readonly clients: readonly DemoClient[];
  /** In order of entry. */
  readonly productions: readonly DemoProduction[];
  readonly pieces: readonly DemoPiece[];
  readonly stages: readonly DemoStage[];
  readonly links: readonly DemoLink[];
  readonly purchases: readonly DemoPurchase[];
  readonly accounts: readonly DemoAccount[];
}

/** The studio's settings with its room. */
export interface DemoSettings extends PlanningSettings {
  readonly roomTemperatureCelsius: number;
  readonly roomHumidityPercent: number;
}

/** Days on which nobody works. */
export interface DemoClosure {
  readonly id: string;
  readonly name: string;
  readonly days: DayRange;
}

/** A craft with its key among the ids. */
export interface DemoCraft extends Craft {
  readonly id: string;
}

/** A recipe of the library. */
export interface DemoRecipe extends RecipeDraft {
  readonly id: string;
}

/** A maker with crafts, weeks and leave. */
export interface DemoMaker {
  readonly id: string;
  readonly name: string;
  readonly initials: string;
  readonly crafts: readonly { readonly craftId: string; readonly pacePermille: number }[];
  readonly patterns: readonly MakerPattern[];
  readonly leave: readonly { readonly id: string; readonly days: DayRange; readonly note: string }[];
  readonly hourCostMinor: number;
  readonly dayLimitMinutes: number | null;
  readonly weekLimitMinutes: number | null;
  readonly note: string;
}

/** A bay, or the mould of a piece. */
export interface DemoBay {
  readonly id: string;
  readonly name: string;
  readonly kind: 'booth' | 'welding' | 'hot-wire' | 'table' | 'oven' | 'mould';
  readonly capacity: number;
  readonly pieceId: string | null;
  readonly temperatureCelsius: number | null;
  readonly humidityPercent: number | null;
  readonly size: { readonly lengthMm: number; readonly widthMm: number; readonly heightMm: number | null } | null;
  readonly openings: readonly Pattern[];
  readonly note: string;
}

/** Who a production is made for. */
export interface DemoClient {
  readonly id: string;
  readonly name: string;
}

/** A production with its key dates. */
export interface DemoProduction {
  readonly id: string;
  readonly name: string;
  readonly clientId: string;
  readonly mark: string;
  readonly hue: number;
  readonly state: 'tentative' | 'committed';
  readonly note: string;
  /** When it was entered: the order in which work is laid out at first. */
  readonly createdAt: Minute;
  readonly keyDates: readonly DemoKeyDate[];
}

/** A date by which pieces have to be ready. */
export interface DemoKeyDate {
  readonly id: string;
  readonly kind: KeyDateKind;
  readonly at: Minute;
  readonly strength: 'hard' | 'wished';
  readonly weight: number;
  /** Empty for every piece of the production. */
  readonly pieceIds: readonly string[];
}

/** A piece, in its place among those of its production. */
export interface DemoPiece {
  readonly id: string;
  readonly productionId: string;
  readonly name: string;
  readonly position: number;
  readonly recipeId: string | null;
  readonly note: string;
}

/** A stage of a piece, and what has happened to it. */
export interface DemoStage extends StageDraft {
  readonly id: string;
  readonly pieceId: string;
  readonly position: number;
  readonly nth: number | null;
  readonly of: number | null;
  readonly state: StageState;
  readonly startedAt: Minute | null;
  readonly finishedAt: Minute | null;
  readonly spentMinutes: number;
  readonly remainingMinutes: number | null;
  /** Who has worked on it; empty for a stage to do. */
  readonly makerIds: readonly string[];
  /** The bay taken for each place; empty for a stage to do. */
  readonly bayIds: readonly string[];
  /** For a sign-off that is over. */
  readonly decision: 'approved' | null;
}

/** One stage after another. */
export interface DemoLink extends LinkDraft {
  readonly fromStageId: string;
  readonly toStageId: string;
}

/** A bought-in part and the stage that needs it. */
export interface DemoPurchase {
  readonly id: string;
  readonly productionId: string;
  readonly stageId: string;
  readonly name: string;
  readonly supplier: string;
  readonly leadDays: number;
  readonly orderedOn: CalendarDay | null;
  readonly dueOn: CalendarDay | null;
  readonly receivedOn: CalendarDay | null;
  readonly costMinor: number;
}

/** A person who may sign in. */
export interface DemoAccount {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: 'owner' | 'manager' | 'maker' | 'client';
  readonly makerId: string | null;
  readonly clientId: string | null;
}
