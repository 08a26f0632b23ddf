import { budgetOption, readArguments, UsageFault, wholeOption, type Arguments } from './arguments';
import type { Budget } from './budget';
import type { InstanceData } from './instances/instance-data';
import type { CrewPair } from './instances/instance-plan';
import { InstanceFault } from './instances/line-reader';
import { readInstance } from './instances/read-instance';
import { runInstance } from './run-instance';

const usage = 'Usage: npm run --silent solve -- FILE... [--schedules N | --seconds S] [--seed K]';

/** What is printed for one file: activities, resources and skills as the file numbers them. */
interface SolvedLine {
  readonly file: string;
  /** Null where no plan was found. */
  readonly makespan: number | null;
  readonly lowerBound: number | null;
  /** By activity in the file's order, source and sink included. */
  readonly starts: readonly number[] | null;
  /** Multi-skill only: for each activity its [resource, skill] pairs. */
  readonly crews?: readonly (readonly CrewPair[])[];
  /** Present and true where it is proved that there is no plan. */
  readonly infeasible?: true;
  readonly schedules: number;
  readonly seconds: number;
  readonly seed: number;
}

function main(line: readonly string[]): number {
  let given: Arguments;
  let budget: Budget;
  let seed: number;
  try {
    given = readArguments(line, ['schedules', 'seconds', 'seed']);
    budget = budgetOption(given, { kind: 'seconds', seconds: 5 });
    seed = wholeOption(given, 'seed', 1, 0);
    if (given.words.length === 0) throw new UsageFault('Name at least one instance file.');
  } catch (fault) {
    if (!(fault instanceof UsageFault)) throw fault;
    console.error(`${fault.message}\n${usage}`);
    return 2;
  }
  let failures = 0;
  for (const file of given.words) if (!solveFile(file, budget, seed)) failures++;
  return failures === 0 ? 0 : 1;
}

function solveFile(file: string, budget: Budget, seed: number): boolean {
  let data: InstanceData;
  try {
    data = readInstance(file);
  } catch (fault) {
    if (!(fault instanceof InstanceFault)) throw fault;
    console.error(fault.message);
    return false;
  }
  const outcome = runInstance(data, budget, seed);
  if (outcome.faults.length > 0) {
    for (const fault of outcome.faults) console.error(`${file}: ${fault}`);
    console.error(`${file}: the plan found is not valid, so it is not printed.`);
    return false;
  }
  const { plan } = outcome;
  const solved: SolvedLine = {
    file,
    makespan: plan?.makespan ?? null,
    lowerBound: outcome.isInfeasible ? null : outcome.lowerBound,
    starts: plan?.starts ?? null,
    ...(plan?.crews ? { crews: plan.crews } : {}),
    ...(outcome.isInfeasible ? { infeasible: true as const } : {}),
    schedules: outcome.schedules,
    seconds: Math.round(outcome.seconds * 1000) / 1000,
    seed,
  };
  process.stdout.write(`${JSON.stringify(solved)}\n`);
  if (plan === null && !outcome.isInfeasible) console.error(`${file}: no plan was found within the budget.`);
  return plan !== null || outcome.isInfeasible;
}

process.exitCode = main(process.argv.slice(2));
