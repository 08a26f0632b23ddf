import type { Column } from './columns';
import type { CsvRow } from './csv-table';
import type { FaultList } from './fault-list';
import { nearest } from './nearest';
import type { CellReading } from './read-cell';

/** Names listed in a sentence before it gets too long to read. */
const MOST_LISTED = 12;

/** Reads the cells of one row and tells what is wrong with them, each with its column. */
export class RowReader {
  #faults = 0;

  constructor(
    private readonly row: CsvRow,
    private readonly list: FaultList,
  ) {}

  get line(): number {
    return this.row.line;
  }

  /** Whether nothing was wrong so far. */
  get isSound(): boolean {
    return this.#faults === 0;
  }

  text(column: Column): string {
    return this.row.cell(column);
  }

  /** A cell by its reader; null where it is empty, or faulty and told so. */
  read<T>(column: Column, reader: (text: string) => CellReading<T>): T | null {
    const text = this.text(column);
    if (text === '') return null;
    const reading = reader(text);
    if (reading.kind === 'value') return reading.value;
    this.fault(() => `${sentenceCase(column)} “${shortened(text)}” ${reading.says}.`);
    return null;
  }

  /** Looks a name up among the known; the fault names the nearest, or those that there are. */
  find<T extends { readonly name: string }>(
    column: Column,
    text: string,
    known: readonly T[],
    alsoKnownAs: (one: T) => string = (one) => one.name,
  ): T | null {
    const wanted = text.toLowerCase();
    const found = known.filter((one) => one.name.toLowerCase() === wanted || alsoKnownAs(one).toLowerCase() === wanted);
    if (found.length === 1) return found[0];
    this.fault(() =>
      found.length > 1
        ? `${sentenceCase(column)} “${shortened(text)}” is the name of ${found.length} of them.`
        : `${sentenceCase(column)} “${shortened(text)}” is not known. ${hint(
            text,
            known.map((one) => one.name),
          )}`,
    );
    return null;
  }

  fault(sentence: () => string): void {
    this.#faults += 1;
    this.list.add(this.row.line, sentence);
  }
}

/** "Is “laminating” meant?", or the names that there are. */
export function hint(text: string, names: readonly string[]): string {
  const near = nearest(text, names);
  if (near !== null) return `Is “${near}” meant?`;
  if (names.length === 0) return 'There are none yet.';
  const more = names.length > MOST_LISTED ? `, and ${names.length - MOST_LISTED} more` : '';
  return `There are: ${names.slice(0, MOST_LISTED).join(', ')}${more}.`;
}

/** A cell's text short enough to be quoted. */
export function shortened(text: string): string {
  const line = text.replace(/\s+/g, ' ');
  return line.length > 60 ? `${line.slice(0, 57)}…` : line;
}

function sentenceCase(column: Column): string {
  return `The ${column}`;
}
