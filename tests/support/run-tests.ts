import { openThrowAwayCluster } from '@database/cluster/cluster';
import { buildApplication } from '../../server/launch/build-application';
import { endErrands } from '../../server/launch/child';
import { CHROMIUM, ensureSystemPackages, POSTGRESQL } from '../../server/launch/system-packages';
import { askedToEnd, launch, say } from '../../server/launch/terminal';
import { checkOnce, type Outcome } from './check';
import { runJestProject } from './jest-project';
import { checkFormat, COMPILATIONS, lint, typeCheck } from './static-checks';
import { TEST_CLUSTER_URL } from './test-cluster';

/** `npm test`: every check there is, cheap ones first, in one run that cleans up after itself. */
launch(async () => {
  const end = askedToEnd();
  await ensureSystemPackages([POSTGRESQL, CHROMIUM]);
  const cluster = await openThrowAwayCluster();
  let outcomes: readonly Outcome[] | undefined;
  try {
    const env = { [TEST_CLUSTER_URL]: cluster.url };
    const outcome = await Promise.race([runAll(env), end]);
    if (typeof outcome === 'string') endErrands();
    else outcomes = outcome;
  } finally {
    await cluster.stop();
  }
  process.exit(outcomes === undefined ? 130 : report(outcomes));
});

async function runAll(env: Readonly<Record<string, string>>): Promise<readonly Outcome[]> {
  const [compiled, formatted, linted] = await Promise.all([
    inTurn(COMPILATIONS.map((config) => () => checkOnce(`types: ${config}`, () => typeCheck(config)))),
    checkOnce('format', checkFormat),
    checkOnce('lint', lint),
  ]);
  const tested = await inTurn([
    () => runJestProject('node', env),
    () => runJestProject('client', env),
    () => runJestProject('api', env),
    () => checkOnce('build', buildOrSay),
    () => runJestProject('browser', env),
  ]);
  return [...compiled, formatted, linted, ...tested];
}

async function inTurn(parts: readonly (() => Promise<Outcome>)[]): Promise<readonly Outcome[]> {
  const outcomes: Outcome[] = [];
  for (const part of parts) outcomes.push(await part());
  return outcomes;
}

async function buildOrSay(): Promise<{ code: number; timedOut: boolean }> {
  try {
    await buildApplication();
    return { code: 0, timedOut: false };
  } catch (error) {
    say(error instanceof Error ? error.message : String(error));
    return { code: 1, timedOut: false };
  }
}

/** Prints the totals, the last line in a form that programs read, and answers with the exit code. */
function report(outcomes: readonly Outcome[]): number {
  const total = (count: 'passed' | 'failed' | 'skipped'): number =>
    outcomes.reduce((sum, outcome) => sum + outcome[count], 0);
  const lines = outcomes.map(({ name, passed, failed, skipped, seconds }) =>
    [
      `${failed > 0 ? 'FAILED' : 'ok'}`.padEnd(7),
      name.padEnd(34),
      `${String(passed)} passed, ${String(failed)} failed`,
      skipped > 0 ? `, ${String(skipped)} not run` : '',
      ` (${String(seconds)} s)`,
    ].join(''),
  );
  if (total('skipped') > 0) lines.push(`${String(total('skipped'))} tests did not run; their own messages say why.`);
  console.log(['', ...lines, `${String(total('passed'))} passed, ${String(total('failed'))} failed`].join('\n'));
  return total('failed') > 0 ? 1 : 0;
}
