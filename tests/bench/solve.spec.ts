import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

const root = resolve(__dirname, '../..');
let folder = '';

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'instances-'));
});
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

/** Writes a file made up for these tests and gives its path. */
function fileOf(name: string, lines: readonly string[]): string {
  const path = join(folder, name);
  writeFileSync(path, lines.join('\n'));
  return path;
}

function run(script: string, ...args: string[]) {
  const done = spawnSync(process.execPath, ['--import', 'tsx', join('tests', 'bench', script), ...args], {
    cwd: root,
    encoding: 'utf8',
    timeout: 25_000,
  });
  const lines = done.stdout.split('\n').filter((line) => line !== '');
  return { status: done.status, stderr: done.stderr, printed: lines.map((line) => JSON.parse(line) as unknown) };
}

/** Two stages of 4 and 3 in a bay for one, the second at most `most` after the first. */
const twoInOneBay = (most: number): string[] => [
  '2 1 0 0',
  '0 1 2 1 2 [0] [0]',
  '1 1 2 2 3 [0] [4]',
  `2 1 2 1 3 [${-most}] [3]`,
  '3 1 0',
  '0 1 0 0',
  '1 1 4 1',
  '2 1 3 1',
  '3 1 0 0',
  '1',
];

describe('solving files', () => {
  it('prints one line for each file and nothing else', () => {
    const solvable = fileOf('solvable.sch', twoInOneBay(6));
    const impossible = fileOf('impossible.sch', twoInOneBay(3));
    const { status, printed, stderr } = run('solve.ts', solvable, impossible, '--schedules', '200', '--seed', '7');
    expect(stderr).toBe('');
    expect(status).toBe(0);
    expect(printed).toEqual([
      expect.objectContaining({ file: solvable, makespan: 7, lowerBound: 7, starts: [0, 0, 4, 7], seed: 7 }),
      expect.objectContaining({ file: impossible, makespan: null, starts: null, infeasible: true }),
    ]);
  });

  it('names the people and their skills in a multi-skill file', () => {
    const path = fileOf('skills.dzn', [
      'nActs = 4; dur = [0,3,2,0]; nSkills = 2; nResources = 2;',
      'sreq = [| 0,0, | 1,0, | 1,1, | 0,0, |];',
      'mastery = [| true,false, | true,true, |];',
      'pred = [1,1,2,3]; succ = [2,3,4,4];',
    ]);
    const { printed } = run('solve.ts', path, '--schedules', '500');
    // Both are needed for the second activity, so it cannot run beside the first: 3 + 2.
    expect(printed).toEqual([expect.objectContaining({ makespan: 5, lowerBound: 5 })]);
    const [{ crews }] = printed as [{ crews: number[][][] }];
    expect(crews[2]).toHaveLength(2);
    expect(crews[2]).toEqual(
      expect.arrayContaining([
        [1, 1],
        [2, 2],
      ]),
    );
  });

  it.each([
    [
      'a broken file',
      () => [fileOf('broken.sch', ['2 1 0 0', '0 1 two'])],
      1,
      /broken\.sch, line 2: "two" is not a whole number/,
    ],
    ['no file', () => [], 2, /Name at least one instance file/],
    ['two budgets', () => ['a.sm', '--seconds', '1', '--schedules', '1'], 2, /either --schedules or --seconds/],
    ['an unknown option', () => ['a.sm', '--fast', '1'], 2, /no option --fast/],
  ])('ends in a sentence for %s', (_, args, status, sentence) => {
    const done = run('solve.ts', ...args());
    expect(done.status).toBe(status);
    expect(done.stderr).toMatch(sentence);
    expect(done.printed).toEqual([]);
  });
});

describe('the bench', () => {
  it('ends with its figures on one line', () => {
    fileOf('best-known.csv', ['file,lower_bound,best_known', 'solvable.sch,7,7', 'impossible.sch,unsat,unsat']);
    fileOf('solvable.sch', twoInOneBay(6));
    fileOf('impossible.sch', twoInOneBay(3));
    rmSync(join(folder, 'skills.dzn'), { force: true });
    rmSync(join(folder, 'broken.sch'), { force: true });
    const { status, printed, stderr } = run('main.ts', 'rcpspmax', '--data', folder, '--schedules', '100');
    expect(stderr).toContain('2/2');
    expect(status).toBe(0);
    expect(printed).toEqual([
      expect.objectContaining({
        suite: 'rcpspmax',
        instances: 2,
        valid: 1,
        faults: 0,
        provedInfeasible: 1,
        atBestKnown: 1,
        provedOptimal: 1,
      }),
    ]);
  });

  it('lists its suites where it is given none', () => {
    const { status, stderr } = run('main.ts');
    expect(status).toBe(2);
    for (const name of ['psplib', 'rcpspmax', 'multiproject', 'multiskill', 'levelling', 'studio', 'drag'])
      expect(stderr).toContain(name);
  });
});
