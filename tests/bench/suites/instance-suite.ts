import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { readBestKnown, type BestKnown } from '../instances/best-known';
import { isInstanceFile, readInstance } from '../instances/read-instance';
import { runInstance, type InstanceOutcome } from '../run-instance';
import type { Budget } from '../budget';
import { mean, rounded, type Suite, type SuiteFigures, type SuiteOptions } from './suite';

/** Where a suite's sets lie under the data folder, and what it usually runs. */
export interface InstanceSuite {
  readonly about: string;
  readonly folder: string;
  readonly usualSet: string;
  readonly usualBudget: Budget;
}

interface Run {
  readonly file: string;
  readonly known: BestKnown | undefined;
  readonly outcome: InstanceOutcome;
}

/** A suite over published instances: every plan checked, compared with critical path and best known makespan. */
export function instanceSuite(suite: InstanceSuite): Suite {
  return { about: suite.about, run: (options) => runSuite(suite, options) };
}

function runSuite(suite: InstanceSuite, options: SuiteOptions): SuiteFigures {
  const set = options.set ?? suite.usualSet;
  const directory = options.dataDirectory === null ? null : setDirectory(options.dataDirectory, suite.folder, set);
  if (directory === null) {
    options.say(`No instances of ${set} are on this machine; point --data at their folder. Nothing was run.`);
    return { set, instances: 0 };
  }
  const budget = options.budget ?? suite.usualBudget;
  const known = readBestKnown(directory);
  const files = spread(readdirSync(directory).filter(isInstanceFile).sort(naturally), options.limit);
  const runs: Run[] = [];
  for (const file of files) {
    const outcome = runInstance(readInstance(join(directory, file)), budget, options.seed);
    const run = { file, known: known.get(file), outcome };
    runs.push(run);
    options.say(`${runs.length}/${files.length} ${describe(run)}`);
  }
  return { set, seed: options.seed, ...budgetFigures(budget), ...figures(runs) };
}

function setDirectory(data: string, folder: string, set: string): string | null {
  return (
    [join(data, folder, set), join(data, set), data].find((path) => existsSync(path) && holdsInstances(path)) ?? null
  );
}

const holdsInstances = (path: string): boolean => readdirSync(path).some(isInstanceFile);

const naturally = (a: string, b: string): number => a.localeCompare(b, 'en', { numeric: true });

/** At most `limit` of the files, evenly over the set, so that a short run sees every kind of instance. */
function spread(files: readonly string[], limit: number): string[] {
  if (limit >= files.length) return [...files];
  return Array.from({ length: limit }, (_, k) => files[Math.floor((k * files.length) / limit)]);
}

function budgetFigures(budget: Budget): SuiteFigures {
  return budget.kind === 'seconds' ? { secondsEach: budget.seconds } : { schedulesEach: budget.schedules };
}

function describe({ file, known, outcome }: Run): string {
  const found = outcome.isInfeasible ? 'no plan (proved)' : String(outcome.plan?.makespan ?? 'none found');
  const best = known?.best ?? '?';
  return `${file}: ${found}, best known ${best}, bound ${outcome.lowerBound}, ${outcome.seconds.toFixed(2)} s`;
}

function figures(runs: readonly Run[]): SuiteFigures {
  const planned = runs.filter((run) => run.outcome.plan !== null);
  const feasible = runs.filter((run) => run.known?.best !== 'unsat' && !run.outcome.isInfeasible);
  const unsat = runs.filter((run) => run.known?.best === 'unsat');
  const overPath = planned.flatMap(({ outcome }) => excess(outcome.plan?.makespan, outcome.criticalPathLength));
  const overBest = planned.flatMap(({ known, outcome }) => excess(outcome.plan?.makespan, numberOf(known?.best)));
  const gaps = planned.flatMap(({ outcome }) => excess(outcome.plan?.makespan, outcome.lowerBound));
  const seconds = runs.reduce((sum, run) => sum + run.outcome.seconds, 0);
  const schedules = runs.reduce((sum, run) => sum + run.outcome.schedules, 0);
  return {
    instances: runs.length,
    planned: planned.length,
    valid: planned.filter((run) => run.outcome.faults.length === 0).length,
    faults: runs.filter((run) => run.outcome.faults.length > 0).length,
    feasible: feasible.length,
    knownInfeasible: unsat.length,
    provedInfeasible: runs.filter((run) => run.outcome.isInfeasible).length,
    wronglyInfeasible: runs.filter((run) => run.outcome.isInfeasible && numberOf(run.known?.best) !== null).length,
    percentOverCriticalPath: rounded(mean(overPath)),
    percentOverBestKnown: rounded(mean(overBest)),
    percentOverOwnBound: rounded(mean(gaps)),
    atBestKnown: planned.filter((run) => (run.outcome.plan?.makespan ?? Infinity) <= (numberOf(run.known?.best) ?? -1))
      .length,
    belowBestKnown: planned.filter(
      (run) => (run.outcome.plan?.makespan ?? Infinity) < (numberOf(run.known?.best) ?? -1),
    ).length,
    provedOptimal: planned.filter((run) => run.outcome.plan?.makespan === run.outcome.lowerBound).length,
    meanSeconds: rounded(seconds / Math.max(1, runs.length)),
    schedulesPerSecond: rounded(schedules / Math.max(1e-9, seconds), 0),
  };
}

const numberOf = (best: number | 'unsat' | null | undefined): number | null => (typeof best === 'number' ? best : null);

/** Percent of a makespan over a reference, as a list of one, or of none where either is missing or nothing. */
function excess(makespan: number | undefined, reference: number | null): number[] {
  if (makespan === undefined || reference === null || reference <= 0) return [];
  return [(100 * (makespan - reference)) / reference];
}
