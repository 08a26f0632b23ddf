import { existsSync } from 'node:fs';
import { budgetOption, readArguments, UsageFault, wholeOption, type Arguments } from './arguments';
import { sharedInstances } from './shared-data';
import { suites } from './suites/suites';
import type { SuiteOptions } from './suites/suite';

const optionNames = ['data', 'set', 'schedules', 'seconds', 'seed', 'limit'];

async function main(line: readonly string[]): Promise<number> {
  try {
    const given = readArguments(line, optionNames);
    const [name, ...more] = given.words;
    const suite = suites.get(name ?? '');
    if (suite === undefined || more.length > 0) throw new UsageFault(`Name one suite.\n${listOfSuites()}`);
    const figures = await suite.run(suiteOptions(given));
    process.stdout.write(`${JSON.stringify({ suite: name, ...figures })}\n`);
    return figures['faults'] ? 1 : 0;
  } catch (fault) {
    if (!(fault instanceof UsageFault)) throw fault;
    console.error(fault.message);
    return 2;
  }
}

function suiteOptions(given: Arguments): SuiteOptions {
  const asked = given.options.get('data');
  if (asked !== undefined && !existsSync(asked)) throw new UsageFault(`The folder ${asked} does not exist.`);
  const hasBudget = given.options.has('seconds') || given.options.has('schedules');
  return {
    dataDirectory: asked ?? sharedInstances(),
    set: given.options.get('set') ?? null,
    budget: hasBudget ? budgetOption(given, { kind: 'seconds', seconds: 1 }) : null,
    seed: wholeOption(given, 'seed', 1, 0),
    limit: wholeOption(given, 'limit', Number.MAX_SAFE_INTEGER, 1),
    say: (text) => console.error(text),
  };
}

function listOfSuites(): string {
  const lines = [...suites].map(([name, { about }]) => `  ${name.padEnd(12)} ${about}`);
  return (
    ['Usage: npm run bench -- SUITE', ...optionNames.map((name) => `[--${name} …]`)].join(' ') + `\n${lines.join('\n')}`
  );
}

void main(process.argv.slice(2)).then((code) => {
  process.exitCode = code;
});
