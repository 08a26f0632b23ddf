import { CsvError, parse } from 'csv-parse/sync';
import { DateTime } from 'luxon';
import type { FieldFault } from '@common/contract';
import type { ClimateReading } from '@common/dwell/climate-profile';

/** What a logger's file comes to: readings, or what is wrong with it row by row. */
export interface ReadLog {
  readonly readings: readonly ClimateReading[];
  readonly faults: readonly FieldFault[];
}

const MOST_ROWS = 20_000;
const MOST_FAULTS = 200;
const MS_PER_MINUTE = 60_000;
/** Outside these a logger is broken, or the column is another. */
const [COLDEST, HOTTEST] = [-30, 250];
const NAMES: Readonly<Record<string, Column>> = {
  at: 'at',
  time: 'at',
  'date and time': 'at',
  celsius: 'celsius',
  temperature: 'celsius',
  humidity: 'humidity',
  'relative humidity': 'humidity',
};
/** Days and times as loggers and spreadsheets write them; a bare day.month.year or day/month/year is read so, never month first. */
const FORMATS = ["yyyy-MM-dd'T'HH:mm", 'yyyy-MM-dd HH:mm', 'dd.MM.yyyy HH:mm', 'dd/MM/yyyy HH:mm'];

type Column = 'at' | 'celsius' | 'humidity';

/**
 * Reads CSV with the columns `at`, `celsius` and `humidity` (names as docs/import.md has them): comma, semicolon or tab, decimals
 * with point or comma, with or without a byte order mark. Times without an offset are the studio's own.
 */
export function readClimateLog(csv: string, zone: string): ReadLog {
  const faults: FieldFault[] = [];
  const fault = (detail: string, line: number): void => {
    if (faults.length < MOST_FAULTS) faults.push({ pointer: '/csv', detail, line });
  };
  const table = tableOf(csv, fault);
  if (table === null) return { readings: [], faults };
  const { columns, rows } = table;
  const seen = new Map<number, number>();
  const readings = rows.flatMap(({ cells, line }): ClimateReading[] => {
    const text = (column: Column): string => (cells[columns[column]] ?? '').trim();
    const at = readInstant(text('at'), zone);
    const celsius = readFigure(text('celsius'));
    const humidityPercent = readFigure(text('humidity').replace(/%$/, ''));
    if (at === null) {
      fault(`The time “${text('at')}” can’t be read. Write it as 2026-01-31 17:00, or 31.01.2026 17:00.`, line);
    }
    if (celsius === null || celsius < COLDEST || celsius > HOTTEST) {
      fault(`“${text('celsius')}” is no temperature from ${COLDEST} to ${HOTTEST} °C.`, line);
    }
    if (humidityPercent === null || humidityPercent < 0 || humidityPercent > 100) {
      fault(`“${text('humidity')}” is no humidity from 0 to 100 %.`, line);
    }
    if (at === null || celsius === null || humidityPercent === null) return [];
    const first = seen.get(at);
    if (first !== undefined) fault(`This time stands in line ${first} already.`, line);
    seen.set(at, line);
    return [{ at, celsius, humidityPercent }];
  });
  return { readings: faults.length > 0 ? [] : readings.sort((a, b) => a.at - b.at), faults };
}

interface Table {
  readonly columns: Readonly<Record<Column, number>>;
  readonly rows: readonly { readonly cells: readonly string[]; readonly line: number }[];
}

function tableOf(csv: string, fault: (detail: string, line: number) => void): Table | null {
  const [head = ''] = csv.replace(/^\uFEFF/, '').split(/\r?\n/, 1);
  const delimiter = [';', '\t', ','].find((one) => head.includes(one)) ?? ',';
  let records: { record: string[]; info: { lines: number } }[];
  try {
    const options = { bom: true, delimiter, info: true, relax_column_count: true, skip_empty_lines: true } as const;
    records = parse(csv, options) as unknown as typeof records;
  } catch (error) {
    const line = error instanceof CsvError && typeof error['lines'] === 'number' ? error['lines'] : 1;
    fault('The text is not CSV here: look for a quotation mark that is not closed.', line);
    return null;
  }
  const [first, ...rest] = records;
  const names = (first?.record ?? []).map((name) => NAMES[plain(name)]);
  const columns = { at: names.indexOf('at'), celsius: names.indexOf('celsius'), humidity: names.indexOf('humidity') };
  const missing = Object.entries(columns).filter(([, index]) => index < 0);
  if (missing.length > 0) {
    fault(`The first line names no column “${missing.map(([name]) => name).join('”, “')}”.`, 1);
    return null;
  }
  if (rest.length === 0) fault('There is no reading under the first line.', 1);
  if (rest.length > MOST_ROWS)
    fault(`The file has ${rest.length} rows, and ${MOST_ROWS} can be read at once. Split it.`, 1);
  if (rest.length === 0 || rest.length > MOST_ROWS) return null;
  return { columns, rows: rest.map(({ record, info }) => ({ cells: record, line: info.lines })) };
}

/** "Temperature (°C)" as "temperature". */
function plain(name: string): string {
  return name
    .replace(/[([].*$/, '')
    .trim()
    .toLowerCase()
    .replaceAll('_', ' ');
}

/** A figure with a decimal point or comma; null for none. */
function readFigure(text: string): number | null {
  return /^[-−]?\d{1,4}([.,]\d{1,4})?$/.test(text) ? Number(text.replace('−', '-').replace(',', '.')) : null;
}

function readInstant(text: string, zone: string): number | null {
  const plainText = text.replace(/(:\d\d):\d\d(\.\d+)?(?=$|Z|[+-])/, '$1');
  const given = DateTime.fromISO(plainText.replace(' ', 'T'), { setZone: true });
  if (given.isValid && /(Z|[+-]\d\d:?\d\d)$/.test(plainText)) return Math.floor(given.toMillis() / MS_PER_MINUTE);
  for (const format of FORMATS) {
    const local = DateTime.fromFormat(plainText, format, { zone });
    if (local.isValid) return Math.floor(local.toMillis() / MS_PER_MINUTE);
  }
  return null;
}
