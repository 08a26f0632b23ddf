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
  busy: (seed) => soonDue(randomStudio({ ...BUSY, weeks: 40, seed, tricky: false })),
};

/** About 1,500 stages; one long table and two spray booths are not enough for all that is asked of them. */
const BUSY = { productions: 25, piecesPerProduction: 5, makers: 40 } as const;
const DAY = 1440;
/** The first date of the busy studio, and from one to the next, in days. */
const [FIRST_DUE, DUE_EVERY] = [12, 2];

/** A studio with more promised than it can keep: its dates follow one another by days, in the order of their ids. */
function soonDue(problem: Problem): Problem {
  const keyDates = problem.keyDates.map((date, k) => ({
    ...date,
    strength: 'wished' as const,
    at: problem.horizon.start + (FIRST_DUE + k * DUE_EVERY) * DAY + 1020,
  }));
  return { ...problem, keyDates };
}

/** The names of all studios: the demo, and invented ones of about so many stages. */
export const studioNames: readonly string[] = Object.keys(studios);

/** A studio by name, the same for the same seed; null for a name that is none. */
export function benchStudio(name: string, seed: number): BenchStudio | null {
  const make = studios[name];
  return make === undefined ? null : { name, problem: make(seed) };
}
