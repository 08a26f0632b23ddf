import { cycles } from './cycles';
import { readImports, type Import } from './imports';
import { isTest, read, sourceFiles } from './source-files';

const imports = readImports(sourceFiles(), read);
const shipped = imports.filter(({ from }) => !isTest(from));

/**
 * Types that may be looked up at without depending on the code: the engine's messages are schemas in the contract, and
 * the compiler holds them to the engine's own types.
 */
const MAY_NAME_TYPES_IN_COMMON: Readonly<Record<string, readonly string[]>> = {
  contract: ['planning', 'forecast', 'rescue', 'dwell', 'time'],
};

/** What each part of the house may import from, itself included. */
const MAY_IMPORT: Readonly<Record<string, readonly string[]>> = {
  client: ['client', 'common'],
  server: ['server', 'common', 'database'],
  database: ['database', 'common'],
  common: ['common'],
};

/**
 * The same inside common, from the ground up: planning and forecast use time, dwell and domain; none of these knows
 * them.
 */
const MAY_IMPORT_IN_COMMON: Readonly<Record<string, readonly string[]>> = {
  time: ['time'],
  dwell: ['dwell', 'time'],
  domain: ['domain', 'dwell', 'time'],
  contract: ['contract', 'domain'],
  planning: ['planning', 'time', 'dwell', 'domain'],
  forecast: ['forecast', 'planning', 'time', 'dwell', 'domain'],
  promise: ['promise', 'forecast', 'planning', 'time', 'dwell', 'domain'],
  rescue: ['rescue', 'planning-input', 'forecast', 'planning', 'time', 'dwell', 'domain'],
  'planning-input': ['planning-input', 'planning', 'forecast', 'time', 'dwell', 'domain', 'contract'],
};

const PURE_PACKAGES = ['zod', 'rrule', 'luxon', 'date-fns'];

describe('the direction of dependencies', () => {
  it('is read from real files', () => {
    // A reader that found nothing would find nothing wrong.
    expect(imports.filter(({ target }) => target?.startsWith('common/')).length).toBeGreaterThan(50);
  });

  it.each(Object.keys(MAY_IMPORT))('%s imports only from where it may', (part) => {
    const strays = imports.filter(
      ({ from, target }) => from.startsWith(`${part}/`) && target !== undefined && !allowed(part, target),
    );
    expect(told(strays)).toEqual([]);
  });

  it('common touches nothing but a few pure packages: no Node, no DOM, no framework', () => {
    const strays = shipped.filter(
      ({ from, target, specifier }) =>
        from.startsWith('common/') && target === undefined && !PURE_PACKAGES.includes(packageOf(specifier)),
    );
    expect(told(strays)).toEqual([]);
  });

  it('the client touches no Node', () => {
    const strays = shipped.filter(({ from, specifier }) => from.startsWith('client/src/') && /^node:/.test(specifier));
    expect(told(strays)).toEqual([]);
  });

  it('parts of common know only what is below them', () => {
    const strays = shipped.filter(({ from, target, kind }) => {
      if (!from.startsWith('common/') || target?.startsWith('common/') !== true) return false;
      const types = kind === 'type' ? (MAY_NAME_TYPES_IN_COMMON[partOf(from)] ?? []) : [];
      // A part that the table does not know is a decision that nobody has taken.
      return ![...(MAY_IMPORT_IN_COMMON[partOf(from)] ?? []), ...types].includes(partOf(target));
    });
    expect(told(strays)).toEqual([]);
  });

  it('what ships imports no test', () => {
    expect(told(shipped.filter(({ target }) => target !== undefined && isTest(target)))).toEqual([]);
  });

  it('the checker shares no code with the search', () => {
    const search = /^common\/planning\/(construct|improve|exact|bounds)\//;
    const reached = reachable(shipped, (path) => path.startsWith('common/planning/check/'));
    expect([...reached].filter((path) => search.test(path))).toEqual([]);
  });

  it('has no cycles at run time, and none of types either but between entities', () => {
    expect(cycles(graphOf(shipped.filter(({ from }) => !from.startsWith('database/entities/'))))).toEqual([]);
  });
});

function allowed(part: string, target: string): boolean {
  return MAY_IMPORT[part]?.some((name) => target.startsWith(`${name}/`)) === true;
}

function partOf(path: string): string {
  return path.split('/')[1] ?? '';
}

function packageOf(specifier: string): string {
  return specifier
    .split('/')
    .slice(0, specifier.startsWith('@') ? 2 : 1)
    .join('/');
}

function graphOf(edges: readonly Import[]): ReadonlyMap<string, ReadonlySet<string>> {
  const graph = new Map<string, Set<string>>();
  for (const { from, target } of edges) {
    const next = graph.get(from) ?? new Set<string>();
    graph.set(from, next);
    if (target !== undefined) next.add(target);
  }
  return graph;
}

/** Every file that is loaded at run time because of the starting ones, these included. */
function reachable(edges: readonly Import[], isStart: (path: string) => boolean): ReadonlySet<string> {
  const graph = graphOf(edges.filter(({ kind }) => kind === 'value'));
  const reached = new Set([...graph.keys()].filter(isStart));
  for (const path of reached) for (const next of graph.get(path) ?? []) reached.add(next);
  return reached;
}

function told(strays: readonly Import[]): readonly string[] {
  return strays.map(({ from, target, specifier }) => `${from} imports ${target ?? specifier}`);
}
