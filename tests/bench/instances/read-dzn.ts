import type { InstanceData } from './instance-data';
import { InstanceFault, LARGEST_NUMBER } from './line-reader';

interface Entry {
  readonly line: number;
  readonly text: string;
}

/**
 * Reads a multi-skill instance (Young, Feydy & Schutt 2017): `name = value;` items, of which the model's own are used and the
 * derived ones (unrelated pairs, useful resources) skipped. Activities, skills and resources count from 1.
 */
export function readDzn(file: string, text: string): InstanceData {
  const items = new DznItems(file, text);
  const count = items.count('nActs');
  const skills = items.count('nSkills');
  const resources = items.count('nResources');
  const durations = items.numbers('dur', count);
  const required = items.table('sreq', count, skills).map((row) => row.map((word) => items.number('sreq', word)));
  const mastery = items
    .table('mastery', resources, skills)
    .map((row) => row.map((word) => items.truth('mastery', word)));
  const before = items.numbers('pred');
  const after = items.numbers('succ', before.length);
  for (const activity of [...before, ...after])
    if (activity < 1 || activity > count) throw items.fault('pred', `activity ${activity} does not exist.`);
  return {
    format: 'multiskill',
    activities: durations.map((duration, k) => ({ label: String(k + 1), duration, demands: [], release: 0 })),
    capacities: [],
    arcs: before.map((from, k) => ({ from: from - 1, to: after[k] - 1, lag: durations[from - 1] })),
    skills: { required, mastery },
  };
}

/** The items of a data file by name. */
class DznItems {
  private readonly items = new Map<string, Entry>();

  constructor(
    private readonly file: string,
    text: string,
  ) {
    const bare = text.replace(/%[^\n]*/g, '');
    for (const match of bare.matchAll(/([A-Za-z_]\w*)\s*=([^;]*)(;?)/g)) {
      const line = bare.slice(0, match.index).split('\n').length;
      if (match[3] === '') throw new InstanceFault(file, line, `"${match[1]}" does not end with a semicolon.`);
      this.items.set(match[1], { line, text: match[2].trim() });
    }
  }

  fault(name: string, what: string): InstanceFault {
    return new InstanceFault(this.file, this.items.get(name)?.line ?? 1, `"${name}": ${what}`);
  }

  count(name: string): number {
    const value = this.number(name, this.item(name));
    if (value > 100_000) throw this.fault(name, `${value} is too large.`);
    return value;
  }

  numbers(name: string, length?: number): number[] {
    const inner = /^\[([^|]*)\]$/s.exec(this.item(name))?.[1];
    if (inner === undefined) throw this.fault(name, 'a list in square brackets should stand here.');
    const values = words(inner).map((word) => this.number(name, word));
    if (length !== undefined && values.length !== length)
      throw this.fault(name, `${length} numbers should stand here, but there are ${values.length}.`);
    return values;
  }

  table(name: string, rows: number, columns: number): string[][] {
    const inner = /^\[\|(.*)\|\]$/s.exec(this.item(name).replace(/\|\s*\]$/, '|]'))?.[1];
    if (inner === undefined) throw this.fault(name, 'a table between [| and |] should stand here.');
    const cells = inner.split('|').map(words);
    if (cells.length !== rows) throw this.fault(name, `${rows} rows should stand here, but there are ${cells.length}.`);
    cells.forEach((row, k) => {
      if (row.length !== columns)
        throw this.fault(name, `row ${k + 1} should have ${columns} cells, but has ${row.length}.`);
    });
    return cells;
  }

  number(name: string, word: string): number {
    if (!/^\d+$/.test(word)) throw this.fault(name, `"${word}" is not a whole number of 0 or more.`);
    const value = Number(word);
    if (value > LARGEST_NUMBER) throw this.fault(name, `${value} is too large.`);
    return value;
  }

  truth(name: string, word: string): boolean {
    if (word !== 'true' && word !== 'false') throw this.fault(name, `"${word}" is neither true nor false.`);
    return word === 'true';
  }

  private item(name: string): string {
    const entry = this.items.get(name);
    if (entry === undefined) throw this.fault(name, 'the item is missing.');
    return entry.text;
  }
}

function words(text: string): string[] {
  return text
    .split(',')
    .map((word) => word.trim())
    .filter((word) => word !== '');
}
