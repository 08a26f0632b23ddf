import type { ClimateView, MaterialView } from '@common/contract';
import { advanceRate } from '@common/dwell/advance';
import { climateAt, type ClimateHistory } from '@common/dwell/climate';
import { creditMinutes, type DwellTime, latestStart, readyAt, temperatureFor } from '@common/dwell/ready';
import { formatMinutes } from '@common/time/format-instant';

type Dwell = MaterialView['dwells'][number];

/** How long a dwell may be taken to be. */
export const LENGTHS = ['low', 'likely', 'high'] as const;
export type Length = (typeof LENGTHS)[number];

/** What is asked: a dwell of a material that starts in a course of climates. Instants in minutes since 1970. */
export interface DwellQuestion {
  readonly material: MaterialView;
  readonly dwell: Dwell;
  readonly history: ClimateHistory;
  readonly start: number;
  /** Null while nobody has said when it has to be ready. */
  readonly readyBy: number | null;
}

/** One answer for each length; null where it never comes. */
export type ByLength = Readonly<Record<Length, number | null>>;

/** What a dwell that takes longer than this comes to: as good as never. A year. */
export const LONGEST_WAIT_MINUTES = 365 * 24 * 60;
/** How far the picture of a dwell that never ends goes. */
const PICTURE_MINUTES = 7 * 24 * 60;
const QUARTERS = [0.25, 0.5, 0.75];

/** A dwell of a length as `common/dwell` reckons with it: minutes at the material's reference climate. */
export function dwellTimeOf({ material, dwell }: Pick<DwellQuestion, 'material' | 'dwell'>, length: Length): DwellTime {
  const { law, minimumCelsius, maximumCelsius } = dwell;
  const { referenceCelsius, referenceHumidityPercent } = material;
  const minutes = dwell.minutes[length];
  return { minutes, law, minimumCelsius, maximumCelsius, referenceCelsius, referenceHumidityPercent };
}

/** The coming week of a place as a course of climates; null where nothing is known of it. */
export function historyOf(place: ClimateView | undefined): ClimateHistory | null {
  return place && place.week.length > 0 ? place.week : null;
}

/** When it is ready, by length; null where that is never, or more than a year away. */
export function readyByLength(question: DwellQuestion): ByLength {
  return byLength((length) => {
    const ready = readyAt(question.start, dwellTimeOf(question, length), question.history);
    return ready !== null && ready - question.start <= LONGEST_WAIT_MINUTES ? ready : null;
  });
}

/** The last minute at which it may start, by length; null where none is early enough, or nothing is asked. */
export function latestByLength(question: DwellQuestion): ByLength {
  const { readyBy, history } = question;
  return byLength((length) => {
    const latest = readyBy === null ? null : latestStart(readyBy, dwellTimeOf(question, length), history);
    return latest !== null && (readyBy ?? latest) - latest <= LONGEST_WAIT_MINUTES ? latest : null;
  });
}

/** The lowest steady temperature that does it, by length, with the humidity of the start; null where none is known to. */
export function temperatureByLength(question: DwellQuestion): ByLength {
  const { readyBy, start, history } = question;
  return byLength((length) =>
    readyBy === null || readyBy <= start
      ? null
      : temperatureFor(start, readyBy, dwellTimeOf(question, length), climateAt(history, start)),
  );
}

/** Why no steady temperature is named, or what has to be known with it; null where there is nothing to add. */
export function sayTemperatureLimits({ dwell, start, readyBy, history }: DwellQuestion): string | null {
  if (readyBy !== null && readyBy <= start) return 'It has to be ready before it starts. Choose a later time.';
  if (dwell.law.kind === 'none') return 'The climate does not move this time; warmth does not shorten it.';
  if (dwell.maximumCelsius === null) {
    return 'The library knows no highest temperature for this, so none can be named as safe. See the data sheet.';
  }
  if (dwell.law.kind === 'evaporation') {
    return `Reckoned with ${climateAt(history, start).humidityPercent} % humidity, as at the start.`;
  }
  return `Never above ${dwell.maximumCelsius} °C: there the figure is not trusted any more.`;
}

/** What keeps it from ever being ready, or slows it on the way, in plain sentences; none where it goes as it should. */
export function sayHindrances(question: DwellQuestion): readonly string[] {
  const { dwell, start, history } = question;
  const ready = readyByLength(question);
  const end = ready.high ?? Infinity;
  const met = history.filter((step, k) => step.from < end && (history.at(k + 1)?.from ?? Infinity) > start);
  const said: string[] = [];
  if (ready.high === null) said.push(sayNever(question, ready));
  else {
    const still = stillMinutes(question, ready.high);
    if (still > 0) said.push(`It stands still for ${formatMinutes(still)} on the way: ${whyStill(dwell)}.`);
  }
  const { maximumCelsius } = dwell;
  if (maximumCelsius !== null && met.some((step) => step.celsius > maximumCelsius)) {
    said.push(`Above ${maximumCelsius} °C the figure is not trusted; it is reckoned as at ${maximumCelsius} °C.`);
  }
  return said;
}

/** Whether an answer lies outside the course of a place, where its first or last step is taken to hold. */
export function leavesTheWeek(history: ClimateHistory, instants: readonly (number | null)[]): boolean {
  const first = history[0].from;
  if (history.length === 1 && first === 0) return false;
  return instants.some((at) => at !== null && (at < first || at > first + PICTURE_MINUTES));
}

/** How warm it is and how far the dwell has come, at an instant. */
export interface CurePoint {
  readonly at: number;
  readonly celsius: number;
  /** 0 to 100. */
  readonly percent: number;
}

/**
 * The usual dwell from its start to its end: at each change of temperature and each quarter. Between two points it advances
 * evenly. A dwell that never ends is followed for a week.
 */
export function cureCourse(question: DwellQuestion): readonly CurePoint[] {
  const { start, history } = question;
  const dwell = dwellTimeOf(question, 'likely');
  const end = readyByLength(question).likely ?? start + PICTURE_MINUTES;
  const quarters = QUARTERS.map((share) => readyAt(start, { ...dwell, minutes: dwell.minutes * share }, history));
  const marks = [start, end, ...quarters, ...history.map(({ from }) => from)];
  const inside = marks.filter((at): at is number => at !== null && at >= start && at <= end);
  return [...new Set(inside)]
    .sort((a, b) => a - b)
    .map((at) => ({ at, celsius: climateAt(history, at).celsius, percent: percentAt(question, dwell, at) }));
}

function percentAt({ start, history }: DwellQuestion, dwell: DwellTime, at: number): number {
  if (dwell.minutes <= 0) return 100;
  return Math.min(100, Math.round((1000 * creditMinutes(start, at, dwell, history)) / dwell.minutes) / 10);
}

function byLength(answer: (length: Length) => number | null): ByLength {
  return { low: answer('low'), likely: answer('likely'), high: answer('high') };
}

function sayNever(question: DwellQuestion, ready: ByLength): string {
  const { dwell, history } = question;
  const last = history[history.length - 1];
  const isStill = advanceRate(dwellTimeOf(question, 'high'), last) === 0;
  const why = isStill ? `it stays at ${last.celsius} °C, and ${whyStill(dwell)}` : 'it would take more than a year';
  return ready.low === null ? `It does not get there: ${why}.` : `It may not get there: ${why}.`;
}

function whyStill({ law, minimumCelsius }: Dwell): string {
  const reasons = [
    ...(minimumCelsius === null ? [] : [`below ${minimumCelsius} °C nothing advances`]),
    ...(law.kind === 'nurse-saul' ? [`up to ${law.datumCelsius} °C nothing advances`] : []),
    ...(law.kind === 'evaporation' ? ['above 85 % humidity nothing dries'] : []),
  ];
  return reasons.join(', and ');
}

function stillMinutes(question: DwellQuestion, end: number): number {
  const { start, history } = question;
  const dwell = dwellTimeOf(question, 'high');
  return history.reduce((sum, step, k) => {
    const from = k === 0 ? start : Math.max(start, step.from);
    const until = Math.min(end, history.at(k + 1)?.from ?? Infinity);
    return advanceRate(dwell, step) === 0 ? sum + Math.max(0, until - from) : sum;
  }, 0);
}
