import { CsvError, parse } from 'csv-parse/sync';
import { COLUMNS, columnOf, NEEDED_COLUMNS, nearestColumn, type Column } from './columns';
import type { FaultList } from './fault-list';

/** Rows that one file may have. */
export const MOST_ROWS = 10_000;

/** One row of the file: its cells by column, trimmed; a missing cell is empty. */
export interface CsvRow {
  /** The physical line on which it begins, counted from 1; a cell with line breaks spreads a row over several. */
  readonly line: number;
  cell(column: Column): string;
}

const DELIMITERS = [',', ';', '\t'] as const;

/**
 * Reads delimited text (RFC 4180, and what spreadsheets make of it): comma, semicolon or tab, whichever names the most columns; a byte
 * order mark, a leading `sep=` line, blank lines, quotes inside bare cells and any line ends are put up with. What can not be
 * read goes to `faults`.
 */
export function readCsvTable(csv: string, faults: FaultList): readonly CsvRow[] {
  // The number of lines stays what an editor shows.
  const text = csv
    .replace(/^\uFEFF/, '')
    .replace(/\r\n?/g, '\n')
    .replace(/^sep=.(?=\n)/i, '');
  const records = parseRecords(text, faults);
  const [header, ...rows] = records;
  if (!header) {
    if (faults.count === 0)
      faults.add(1, () => 'The file is empty. Its first line names the columns, such as piece, stage, craft.');
    return [];
  }
  if (rows.length > MOST_ROWS) {
    faults.add(header.line, () => `The file has ${rows.length} rows, and ${MOST_ROWS} can be read at once. Split it.`);
    return [];
  }
  const columns = readHeader(header, rows, faults);
  return columns ? rows.flatMap((row) => tableRow(row, header, columns, faults)) : [];
}

interface Record {
  readonly line: number;
  readonly cells: readonly string[];
}

function parseRecords(text: string, faults: FaultList): readonly Record[] {
  let linesRead = 0;
  try {
    const parsed = parse(text, {
      delimiter: delimiterOf(text),
      record_delimiter: '\n',
      relax_column_count: true,
      relax_quotes: true,
      skip_empty_lines: true,
      skip_records_with_empty_values: true,
      trim: true,
      info: true,
      raw: true,
      on_record: (record: string[], { lines }: { lines: number }) => {
        linesRead = lines;
        return record;
      },
    }) as unknown as readonly { record: string[]; raw: string; info: { lines: number } }[];
    return parsed.map(({ record, raw, info }) => ({ line: info.lines - breaksInside(raw), cells: record }));
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = nextFullLine(text, linesRead);
    faults.add(line, () =>
      error.code === 'CSV_QUOTE_NOT_CLOSED'
        ? 'In the row that begins here a quotation mark opens and is never closed.'
        : 'From here on the file can not be read: look for a quotation mark out of place.',
    );
    return [];
  }
}

/** The first line with something on it after so many; the library counts a bad record to where it gave up. */
function nextFullLine(text: string, linesRead: number): number {
  const ahead = text
    .split('\n')
    .slice(linesRead)
    .findIndex((line) => line !== '');
  return linesRead + 1 + Math.max(0, ahead);
}

/** Line breaks inside a record; the library's text of it begins with the blank lines before and ends with its own break. */
function breaksInside(raw: string): number {
  return raw.replace(/^\n+/, '').replace(/\n$/, '').split('\n').length - 1;
}

/** The delimiter under which the first line names the most columns; a comma where none does. */
function delimiterOf(text: string): string {
  const first = text.split('\n').find((line) => line.trim() !== '') ?? '';
  const named = (delimiter: string): number =>
    first.split(delimiter).filter((cell) => columnOf(cell.trim().replace(/^"(.*)"$/, '$1')) !== null).length;
  return [...DELIMITERS].sort((a, b) => named(b) - named(a))[0];
}

/** The columns in their places, null for one without a heading; null altogether where the rows could not be understood. */
function readHeader(header: Record, rows: readonly Record[], faults: FaultList): readonly (Column | null)[] | null {
  const before = faults.count;
  const columns = header.cells.map((heading, index) => {
    if (heading === '') {
      const used = rows.find((row) => (row.cells[index] ?? '') !== '');
      if (used) faults.add(used.line, () => `Column ${index + 1} has no heading, but there is something in it.`);
      return null;
    }
    const column = columnOf(heading);
    if (column === null) faults.add(header.line, () => sayUnknown(heading));
    return column;
  });
  for (const column of NEEDED_COLUMNS.filter((needed) => !columns.includes(needed))) {
    faults.add(header.line, () => `The column “${column}” is missing.`);
  }
  columns.forEach((column, index) => {
    if (column !== null && columns.indexOf(column) !== index) {
      faults.add(header.line, () => `The column “${column}” is there twice.`);
    }
  });
  return faults.count === before ? columns : null;
}

function sayUnknown(heading: string): string {
  const near = nearestColumn(heading);
  const usual = COLUMNS.filter((column) => !/\d$/.test(column)).join(', ');
  return near === null
    ? `“${heading}” is not a column that is known. The columns are: ${usual}.`
    : `“${heading}” is not a column that is known. Is “${near}” meant?`;
}

function tableRow(
  row: Record,
  header: Record,
  columns: readonly (Column | null)[],
  faults: FaultList,
): readonly CsvRow[] {
  if (row.cells.slice(header.cells.length).some((cell) => cell !== '')) {
    faults.add(
      row.line,
      () =>
        `There are ${row.cells.length} cells where the first line names ${header.cells.length} columns. ` +
        'A cell with a comma, a semicolon or a line break in it goes between quotation marks.',
    );
    return [];
  }
  const places = new Map(columns.map((column, index) => [column, index]));
  return [{ line: row.line, cell: (column) => row.cells[places.get(column) ?? -1] ?? '' }];
}
