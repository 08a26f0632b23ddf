import type { Problem } from '@common/planning/problem/problem';
import { randomStudio } from '../../engine/support/random-studio';

/** An invented studio to measure on. */
export interface BenchStudio {
  readonly name: string;
  readonly problem: Problem;
}

const sizes: Readonly<
  Record<string, { productions: number; piecesPerProduction: number; makers: number; weeks: number }>
> = {
  '200': { productions: 4, piecesPerProduction: 4, makers: 9, weeks: 20 },
  '1500': { productions: 16, piecesPerProduction: 7, makers: 25, weeks: 52 },
};

/** The names of all studios. */
export const studioNames: readonly string[] = Object.keys(sizes);

/** A studio of about as many stages as its name says, the same for the same seed; null for a name that is none. */
export function benchStudio(name: string, seed: number): BenchStudio | null {
  const size = sizes[name];
  if (size === undefined) return null;
  return { name, problem: randomStudio({ ...size, seed, tricky: false }) };
}
