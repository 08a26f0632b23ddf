import type { LevelOptions } from '@common/planning/improve/level-options';

/** What a run may spend on one instance: a number of schedules, or seconds by the clock. */
export type Budget =
  { readonly kind: 'schedules'; readonly schedules: number } | { readonly kind: 'seconds'; readonly seconds: number };

/** A clock that began when it was made. */
export interface Stopwatch {
  readonly seconds: () => number;
}

/** Starts a stopwatch. */
export function startStopwatch(): Stopwatch {
  const start = performance.now();
  return { seconds: () => (performance.now() - start) / 1000 };
}

/** A watch of the processor time that this process uses, which other programs on the machine do not lengthen. */
export function startProcessorWatch(): Stopwatch {
  const start = process.cpuUsage();
  return {
    seconds: () => {
      const { user, system } = process.cpuUsage(start);
      return (user + system) / 1_000_000;
    },
  };
}

/** The engine's options for a budget; the clock stays here, outside the engine. */
export function levelOptions(budget: Budget, seed: number, watch: Stopwatch): LevelOptions {
  if (budget.kind === 'schedules') return { seed, maxSchedules: budget.schedules, shouldStop: () => false };
  return {
    seed,
    maxSchedules: Number.MAX_SAFE_INTEGER,
    shouldStop: () => watch.seconds() >= budget.seconds,
  };
}
