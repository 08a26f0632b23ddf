import type { Budget } from '../budget';

/** What every suite is told. */
export interface SuiteOptions {
  /** Folder with the instance sets; null where there is none on this machine. */
  readonly dataDirectory: string | null;
  /** Which set of the suite; null for its usual one. */
  readonly set: string | null;
  readonly budget: Budget | null;
  readonly seed: number;
  /** How many instances (or repetitions) at most. */
  readonly limit: number;
  /** Says something on the way; never on standard output. */
  readonly say: (line: string) => void;
}

/** The figures of a run: plain numbers and words, printed as one JSON object. */
export type SuiteFigures = Readonly<Record<string, number | string | null>>;

/** A benchmark by name. */
export interface Suite {
  readonly about: string;
  readonly run: (options: SuiteOptions) => SuiteFigures | Promise<SuiteFigures>;
}

/** Mean of numbers; null of none. */
export function mean(values: readonly number[]): number | null {
  return values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** A figure with as many decimals as it deserves; null stays null. */
export function rounded(value: number | null, decimals = 3): number | null {
  return value === null ? null : Math.round(value * 10 ** decimals) / 10 ** decimals;
}

/** The value below which a share of the values lie (nearest rank); null of none. */
export function percentile(values: readonly number[], share: number): number | null {
  if (values.length === 0) return null;
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.max(0, Math.ceil(share * sorted.length) - 1))];
}
