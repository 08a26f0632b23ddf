import { readImports, type Import } from './imports';
import { isTest, read, sourceFiles } from './source-files';

/** One half of the application that is cut into features. */
interface Half {
  readonly root: string;
  /** Folders that features stand on; they know no feature, and may be entered anywhere. */
  readonly foundations: readonly string[];
}

const HALVES: readonly Half[] = [
  { root: 'client/src/app', foundations: ['shell', 'session', 'api', 'ui'] },
  { root: 'server', foundations: ['http', 'session', 'storage', 'live', 'jobs', 'mail', 'files'] },
];

/** Entered from outside through this file alone. */
const PUBLIC_FILE = 'index.ts';

const imports = readImports(sourceFiles(), read).filter(({ from }) => !isTest(from));

describe.each(HALVES)('features of $root', ({ root, foundations }) => {
  const folderOf = (path: string | undefined): string | undefined => {
    if (path?.startsWith(`${root}/`) !== true) return undefined;
    const parts = path.slice(root.length + 1).split('/');
    return parts.length > 1 ? parts[0] : undefined;
  };
  const isFeature = (folder: string | undefined): folder is string =>
    folder !== undefined && !foundations.includes(folder);

  it('are entered through their one public file', () => {
    const strays = imports.filter(({ from, target }) => {
      const feature = folderOf(target);
      return isFeature(feature) && folderOf(from) !== feature && target !== `${root}/${feature}/${PUBLIC_FILE}`;
    });
    expect(told(strays)).toEqual([]);
  });

  it('are unknown to what they stand on', () => {
    const strays = imports.filter(({ from, target }) => {
      const folder = folderOf(from);
      return folder !== undefined && !isFeature(folder) && isFeature(folderOf(target));
    });
    expect(told(strays)).toEqual([]);
  });
});

function told(strays: readonly Import[]): readonly string[] {
  return strays.map(({ from, target }) => `${from} imports ${target ?? ''}`);
}
