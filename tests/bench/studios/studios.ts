import type { Problem } from '@common/planning/problem/problem';
import { demoProblem } from '@database/demo/demo-problem';
import { randomStudio } from '../../engine/support/random-studio';

/** A studio to measure on. */
export interface BenchStudio {
  readonly name: string;
  readonly problem: Problem;
}

/** The day on which the demo studio is measured, so that figures of different days can be compared. */
const DEMO_DAY = '2026-03-02';

const studios: Readonly<Record<string, (seed: number) => Problem>> = {
  demo: () => demoProblem(DEMO_DAY),
  '200': (seed) => randomStudio({ productions: 4, piecesPerProduction: 4, makers: 9, weeks: 20, seed, tricky: false }),
  '1500': (seed) =>
    randomStudio({ productions: 16, piecesPerProduction: 7, makers: 25, weeks: 52, seed, tricky: false }),
};

/** The names of all studios: the demo, and invented ones of about so many stages. */
export const studioNames: readonly string[] = Object.keys(studios);

/** A studio by name, the same for the same seed; null for a name that is none. */
export function benchStudio(name: string, seed: number): BenchStudio | null {
  const make = studios[name];
  return make === undefined ? null : { name, problem: make(seed) };
}
