import { LostImport, readImports } from './imports';

const read = (files: Readonly<Record<string, string>>) =>
  readImports(Object.keys(files), (path) => files[path] ?? '').map(
    ({ from, target, specifier, kind }) => `${from} > ${target ?? specifier} (${kind})`,
  );

// The reader is what every other check here leans on, so it is shown to see each way of importing.
describe('the reader of imports', () => {
  it('sees values and types, relative, aliased, by folder and from packages', () => {
    const files = {
      'server/a.ts': `
        import { b } from './b';
        import type { C } from '@common/c';
        import { type D } from '@common/d';
        import { type D as E, e } from '@common/d';
        import express from 'express';
        import '@database/side-effect';
        export * from './folder';
        export type { F } from './folder';`,
      'server/b.ts': '',
      'common/c.ts': '',
      'common/d/index.ts': '',
      'database/side-effect.ts': '',
      'server/folder/index.ts': '',
    };
    expect(read(files)).toEqual([
      'server/a.ts > server/b.ts (value)',
      'server/a.ts > common/c.ts (type)',
      'server/a.ts > common/d/index.ts (type)',
      'server/a.ts > common/d/index.ts (value)',
      'server/a.ts > express (value)',
      'server/a.ts > database/side-effect.ts (value)',
      'server/a.ts > server/folder/index.ts (value)',
      'server/a.ts > server/folder/index.ts (type)',
    ]);
  });

  it('sees what is loaded late: import(), require(), type imports and web workers', () => {
    const files = {
      'client/src/a.ts': `
        const late = () => import('./b');
        const old = require('../../common/c');
        type T = import('./b').T;
        const worker = new Worker(new URL('./c.worker', import.meta.url));`,
      'client/src/b.ts': '',
      'common/c.ts': '',
      'client/src/c.worker.ts': '',
    };
    expect(read(files)).toEqual([
      'client/src/a.ts > client/src/b.ts (value)',
      'client/src/a.ts > common/c.ts (value)',
      'client/src/a.ts > client/src/b.ts (type)',
      'client/src/a.ts > client/src/c.worker.ts (value)',
    ]);
  });

  it('is not taken in by comments and text', () => {
    expect(read({ 'common/a.ts': `// import './b'\nconst text = "import './b'";` })).toEqual([]);
  });

  it('says so when an import leads nowhere', () => {
    expect(() => read({ 'common/a.ts': `import './gone';` })).toThrow(LostImport);
  });
});
