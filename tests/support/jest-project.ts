import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { runErrand } from '../../server/launch/child';
import { DATA_FOLDER } from '../../server/launch/places';
import { secondsSince, type Outcome } from './check';

/** The projects of jest.config.cjs. */
export type JestProject = 'node' | 'client' | 'api' | 'browser';

/** The part of Jest's report that is counted. */
export interface JestReport {
  readonly numPassedTests: number;
  readonly numFailedTests: number;
  readonly numPendingTests: number;
  readonly numTodoTests: number;
  /** Files that broke before their first test could run. */
  readonly numRuntimeErrorTestSuites: number;
}

const LIMIT_MS = 11 * 60_000;

/** Runs one project's tests and counts them. */
export async function runJestProject(name: JestProject, env: Readonly<Record<string, string>>): Promise<Outcome> {
  const since = Date.now();
  const file = join(DATA_FOLDER, 'test-results', `${name}.json`);
  mkdirSync(dirname(file), { recursive: true });
  rmSync(file, { force: true });
  const parallel = name === 'browser' ? ['--runInBand'] : ['--maxWorkers=2'];
  const { code } = await runErrand({
    program: process.execPath,
    args: ['node_modules/jest/bin/jest.js', '--selectProjects', name, '--json', '--outputFile', file, ...parallel],
    env,
    limitMs: LIMIT_MS,
  });
  const report = existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as JestReport) : undefined;
  return { name: `tests: ${name}`, ...countReport(report, code), seconds: secondsSince(since) };
}

/**
 * Counts a report. A file that broke counts as a failed test, and so does a run that ended badly without saying in
 * which test, or without a report at all.
 */
export function countReport(
  report: JestReport | undefined,
  code: number,
): Pick<Outcome, 'passed' | 'failed' | 'skipped'> {
  if (report === undefined) return { passed: 0, failed: 1, skipped: 0 };
  const failed = report.numFailedTests + report.numRuntimeErrorTestSuites;
  return {
    passed: report.numPassedTests,
    failed: code !== 0 && failed === 0 ? 1 : failed,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}
