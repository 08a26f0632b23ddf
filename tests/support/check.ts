import { type ErrandEnd } from '../../server/launch/child';

/** What one part of the test run came to. */
export interface Outcome {
  readonly name: string;
  readonly passed: number;
  readonly failed: number;
  /** Tests that did not run and said so, for want of data from outside the project. */
  readonly skipped: number;
  readonly seconds: number;
}

/** A part that either holds or does not: linting, one compilation. Counts as one. */
export async function checkOnce(name: string, run: () => Promise<ErrandEnd>): Promise<Outcome> {
  const since = Date.now();
  const { code } = await run();
  return { name, passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, skipped: 0, seconds: secondsSince(since) };
}

/** Whole seconds from an instant (milliseconds since the epoch) to now. */
export function secondsSince(since: number): number {
  return Math.round((Date.now() - since) / 1000);
}
