import type { MeasureKind } from '../domain/measure-kind';
import type { CalendarDay, Minute } from '../time/span';

/**
 * A change that may save a key date, as far as the plan is concerned. Ids are those of the studio; a freelancer has one of its own,
 * for nobody has entered them yet.
 */
export type Measure =
  /** A maker stays on after every ordinary shift, from a day until another (outside). */
  | {
      readonly kind: 'overtime';
      readonly makerId: string;
      readonly from: CalendarDay;
      readonly until: CalendarDay;
      readonly minutesADay: number;
    }
  /** A maker works one more day, on which they would not. */
  | {
      readonly kind: 'weekend-shift';
      readonly makerId: string;
      readonly day: CalendarDay;
      readonly startMinuteOfDay: number;
      readonly minutes: number;
    }
  /** Somebody from outside with one craft, on weekdays from a day on. */
  | {
      readonly kind: 'freelancer';
      readonly makerId: string;
      readonly craftId: string;
      readonly from: CalendarDay;
      readonly days: number;
    }
  /** A bay is kept at a temperature, day and night, from an instant until another (outside); colder times only. */
  | {
      readonly kind: 'heat';
      readonly bayId: string;
      readonly celsius: number;
      readonly from: Minute;
      readonly until: Minute;
    }
  /** One more mould of the same. */
  | { readonly kind: 'second-mould'; readonly bayId: string }
  /** Another material of the same family for a stage's dwell; `minutes` as that material states them. */
  | {
      readonly kind: 'faster-material';
      readonly stageId: string;
      readonly materialId: string;
      readonly milestone: string;
      readonly minutes: number;
    }
  /** A client's answer within so many minutes instead of the usual time. */
  | { readonly kind: 'earlier-sign-off'; readonly stageId: string; readonly replyMinutes: number }
  /** Only these pieces are delivered for the date, the others follow. */
  | { readonly kind: 'part-delivery'; readonly keyDateId: string; readonly pieceIds: readonly string[] }
  /** The date itself moves. */
  | { readonly kind: 'later-date'; readonly keyDateId: string; readonly at: Minute };

/** What the studio allows to be proposed, how much of it, and at which prices in minor units. */
export interface RescueTerms {
  readonly allowed: readonly MeasureKind[];
  /** Minutes of overtime after a shift, and how many days of it at most. */
  readonly eveningMinutes: number;
  readonly eveningDays: number;
  readonly weekendMinutes: number;
  readonly freelancerDayMinor: number;
  readonly freelancerDays: number;
  readonly heatCelsius: number;
  readonly heatHourMinor: number;
  readonly mouldMinor: number;
  /** What another material costs more, a stage. */
  readonly materialMinor: number;
  /** What a journey or a courier to hurry a decision costs. */
  readonly signOffMinor: number;
  readonly partDeliveryMinor: number;
  /** What a day's delay costs the studio, in money or goodwill. */
  readonly laterDayMinor: number;
  readonly laterDays: number;
  /** A date whose chance of being missed is no more than this, per mille, is saved. */
  readonly goalPermille: number;
}
