import { TimedSolver } from './solve-timed';
import type { TimedModel } from './timed-model';

/** A schedule of a timed model: starts by position, and when the last stage ends. */
export interface TimedSchedule {
  readonly starts: Int32Array;
  readonly makespan: number;
}

/** A search that finds good schedules fast and proves nothing. */
export interface QuickSearch {
  /** Spends up to so many schedules in its `turn`-th turn; the best it found, and how many it took. */
  readonly spend: (schedules: number, turn: number) => { readonly best: TimedSchedule; readonly spent: number };
}

/** What an alternating search may spend, and whom it tells. */
export interface AlternateOptions {
  readonly maxSchedules: number;
  readonly shouldStop: () => boolean;
  /** Nothing is shorter; 0 where no such length is known. */
  readonly lowerBound: number;
  readonly onBetter: (best: TimedSchedule, lowerBound: number, schedules: number) => void;
}

/** What came of it. */
export interface AlternateResult {
  readonly best: TimedSchedule;
  readonly lowerBound: number;
  readonly schedules: number;
}

/** Schedules of the first turns, and by what factor the next ones are longer. */
interface Turns {
  readonly quick: number;
  readonly exact: number;
  readonly quickGrowth: number;
  readonly exactGrowth: number;
}

/**
 * The fewer the stages, the more exact search is worth; with many it only proves what is proved soon. A small budget is shared
 * out, so that both get a turn (shares found by trying on PSPLIB's sets).
 */
function turnsFor(stages: number, maxSchedules: number): Turns {
  const share = (permille: number): number => Math.max(1, Math.floor((maxSchedules * permille) / 1000));
  if (stages <= 40) return { quick: 250, exact: 5000, quickGrowth: 2, exactGrowth: 2 };
  if (stages <= 100) return { quick: Math.min(3000, share(600)), exact: 2000, quickGrowth: 2, exactGrowth: 2 };
  return { quick: Math.min(10_000, share(800)), exact: 1000, quickGrowth: 8, exactGrowth: 1 };
}

/**
 * Quick search and exact search in turns of growing length on one timed problem, each beginning from the other's best: the
 * first finds what is nearly best, the second betters it in ways that the first does not see, and proves when nothing is left.
 * A conflict counts as a schedule.
 */
export function alternate(model: TimedModel, quick: QuickSearch, options: AlternateOptions): AlternateResult {
  const turns = turnsFor(model.durations.length, options.maxSchedules);
  let quickTurn = turns.quick;
  let exactTurn = turns.exact;
  let best: TimedSchedule | null = null;
  let { lowerBound } = options;
  let schedules = 0;
  let solver: TimedSolver | null = null;
  const keep = (found: TimedSchedule): void => {
    if (best !== null && found.makespan >= best.makespan) return;
    best = found;
    options.onBetter(found, lowerBound, schedules);
  };
  for (let turn = 0; ; turn++) {
    const { best: found, spent } = quick.spend(Math.min(quickTurn, options.maxSchedules - schedules), turn);
    schedules += spent;
    keep(found);
    const known: TimedSchedule = best ?? found;
    const isOver = (): boolean => schedules >= options.maxSchedules || options.shouldStop();
    if (known.makespan <= lowerBound || isOver()) return { best: known, lowerBound, schedules };
    solver ??= new TimedSolver(model, ({ starts, makespan }) => keep({ starts: Int32Array.from(starts), makespan }));
    solver.askBetterThan(known.starts, known.makespan);
    const before = solver.conflicts;
    const maxConflicts = before + Math.min(exactTurn, options.maxSchedules - schedules);
    const end = solver.run({ maxConflicts, shouldStop: options.shouldStop });
    schedules += solver.conflicts - before;
    const shortest: TimedSchedule = best ?? known;
    lowerBound = end === 'budget' ? Math.max(lowerBound, solver.lowerBound) : shortest.makespan;
    if (shortest.makespan <= lowerBound || isOver()) return { best: shortest, lowerBound, schedules };
    quickTurn *= turns.quickGrowth;
    exactTurn *= turns.exactGrowth;
  }
}
