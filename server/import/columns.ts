import { nearest } from './nearest';

/** How many crafts and how many bays one row can name: `craft`, `craft 2`, … */
export const MOST_CRAFTS = 6;
export const MOST_BAYS = 6;

const SINGLE_COLUMNS = [
  'piece',
  'stage',
  'kind',
  'low hours',
  'likely hours',
  'high hours',
  'crew loss percent',
  'continuity',
  'dwell hours',
  'material',
  'milestone',
  'attended hours',
  'window',
  'window hours',
  'window extra hours',
  'window cost',
  'after',
  'visit',
  'reply hours',
  'cautions',
  'note',
] as const;
const CRAFT_COLUMNS = ['craft', 'makers least', 'makers most'] as const;
const BAY_COLUMNS = ['bay', 'units', 'hold'] as const;

type SingleColumn = (typeof SINGLE_COLUMNS)[number];
type RepeatedColumn = (typeof CRAFT_COLUMNS)[number] | (typeof BAY_COLUMNS)[number];

/** A column of the file by the name that docs/import.md gives it. */
export type Column = SingleColumn | RepeatedColumn | `${RepeatedColumn} ${number}`;

/** Columns without which nothing can be read. */
export const NEEDED_COLUMNS: readonly Column[] = ['piece', 'stage'];

/** Every column that is known, in the order of docs/import.md. */
export const COLUMNS: readonly Column[] = [
  ...SINGLE_COLUMNS,
  ...repeated(CRAFT_COLUMNS, MOST_CRAFTS),
  ...repeated(BAY_COLUMNS, MOST_BAYS),
];

const BY_NAME: ReadonlyMap<string, Column> = new Map(COLUMNS.map((column) => [column, column]));

/** The column that a heading names, whatever its case, spaces, hyphens and underscores; null for none. */
export function columnOf(heading: string): Column | null {
  const name = heading
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, ' ')
    // "bays" for "bay", "craft 1" for "craft"
    .replace(/^(bay|craft|caution)s\b/, '$1')
    .replace(/^caution$/, 'cautions')
    .replace(/ 1$/, '');
  return BY_NAME.get(name) ?? null;
}

/** What a heading that names no column may have meant; null where nothing is near. */
export function nearestColumn(heading: string): Column | null {
  return BY_NAME.get(nearest(heading.trim().toLowerCase(), COLUMNS) ?? '') ?? null;
}

/** A repeated column for its nth craft or bay, counted from 1. */
export function nthColumn(column: RepeatedColumn, nth: number): Column {
  return nth === 1 ? column : `${column} ${nth}`;
}

function repeated(columns: readonly RepeatedColumn[], most: number): readonly Column[] {
  return Array.from({ length: most }, (_, index) => columns.map((column) => nthColumn(column, index + 1))).flat();
}
