import type { Budget } from './budget';

/** A command line that cannot be understood; the message is a sentence for the terminal. */
export class UsageFault extends Error {}

/** Words and `--name value` options of a command line. */
export interface Arguments {
  readonly words: readonly string[];
  readonly options: ReadonlyMap<string, string>;
}

/** Splits a command line; every option takes a value and must be one of `known`. */
export function readArguments(line: readonly string[], known: readonly string[]): Arguments {
  const words: string[] = [];
  const options = new Map<string, string>();
  for (let k = 0; k < line.length; k++) {
    if (!line[k].startsWith('--')) {
      words.push(line[k]);
      continue;
    }
    const [name, joined] = line[k].slice(2).split('=', 2);
    if (!known.includes(name)) throw new UsageFault(`There is no option --${name}; there are --${known.join(', --')}.`);
    const value = joined ?? line[++k];
    if (value === undefined) throw new UsageFault(`The option --${name} wants a value.`);
    options.set(name, value);
  }
  return { words, options };
}

/** An option as a whole number of at least `least`. */
export function wholeOption(given: Arguments, name: string, fallback: number, least: number): number {
  const text = given.options.get(name);
  if (text === undefined) return fallback;
  if (!/^-?\d+$/.test(text) || Number(text) < least)
    throw new UsageFault(`--${name} wants a whole number of ${least} or more, not "${text}".`);
  return Number(text);
}

/** The budget that `--schedules` or `--seconds` asks for. */
export function budgetOption(given: Arguments, fallback: Budget): Budget {
  const seconds = given.options.get('seconds');
  if (seconds !== undefined && given.options.has('schedules'))
    throw new UsageFault('Give either --schedules or --seconds, not both.');
  if (given.options.has('schedules')) return { kind: 'schedules', schedules: wholeOption(given, 'schedules', 1, 1) };
  if (seconds === undefined) return fallback;
  if (!(Number(seconds) > 0)) throw new UsageFault(`--seconds wants a number above 0, not "${seconds}".`);
  return { kind: 'seconds', seconds: Number(seconds) };
}
