import eslint from '@eslint/js';
import angular from 'angular-eslint';
import { defineConfig, globalIgnores } from 'eslint/config';
import globals from 'globals';
import tseslint from 'typescript-eslint';

/**
 * Zones: what the files of one part of the house may not import. The same arrows are held once more by
 * tests/architecture, which resolves every import; here they show while typing.
 */
const outside = {
  client: { regex: '(^|/)client/', message: 'Only the client imports the client.' },
  server: { regex: '^@server/|(^|/)\\.\\./server/', message: 'Only the server imports the server.' },
  database: { regex: '^@database/|(^|/)\\.\\./database/', message: 'Only the server imports the database.' },
  packages: {
    // Anything that is neither relative nor an alias nor one of the few pure libraries.
    regex: '^(?!\\.|@common/|zod$|zod/|rrule$|luxon$|date-fns$|date-fns/)',
    message: 'common stays pure: only zod, rrule, luxon and date-fns.',
  },
  planning: {
    regex: '^@common/(planning|forecast)(/|$)|^(\\.\\./)+(planning|forecast)(/|$)',
    message: 'planning and forecast know time, dwell and domain; none of these knows them.',
  },
  contract: {
    regex: '^@common/(?!contract(/|$)|domain(/|$))|^(\\.\\./)+(planning|forecast|time|dwell)(/|$)',
    allowTypeImports: true,
    message: 'A contract is made of domain words only; of the engine it may name types, to be held to them.',
  },
};

const clientFeatures = [
  'plan',
  'load',
  'dates',
  'productions',
  'enquiries',
  'day-sheet',
  'crew',
  'bays',
  'library',
  'settings',
  'client-page',
];
const serverFeatures = ['planning', 'productions', 'enquiries', 'day-sheets', 'crew', 'bays', 'library', 'feeds'];

/** A feature may be entered from beside only through its one public file, index.ts. */
const sideways = (features, own) => ({
  regex: `^(\\.\\./)+(${features.filter((feature) => feature !== own).join('|')})/(?!index$)`,
  message: 'Enter a feature through its public file (index.ts), or meet in composition, routes or common.',
});

const forbid = (files, ...patterns) => ({
  files,
  rules: { '@typescript-eslint/no-restricted-imports': ['error', { patterns }] },
});

const { client, server, database, packages, planning, contract } = outside;

const zones = [
  forbid(['client/**/*.ts'], server, database),
  forbid(['server/**/*.ts'], client),
  forbid(['database/**/*.ts'], client, server),
  forbid(['common/**/*.ts'], client, server, database, packages),
  forbid(['common/{time,dwell,domain}/**/*.ts'], client, server, database, packages, planning),
  forbid(['common/contract/**/*.ts'], client, server, database, packages, contract),
  // A spec may use the test libraries.
  forbid(['common/**/*.spec.ts'], client, server, database),
  ...clientFeatures.map((feature) =>
    forbid([`client/src/app/${feature}/**/*.ts`], server, database, sideways(clientFeatures, feature)),
  ),
  ...serverFeatures.map((feature) => forbid([`server/${feature}/**/*.ts`], client, sideways(serverFeatures, feature))),
];

const browserGlobals = ['window', 'document', 'navigator', 'localStorage', 'sessionStorage', 'location'].map(
  (name) => ({ name, message: 'There is no browser here.' }),
);

export default defineConfig(
  globalIgnores(['dist/', '.angular/', '.fettle/', 'coverage/', 'node_modules/']),
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  {
    files: ['**/*.{ts,mjs}'],
    ignores: ['eslint.config.mjs', 'client/proxy.conf.mjs'],
    extends: [eslint.configs.recommended, tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
      ],
      '@typescript-eslint/unbound-method': ['error', { ignoreStatic: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      eqeqeq: ['error', 'smart'],
      'max-lines-per-function': ['error', { max: 70, skipBlankLines: true, skipComments: true }],
      'no-console': 'error',
      'no-restricted-syntax': ['error', { selector: 'TSEnumDeclaration', message: 'Unions, not enums.' }],
    },
  },
  {
    files: ['client/**/*.ts'],
    extends: [angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    languageOptions: { globals: globals.browser },
    rules: {
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/component-class-suffix': 'off',
      '@angular-eslint/directive-class-suffix': 'off',
      // An attribute where a component furnishes an element of another kind: a button, a row, a part of a drawing.
      '@angular-eslint/component-selector': [
        'error',
        [
          { type: 'element', prefix: 'fettle', style: 'kebab-case' },
          { type: 'attribute', prefix: 'fettle', style: 'camelCase' },
        ],
      ],
      '@angular-eslint/directive-selector': ['error', { type: 'attribute', prefix: 'fettle', style: 'camelCase' }],
    },
  },
  {
    files: ['client/**/*.html'],
    extends: [angular.configs.templateRecommended, angular.configs.templateAccessibility],
  },
  {
    files: ['server/**/*.{ts,mjs}', 'database/**/*.ts', 'common/**/*.ts'],
    rules: { 'no-restricted-globals': ['error', ...browserGlobals] },
  },
  {
    // One describe() is one long function by nature.
    files: ['**/*.spec.ts', 'tests/**/*.ts'],
    rules: { 'max-lines-per-function': 'off', '@typescript-eslint/unbound-method': 'off' },
  },
  {
    // What the API answers is JSON from outside; naming its members, unchecked by types, is how these tests check it.
    files: ['tests/api/**/*.ts'],
    rules: {
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
  {
    // A migration is one statement after another; its length says nothing.
    files: ['database/migrations/*.ts', 'database/demo/**/*.ts'],
    rules: { 'max-lines-per-function': 'off' },
  },
  {
    // Programs that talk to a terminal, and the client's last resort.
    files: ['server/launch/**', 'database/cluster/**', 'tests/support/**', 'tests/bench/**', 'client/src/main.ts'],
    rules: { 'no-console': 'off' },
  },
  {
    // Plain Node before anything is installed; types are checked through JSDoc.
    files: ['server/launch/*.{cjs,mjs}'],
    languageOptions: { globals: globals.node },
  },
  {
    files: ['*.{cjs,mjs}', 'server/launch/*.cjs'],
    extends: [eslint.configs.recommended],
    languageOptions: { globals: globals.node },
  },
  ...zones,
);
