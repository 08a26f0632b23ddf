import { isTest, projectFiles, read, sourceFiles } from './source-files';

/** Lines past which a file has more than one job. The aim is 300. */
const LONGEST_FILE = 400;

/** Files that may be longer, each with its reason. Empty, and meant to stay so. */
const LONGER_FOR_A_REASON: ReadonlyMap<string, string> = new Map();

const TOP_LEVEL = [
  ...['README.md', 'DEVELOPERS.md', 'package.json', 'package-lock.json', 'angular.json'],
  ...['client', 'server', 'common', 'database', 'docs', 'tests'],
  // What tools insist on finding here.
  ...['tsconfig.json', 'jest.config.cjs', 'eslint.config.mjs'],
];

const files = projectFiles();
const sources = sourceFiles();

describe('habits', () => {
  it('keep the top level to what belongs there', () => {
    const top = new Set(files.map((path) => path.split('/')[0] ?? ''));
    expect([...top].filter((name) => !name.startsWith('.') && !TOP_LEVEL.includes(name))).toEqual([]);
  });

  it('keep files short', () => {
    // A migration is history: it is read once, and splitting one would make it two.
    const growing = sources.filter((path) => !path.startsWith('database/migrations/'));
    const long = growing.filter((path) => lines(path) > LONGEST_FILE && !LONGER_FOR_A_REASON.has(path));
    expect(long.map((path) => `${path}: ${String(lines(path))} lines`)).toEqual([]);
  });

  it('name files in kebab case, without role suffixes that the folder says already', () => {
    const usual = /^_?[a-z0-9]+(-[a-z0-9]+)*(\.(spec|fake|worker|config|conf))?\.(ts|mjs|cjs|html|scss)$/;
    // Migrations are named by the moment they were made.
    const migration = /^database\/migrations\/\d+-[A-Za-z0-9-]+\.ts$/;
    const named = files.filter((path) => /^(client|server|common|database|tests)\//.test(path));
    const odd = named
      .filter((path) => /\.(ts|mjs|cjs|html|scss)$/.test(path) && !migration.test(path))
      .filter((path) => !usual.test(path.split('/').at(-1) ?? ''));
    expect(odd).toEqual([]);
  });

  it('leave no test out but for want of data from outside, and none alone', () => {
    const wanting = /\w+ === null \? (describe|it)\.skip : \1\)/;
    const focused = /\b(?:it|test|describe)\.(?:only|skip|todo|failing)\b|\b(?:xit|xdescribe|xtest|fit|fdescribe)\(/;
    expect(matching(sources.filter(isTest), focused, wanting)).toEqual([]);
  });

  it('switch no rule off without giving the reason', () => {
    const unexplained = /(?:eslint-disable(?!.*--)|@ts-ignore|@ts-nocheck|@ts-expect-error\s*$)/;
    expect(matching(sources, unexplained)).toEqual([]);
  });
});

function lines(path: string): number {
  return read(path).trimEnd().split('\n').length;
}

/** Where a pattern is found in files, line by line, but for lines that the exception excuses. */
function matching(paths: readonly string[], pattern: RegExp, exception = /(?!)/): readonly string[] {
  return paths
    .filter((path) => !isThisRule(path))
    .flatMap((path) =>
      read(path)
        .split('\n')
        .flatMap((line, index) =>
          pattern.test(line) && !exception.test(line) ? [`${path}:${String(index + 1)}`] : [],
        ),
    );
}

/** This file has to spell what it looks for. */
function isThisRule(path: string): boolean {
  return path === 'tests/architecture/habits.spec.ts';
}
