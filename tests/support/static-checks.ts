import { runErrand, type ErrandEnd } from '../../server/launch/child';

const LIMIT_MS = 5 * 60_000;

/** Every compilation there is: each folder is held to what its own tsconfig lets it know. */
export const COMPILATIONS = [
  'common/tsconfig.json',
  'tsconfig.json',
  'tests/tsconfig.json',
  'client/tsconfig.app.json',
  'client/tsconfig.worker.json',
  'client/tsconfig.spec.json',
] as const;

/** Lints the whole project with types; a warning is a failure. */
export function lint(): Promise<ErrandEnd> {
  return runTool('eslint/bin/eslint.js', '.', '--max-warnings', '0');
}

/** Whether every file is laid out as the formatter would. */
export function checkFormat(): Promise<ErrandEnd> {
  return runTool('prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.');
}

/** Type-checks one compilation; the application's own with its templates. */
export function typeCheck(config: (typeof COMPILATIONS)[number]): Promise<ErrandEnd> {
  return config === 'client/tsconfig.app.json'
    ? runTool('@angular/compiler-cli/bundles/src/bin/ngc.js', '-p', config, '--noEmit')
    : runTool('typescript/bin/tsc', '-p', config, '--noEmit');
}

function runTool(file: string, ...args: readonly string[]): Promise<ErrandEnd> {
  // By path rather than by name: not every package exports the program that it brings.
  const program = `node_modules/${file}`;
  return runErrand({ program: process.execPath, args: [program, ...args], limitMs: LIMIT_MS });
}
