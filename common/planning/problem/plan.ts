import type { Minute, Span } from '../../time/span';

/** Where and when every placed stage stands. Placements are in no particular order; a stage appears at most once. */
export interface Plan {
  readonly placements: readonly Placement[];
}

/** One stage laid out. */
export interface Placement {
  readonly stageId: string;
  /** Hands-on time, sorted and disjoint; one span for a session; a zero-length span where the stage takes no time. */
  readonly work: readonly Span[];
  readonly crew: readonly CrewMember[];
  /** The chosen bay for each of the stage's places, in their order. */
  readonly bayIds: readonly string[];
  /** When the dwell is over; equal to the end of work where there is none. */
  readonly dwellEnd: Minute;
}

/** A maker in a crew and the craft they are there for. */
export interface CrewMember {
  readonly makerId: string;
  readonly craftId: string;
}
