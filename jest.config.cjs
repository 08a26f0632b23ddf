// swc only strips types; `npm run typecheck` is what checks them. Decorators are the legacy kind, as TypeORM needs.
const swc = [
  '@swc/jest',
  {
    jsc: {
      target: 'es2022',
      parser: { syntax: 'typescript', decorators: true },
      transform: { legacyDecorator: true, decoratorMetadata: false, useDefineForClassFields: false },
      keepClassNames: true,
    },
    module: { type: 'commonjs' },
    sourceMaps: 'inline',
  },
];

const alias = {
  '^@common/(.*)$': '<rootDir>/common/$1',
  '^@database/(.*)$': '<rootDir>/database/$1',
};

const ignored = ['<rootDir>/dist/', '<rootDir>/.fettle/', '<rootDir>/.angular/'];

const onNode = {
  rootDir: __dirname,
  testEnvironment: 'node',
  transform: { '^.+\\.(ts|mjs)$': swc },
  moduleFileExtensions: ['ts', 'js', 'mjs', 'cjs', 'json', 'node'],
  moduleNameMapper: alias,
  modulePathIgnorePatterns: ignored,
};

/** @type {import('jest').Config} */
module.exports = {
  testTimeout: 30_000,
  projects: [
    {
      ...onNode,
      displayName: 'node',
      testMatch: [
        '<rootDir>/{common,server,database}/**/*.spec.ts',
        '<rootDir>/tests/{engine,architecture,support,bench}/**/*.spec.ts',
      ],
    },
    {
      ...onNode,
      displayName: 'api',
      testMatch: ['<rootDir>/tests/api/**/*.spec.ts'],
      globalSetup: '<rootDir>/tests/support/start-test-cluster.ts',
      globalTeardown: '<rootDir>/tests/support/stop-test-cluster.ts',
    },
    {
      rootDir: __dirname,
      ...require('jest-preset-angular/presets').createCjsPreset(),
      displayName: 'client',
      testEnvironment: 'jest-preset-angular/environments/jest-jsdom-env',
      testMatch: ['<rootDir>/client/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/client/setup-jest.ts'],
      transform: {
        '^.+\\.(ts|js|mjs|html|svg)$': [
          'jest-preset-angular',
          { tsconfig: '<rootDir>/client/tsconfig.spec.json', stringifyContentPathRegex: '\\.(html|svg)$' },
        ],
      },
      moduleNameMapper: { ...alias, '(.*/)?spawn-worker$': '<rootDir>/client/testing/spawn-worker.fake.ts' },
      modulePathIgnorePatterns: ignored,
    },
    {
      ...onNode,
      displayName: 'browser',
      testMatch: ['<rootDir>/tests/browser/**/*.spec.ts'],
      globalSetup: '<rootDir>/tests/support/start-test-cluster.ts',
      globalTeardown: '<rootDir>/tests/support/stop-test-cluster.ts',
    },
  ],
};
