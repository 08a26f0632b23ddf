import type { CalendarDay, Minute, Span } from '../../time/span';
import type { Dwell, AdvanceProfile } from './dwell';
import type { Link } from './link';
import type { Plan } from './plan';

/**
 * Everything a plan must answer, with the world already turned into integers: no clock, no zone, no recurrence rule.
 * One model serves a studio and a benchmark instance; there a bay is a renewable resource and a stage a timed activity.
 * Immutable once validated. Ids are opaque; the order in which they are listed must not change the outcome's quality.
 */
export interface Problem {
  /** Nothing is placed before `start`; what does not fit before `end` is unmet. */
  readonly horizon: Span;
  readonly makers: readonly Maker[];
  readonly bays: readonly Bay[];
  readonly stages: readonly Stage[];
  readonly links: readonly Link[];
  readonly keyDates: readonly KeyDate[];
  /** How fast dwells advance over time in a bay or in the room; referred to by `Dwell.advance`. */
  readonly advances: readonly AdvanceProfile[];
  /** The studio's calendar days inside the horizon, in order, each with its span in instants: what "daily" means. */
  readonly days: readonly StudioDay[];
  /** When the studio is at work, whoever is on shift: the measure of working-time gaps. Sorted, disjoint. */
  readonly workingTime: readonly Span[];
  /**
   * Stages issued to begin before this instant (and not before the horizon) stay as issued, unless they have a pin of their own or
   * a fixed start. Equal to `horizon.start` for none.
   */
  readonly freezeUntil: Minute;
  /** The plan people work to now, for the freeze and for counting changes; null before the first issue. */
  readonly issued: Plan | null;
  readonly weights: Weights;
}

/** One calendar day of the studio as a span of instants (23, 24 or 25 hours long). */
export interface StudioDay extends Span {
  readonly day: CalendarDay;
}

/** A maker as the engine sees one. */
export interface Maker {
  readonly id: string;
  readonly crafts: readonly MakerCraft[];
  /** Ordinary working time: sorted, disjoint, already free of leave and closures. A gap of any length ends a shift. */
  readonly shifts: readonly Span[];
  /** Further time the maker allows at the overtime price; sorted, disjoint from `shifts`. */
  readonly overtime: readonly Span[];
  /** Cost of one ordinary hour, in integer minor units of the studio's currency. */
  readonly hourCostMinor: number;
  /** Cost of one overtime hour, in integer minor units. */
  readonly overtimeHourCostMinor: number;
  /** Limits that overtime must keep as well, or null where nothing can break them. Ordinary `shifts` must keep them by themselves. */
  readonly limits: WorkingTimeLimits | null;
  /** True for a freelancer, whose ordinary hours cost money only when used; absent or false for staff, paid anyway. */
  readonly paidByTheHour?: boolean;
}

/** A craft that a maker holds. Pace 1000 is usual; 800 takes a quarter longer. */
export interface MakerCraft {
  readonly craftId: string;
  readonly pacePermille: number;
}

/** Cautions to settings that the engine keeps; local law decides. Days are studio days, weeks run from Monday. */
export interface WorkingTimeLimits {
  /** Most minutes of work on one studio day. */
  readonly dayMinutes: number;
  /** Most minutes of work in one calendar week. */
  readonly weekMinutes: number;
  /** Least minutes between the last work begun on one day and the first work of a later day. */
  readonly restBetweenMinutes: number;
}

/** A place, machine or mould that work occupies; a renewable resource in benchmark terms. */
export interface Bay {
  readonly id: string;
  readonly capacity: number;
  /** When work may be done in it, sorted and disjoint; null for always. Dwells hold it through closed hours as well. */
  readonly open: readonly Span[] | null;
}

/** One step of making a piece. */
export interface Stage {
  readonly id: string;
  readonly pieceId: string;
  readonly productionId: string;
  readonly effort: Effort;
  /** Crafts asked for at once; empty where nobody's hands are needed. All the crew work the same hours. */
  readonly crew: readonly CrewNeed[];
  /** Share of output lost for each maker after the first, in permille of one maker; 0 for none. */
  readonly crewLossPermille: number;
  readonly continuity: Continuity;
  readonly places: readonly PlaceNeed[];
  readonly dwell: Dwell | null;
  /** Not before this instant (a purchase due, a release, a visit). */
  readonly earliestStart: Minute;
  /** The work must have ended by this instant; null for none. */
  readonly latestEnd: Minute | null;
  /** Fixed start of a visit, in both diaries; null for none. */
  readonly fixedStart: Minute | null;
  readonly pin: Pin | null;
  readonly progress: StageProgress;
}

/**
 * How much work: `person-minutes` are shared out over the crew at its pace (duration = minutes · 1000 ÷ output permille,
 * rounded up to a whole minute); `duration` takes that long whoever does it.
 * The output of a crew is the sum of its paces less `crewLossPermille` for each maker after the first.
 */
export type Effort =
  | { readonly kind: 'person-minutes'; readonly minutes: number }
  | { readonly kind: 'duration'; readonly minutes: number };

/** How many makers with a craft a stage wants at once; `most` equal to `least` for a set number. */
export interface CrewNeed {
  readonly craftId: string;
  readonly least: number;
  readonly most: number;
}

/**
 * `session`: one unbroken stretch inside one shift of every crew member. `shifts`: stops only where a shift of the crew
 * stops and goes on at the next with the same crew. `free`: may also be split to make way. `clock`: runs on, day and night
 * (no crew: a machine, a courier, a client's answer, or a benchmark activity).
 */
export type Continuity = 'session' | 'shifts' | 'free' | 'clock';

/** Where a stage works: one of `bayIds`, taking `units` of its capacity, for as long as `hold` says. */
export interface PlaceNeed {
  readonly bayIds: readonly string[];
  readonly units: number;
  readonly hold: Hold;
}

/**
 * `work`: from first start to last end of the hands-on work, nights between included. `dwell`: until its own dwell ends.
 * `until-stage`: until the named later stage (the demould) has ended its work; that stage, and those between, work on what is
 * held and do not ask for the same bay again.
 */
export type Hold =
  { readonly kind: 'work' } | { readonly kind: 'dwell' } | { readonly kind: 'until-stage'; readonly stageId: string };

/** A stage held where the manager put it. Absent makers or bays are for the engine to choose. */
export interface Pin {
  readonly start: Minute | null;
  readonly makerIds: readonly string[] | null;
  readonly bayIds: readonly string[] | null;
}

/**
 * What has happened to a stage already. Started work keeps its crew; `remainingMinutes` in the unit of its effort is laid out
 * from the horizon's start. In a plan a started stage's work begins with an empty span at `start`, which stands for what is
 * done; what follows is what remains. A finished stage's work is the one span from `start` to `end`.
 */
export type StageProgress =
  | { readonly kind: 'to-do' }
  | {
      readonly kind: 'started';
      readonly start: Minute;
      readonly makerIds: readonly string[];
      readonly bayIds: readonly string[];
      readonly remainingMinutes: number;
    }
  | {
      readonly kind: 'finished';
      readonly start: Minute;
      readonly end: Minute;
      readonly makerIds: readonly string[];
      readonly bayIds: readonly string[];
    };

/** A date of a production that its named stages (work and dwell) must be ready by. */
export interface KeyDate {
  readonly id: string;
  readonly productionId: string;
  readonly at: Minute;
  readonly strength: 'hard' | 'wished';
  /** Weight of one minute of lateness; positive integer. */
  readonly weight: number;
  readonly stageIds: readonly string[];
}

/** The studio's order of wishes beneath the dates; see `Objective`. Each is a non-negative integer. */
export interface Weights {
  /** What one change against the issued plan is worth, in minor units: plans are compared by cost and this together. */
  readonly changePenaltyMinor: number;
  /** 0 where evenness of load does not matter; else it counts. */
  readonly unevenness: number;
  /** 0 where early finishes do not matter; else they count. */
  readonly earliness: number;
}
