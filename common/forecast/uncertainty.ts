import type { ThreePoint } from './three-point';

/**
 * What is not known about a problem's times. Stages that are not named are taken as they stand. Everything that several stages
 * share (the studio's habit of running over, a warm or cold week) is a factor of its own, drawn once a draw.
 */
export interface Uncertainty {
  readonly stages: readonly StageUncertainty[];
  /** How the studio's work runs against its estimates. */
  readonly overrun: Overrun;
  /** How curing runs against the climate that was planned with; above 0 is slower. */
  readonly curing: LogFactor;
  /** Chance that a maker is away on a day that they should be there, from 0 to 1. */
  readonly absence: readonly { readonly makerId: string; readonly perDay: number }[];
}

/** What is not known about one stage. */
export interface StageUncertainty {
  readonly stageId: string;
  /** The whole effort in minutes; its likeliest value is what was planned. */
  readonly effortMinutes: ThreePoint;
  /** The dwell in minutes at its reference; null for none. */
  readonly dwellMinutes: ThreePoint | null;
  /** Minutes by which what the stage waits for from outside (a delivery, an answer) may come late. */
  readonly delayMinutes: ThreePoint;
}

/** A factor whose logarithm is normal: `exp(N(meanLog, sdLog²))`. Nought and nought is exactly 1. */
export interface LogFactor {
  readonly meanLog: number;
  readonly sdLog: number;
}

/** How work runs against its estimates: the factor that all of it shares, and by how much single stages scatter more than they say. */
export interface Overrun extends LogFactor {
  /**
   * What a stage's own three points lack of its true spread, as a standard deviation of the logarithm, 0 or more; absent for none.
   * Whoever writes down low and high seldom means the very least and the very most.
   */
  readonly stretchSdLog?: number;
}

/** A factor of exactly 1. */
export const NO_FACTOR: LogFactor = { meanLog: 0, sdLog: 0 };
