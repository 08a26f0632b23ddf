/** A production's colour in both themes, with the text colour that reads on it. Values are `#RRGGBB`. */
export interface ProductionHue {
  readonly name: string;
  readonly light: string;
  readonly onLight: string;
  readonly dark: string;
  readonly onDark: string;
}

const INK = '#22201C';
const WHITE = '#FFFFFF';
const DARK_PLASTER = '#1C1B19';

/**
 * Ten hues that stay apart for normal and for colour-blind eyes alike, by lightness as much as by hue; found by search over
 * the least OKLab distance under Machado's simulations. Still, a production is told by its mark first and its hue second.
 */
export const PRODUCTION_HUES: readonly ProductionHue[] = [
  { name: 'ultramarine', light: '#273B95', onLight: WHITE, dark: '#BFCBFF', onDark: DARK_PLASTER },
  { name: 'ochre', light: '#8C5D00', onLight: WHITE, dark: '#EEC08E', onDark: DARK_PLASTER },
  { name: 'verdigris', light: '#3A9A87', onLight: INK, dark: '#2EA77D', onDark: DARK_PLASTER },
  { name: 'burnt sienna', light: '#7A2901', onLight: WHITE, dark: '#D7791E', onDark: DARK_PLASTER },
  { name: 'violet', light: '#7D59BC', onLight: WHITE, dark: '#9776DC', onDark: DARK_PLASTER },
  { name: 'lichen', light: '#8E9007', onLight: INK, dark: '#F9F271', onDark: DARK_PLASTER },
  { name: 'midnight', light: '#02284A', onLight: WHITE, dark: '#5A7094', onDark: WHITE },
  { name: 'spruce', light: '#32726F', onLight: WHITE, dark: '#9BFFE4', onDark: DARK_PLASTER },
  { name: 'oxblood', light: '#510B04', onLight: WHITE, dark: '#AE5828', onDark: WHITE },
  { name: 'mulberry', light: '#5B3D59', onLight: WHITE, dark: '#C597CD', onDark: DARK_PLASTER },
];

/** The hue of an index from 0; beyond the last they come round again. */
export function productionHue(index: number): ProductionHue {
  const count = PRODUCTION_HUES.length;
  return PRODUCTION_HUES[((Math.trunc(index) % count) + count) % count];
}

/** Whether `mark` is two letters of any alphabet: what is printed wherever the hue is used. */
export function isMark(mark: string): boolean {
  return /^\p{L}{2}$/u.test(mark);
}

/**
 * A mark for a name that is not among those taken: initials of its words, else its first letter with each later one, else
 * any two letters. Upper case for the first letter only.
 */
export function suggestMark(name: string, taken: readonly string[]): string {
  const words: readonly string[] = name.match(/\p{L}+/gu) ?? [];
  const letters = words.join('');
  const initials = words.length > 1 ? [words[0][0] + words[1][0]] : [];
  const fromName = [...letters.slice(1)].map((letter) => letters[0] + letter);
  const rest = [...'ABCDEFGHIJKLMNOPQRSTUVWXYZ'].flatMap((a) => [...'abcdefghijklmnopqrstuvwxyz'].map((b) => a + b));
  const used = new Set(taken.map((mark) => mark.toLowerCase()));
  const free = [...initials, ...fromName, ...rest].find((mark) => !used.has(mark.toLowerCase()));
  const mark = free ?? 'Zz';
  return mark[0].toUpperCase() + mark[1].toLowerCase();
}
