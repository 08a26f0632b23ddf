import { isCalendarDay } from '@common/time/calendar-day';
import { instantOfLocal } from '@common/time/zone';

/** What a cell was read as, or what is wrong with it in words that follow "The low hours “x”". */
export type CellReading<T> =
  { readonly kind: 'value'; readonly value: T } | { readonly kind: 'fault'; readonly says: string };

const MOST_MINUTES = 5_256_000;

/** Hours as `1.5`, `1,5`, `1:30` or `1.5 h`, in whole minutes. */
export function readHours(text: string): CellReading<number> {
  const bare = text.replace(/\s*(h|hrs?|hours?)\.?$/i, '');
  const clock = /^(\d{1,5}):([0-5]\d)$/.exec(bare);
  if (clock) {
    return bounded(Number(clock[1]) * 60 + Number(clock[2]));
  }
  const number = readDecimal(bare);
  return number.kind === 'value' ? bounded(Math.round(number.value * 60)) : number;
}

/** A number of none or more, with a point or a comma before its decimals. */
export function readDecimal(text: string): CellReading<number> {
  if (/^[1-9]\d{0,2}(,\d{3})+$/.test(text)) {
    const joined = text.replaceAll(',', '');
    const pointed = text.replace(/,(?=\d+$)/, '.');
    return fault(`could mean ${joined} or ${pointed}: write it without the comma, or with a point before decimals`);
  }
  return /^\d{1,12}([.,]\d{1,6})?$/.test(text)
    ? value(Number(text.replace(',', '.')))
    : fault('is not a number such as 2, 2.5 or 2,5');
}

/** A whole number within bounds, both inside. */
export function readWhole(text: string, least: number, most: number): CellReading<number> {
  const number = /^\d{1,9}$/.test(text) ? Number(text) : NaN;
  return number >= least && number <= most ? value(number) : fault(`is not a whole number from ${least} to ${most}`);
}

/** One of a few words, whatever its case. */
export function readWord<T extends string>(text: string, words: readonly T[]): CellReading<T> {
  const found = words.find((word) => word === text.toLowerCase());
  return found === undefined ? fault(`is not one of ${words.join(', ')}`) : value(found);
}

/** An amount of money in the currency's minor units, of which there are 10^`decimals` in one. */
export function readMoney(text: string, decimals: number): CellReading<number> {
  const number = readDecimal(text);
  if (number.kind === 'fault') return number;
  const minor = number.value * 10 ** decimals;
  const whole = Math.round(minor);
  return Math.abs(minor - whole) > 1e-6 ? fault(`has more than ${decimals} decimals`) : value(whole);
}

/** A reading of the studio's clock such as `2026-05-04 09:30`, as an instant in ISO 8601, UTC. */
export function readLocalInstant(text: string, zone: string): CellReading<string> {
  const match = /^(\d{4}-\d{2}-\d{2})[ T]([01]\d|2[0-3]):([0-5]\d)$/.exec(text);
  if (!match || !isCalendarDay(match[1])) {
    return fault('is not a day and a time such as 2026-05-04 09:30');
  }
  const local = Date.parse(`${match[1]}T${match[2]}:${match[3]}Z`) / 60_000;
  return value(new Date(instantOfLocal(local, zone) * 60_000).toISOString());
}

/** Several values in one cell, with an upright bar between them. */
export function readList(text: string): readonly string[] {
  return text
    .split('|')
    .map((item) => item.trim())
    .filter((item) => item !== '');
}

function bounded(minutes: number): CellReading<number> {
  return minutes <= MOST_MINUTES ? value(minutes) : fault('is more than ten years');
}

function value<T>(read: T): CellReading<T> {
  return { kind: 'value', value: read };
}

function fault(says: string): CellReading<never> {
  return { kind: 'fault', says };
}
