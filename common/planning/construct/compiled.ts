import type { Problem, Stage } from '../problem/problem';
import type { Calendar } from './calendar';
import type { CuringCurve } from './curing-curve';
import type { WorkingClock } from './working-clock';

/**
 * A problem as numbers. Stages, makers, bays and crafts are indices in the order of their ids, so that the order in which a
 * problem lists them cannot matter; instants are minutes from the horizon's start; NEVER stands for none.
 */
export interface Compiled {
  readonly problem: Problem;
  readonly origin: number;
  readonly horizonMinutes: number;
  readonly stageCount: number;
  readonly stages: readonly Stage[];
  readonly stageIndex: ReadonlyMap<string, number>;
  readonly makerIds: readonly string[];
  readonly bayIds: readonly string[];
  readonly craftIds: readonly string[];
  readonly work: CompiledWork;
  readonly links: CompiledLinks;
  readonly makers: CompiledMakers;
  readonly bays: CompiledBays;
  readonly dates: CompiledDates;
  /** The studio's working clock for working-time gaps. */
  readonly workingClock: WorkingClock;
}

/** How a stage is tied to its place in time before any search. */
export const MOVABLE = 0;
export const FIXED_START = 1;
export const FROZEN = 2;
export const STARTED = 3;
export const FINISHED = 4;

export const SESSION = 0;
export const SHIFTS = 1;
export const FREE = 2;
export const CLOCK = 3;

export const HOLD_WORK = 0;
export const HOLD_DWELL = 1;
export const HOLD_UNTIL = 2;

export const NO_WINDOW = 0;
export const SOFT_WINDOW = 1;
export const HARD_WINDOW = 2;

/** What each stage asks for. `xOf[i]..xOf[i + 1]` is where stage `i`'s entries of a list lie. */
export interface CompiledWork {
  /** Minutes of effort still to do. */
  readonly minutes: Int32Array;
  /** 1 where the minutes are a duration whoever works, 0 where they are shared out. */
  readonly isDuration: Uint8Array;
  readonly continuity: Uint8Array;
  readonly fixity: Uint8Array;
  /** Where `fixity` is not MOVABLE: the start that is given. */
  readonly fixedStart: Int32Array;
  readonly earliest: Int32Array;
  readonly latest: Int32Array;
  readonly needOf: Int32Array;
  readonly needCraft: Int32Array;
  readonly needLeast: Int32Array;
  readonly needMost: Int32Array;
  readonly crewLoss: Int32Array;
  /** Crews to choose from, for each stage; empty where nobody is needed. */
  readonly crews: readonly (readonly Crew[])[];
  /** The ordinary time of all who are in any of a stage's crews; null where nobody is needed, or where it is not known. */
  readonly anyTime: (stage: number) => Calendar | null;
  readonly placeOf: Int32Array;
  readonly placeUnits: Int32Array;
  readonly placeHold: Uint8Array;
  /** The stage that lets a place go, where its hold is HOLD_UNTIL; else -1. */
  readonly placeUntil: Int32Array;
  /** Choices of bays for all of a stage's places at once. */
  readonly housings: readonly (readonly Int32Array[])[];
  /** Thousandths of reference minutes of dwell. */
  readonly dwellAge: Float64Array;
  readonly attended: Int32Array;
  readonly windowKind: Uint8Array;
  readonly windowAge: Float64Array;
  readonly windowExtra: Int32Array;
  readonly windowCost: Float64Array;
  /** Whether a stage's dwell advances by a curve anywhere; else at the reference rate. */
  readonly curves: readonly (ReadonlyMap<number, CuringCurve> | null)[];
  /** The first place that a stage keeps through its dwell; -1 for none. */
  readonly keptPlace: Int32Array;
}

/** The key of the room in `CompiledWork.curves`, beside the indices of bays. */
export const ROOM = -1;

/** Makers who could do a stage together; one object may serve many stages. */
export interface Crew {
  /** Its place among all crews of a compiled problem; -1 for one made for a single occasion. */
  readonly index: number;
  readonly makers: Int32Array;
  readonly crafts: Int32Array;
  /** What they get done together, in permille of one usual maker; 0 or less for nothing. */
  readonly outputPermille: number;
  /** What choosing this crew takes from others: scarce crafts spent on work that does not need them; 0..1000. */
  readonly regretPermille: number;
}

export const FINISH_START = 0;
export const START_START = 1;
export const FINISH_FINISH = 2;
export const START_FINISH = 3;

/** Links as columns, with the ones that lead into and out of each stage. */
export interface CompiledLinks {
  readonly count: number;
  readonly from: Int32Array;
  readonly to: Int32Array;
  readonly kind: Uint8Array;
  /** 1 where the first stage's end is that of its work, 0 for that of its dwell. */
  readonly afterWork: Uint8Array;
  readonly minGap: Int32Array;
  /** NEVER for none. */
  readonly maxGap: Int32Array;
  readonly isWorking: Uint8Array;
  readonly inOf: Int32Array;
  readonly inLinks: Int32Array;
  readonly outOf: Int32Array;
  readonly outLinks: Int32Array;
}

/** Makers' calendars: `ordinary` is their shifts, `extended` the overtime they allow and their limits bear as well. */
export interface CompiledMakers {
  readonly ordinary: readonly Calendar[];
  readonly extended: readonly Calendar[];
  /** Overtime minutes usable by each maker. */
  readonly hasOvertime: Uint8Array;
  readonly hourCost: Float64Array;
  readonly overtimeCost: Float64Array;
}

export interface CompiledBays {
  readonly capacity: Int32Array;
  readonly open: readonly (Calendar | null)[];
  /** Stages whose work lets a hold go, with the stages that hold: for each stage, the holders it frees. */
  readonly frees: readonly (readonly number[])[];
}

/** Key dates as columns. */
export interface CompiledDates {
  readonly count: number;
  readonly at: Int32Array;
  readonly weight: Float64Array;
  readonly isHard: Uint8Array;
  readonly stages: readonly Int32Array[];
  /** For each stage the production it belongs to, and how many productions there are. */
  readonly productionOf: Int32Array;
  readonly productionCount: number;
}
