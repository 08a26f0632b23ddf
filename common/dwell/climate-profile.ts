import { WEEKDAYS, type Weekday } from '../time/weekday';
import { addDays, dayNumber, dayOfInstant } from '../time/calendar-day';
import type { CalendarDay, Minute, Span } from '../time/span';
import { instantOfLocal, MINUTES_PER_DAY } from '../time/zone';
import type { Climate, ClimateHistory, ClimateStep } from './climate';

/** Hours in which a place is heated to a temperature at least; clock minutes of the day in the studio's zone. */
export interface Heating {
  readonly days: readonly Weekday[];
  readonly fromMinuteOfDay: number;
  readonly untilMinuteOfDay: number;
  readonly celsius: number;
}

/**
 * The climate of a place over the seasons and the week. Unheated, it swings like the year between its mid-winter and its mid-summer
 * mean; heating lifts what is colder, and outside its hours the set-back does (null: nothing does). Heat dries: while it lifts the
 * temperature, the moisture in the air stays what it was, and relative humidity falls with it.
 */
export interface ClimateProfile {
  readonly winterCelsius: number;
  readonly summerCelsius: number;
  readonly winterHumidityPercent: number;
  readonly summerHumidityPercent: number;
  readonly heating: Heating | null;
  readonly setBackCelsius: number | null;
}

/** One reading of a logger. */
export interface ClimateReading extends Climate {
  readonly at: Minute;
}

/** Mid-winter falls on 15 January, mid-summer half a year later. From memory: the lag of the season in the temperate north. */
const MID_WINTER_DAY = 14;
const DAYS_A_YEAR = 365.2425;
/** Readings further apart than this leave a gap that the profile fills. */
export const LONGEST_READING_GAP_MINUTES = 6 * 60;

/** The course of a profile over a frame, in steps at midnight and where heating begins and ends. */
export function profileHistory(profile: ClimateProfile, frame: Span, zone: string): ClimateHistory {
  const steps: ClimateStep[] = [];
  const last = dayOfInstant(Math.max(frame.start, frame.end - 1), zone);
  for (let day = dayOfInstant(frame.start, zone); day <= last; day = addDays(day, 1)) {
    const base = unheated(profile, day);
    const midnight = dayNumber(day) * MINUTES_PER_DAY;
    const put = (minuteOfDay: number, celsius: number | null): void => {
      const from = instantOfLocal(midnight + minuteOfDay, zone);
      steps.push({ from, ...lifted(base, celsius) });
    };
    put(0, profile.setBackCelsius);
    const { heating } = profile;
    if (heating?.days.includes(weekdayOf(day))) {
      put(heating.fromMinuteOfDay, heating.celsius);
      put(heating.untilMinuteOfDay, profile.setBackCelsius);
    }
  }
  return withoutRepeats(steps);
}

/** Readings laid over a history: each holds until the next, and where they are too far apart the history shows through. */
export function withReadings(history: ClimateHistory, readings: readonly ClimateReading[]): ClimateHistory {
  if (readings.length === 0) return history;
  const sorted = [...readings].sort((a, b) => a.at - b.at);
  const steps: ClimateStep[] = [];
  let next = 0;
  const copyUntil = (until: Minute): void => {
    while (next < history.length && history[next].from < until) steps.push(history[next++]);
  };
  sorted.forEach(({ at, celsius, humidityPercent }, k) => {
    const following = sorted.at(k + 1)?.at ?? Infinity;
    const until = Math.min(following, at + LONGEST_READING_GAP_MINUTES);
    copyUntil(at);
    steps.push({ from: at, celsius, humidityPercent });
    while (next < history.length && history[next].from < until) next += 1;
    if (until < following) {
      const under = history[Math.max(0, next - 1)];
      steps.push({ ...under, from: until });
    }
  });
  copyUntil(Infinity);
  return withoutRepeats(steps);
}

/** Gaps between readings that are longer than a log may leave, as spans. */
export function readingGaps(readings: readonly ClimateReading[]): Span[] {
  const sorted = [...readings].sort((a, b) => a.at - b.at);
  return sorted.slice(1).flatMap(({ at }, k) => {
    const before = sorted[k].at;
    return at - before > LONGEST_READING_GAP_MINUTES ? [{ start: before, end: at }] : [];
  });
}

function unheated(profile: ClimateProfile, day: CalendarDay): Climate {
  const ofYear = (dayNumber(day) - dayNumber(`${day.slice(0, 4)}-01-01`) - MID_WINTER_DAY) / DAYS_A_YEAR;
  const summer = (1 - Math.cos(2 * Math.PI * ofYear)) / 2;
  const between = (winter: number, warm: number): number => Math.round(10 * (winter + (warm - winter) * summer)) / 10;
  return {
    celsius: between(profile.winterCelsius, profile.summerCelsius),
    humidityPercent: between(profile.winterHumidityPercent, profile.summerHumidityPercent),
  };
}

/** Air warmed to a temperature at least, by the ratio of saturation pressures (Magnus form, WMO-No. 8, annex 4.B). */
function lifted(base: Climate, celsius: number | null): Climate {
  if (celsius === null || celsius <= base.celsius) return base;
  const saturation = (t: number): number => Math.exp((17.62 * t) / (243.12 + t));
  const humidityPercent = (base.humidityPercent * saturation(base.celsius)) / saturation(celsius);
  return { celsius, humidityPercent: Math.round(10 * humidityPercent) / 10 };
}

function weekdayOf(day: CalendarDay): Weekday {
  // Day 0, 1 January 1970, was a Thursday.
  return WEEKDAYS[(dayNumber(day) + 3) % WEEKDAYS.length];
}

/** The last of several steps at one instant, and none that changes nothing. */
function withoutRepeats(steps: readonly ClimateStep[]): ClimateHistory {
  const kept: ClimateStep[] = [];
  for (const step of steps) {
    if (kept.at(-1)?.from === step.from) kept.pop();
    const before = kept.at(-1);
    if (before?.celsius !== step.celsius || before.humidityPercent !== step.humidityPercent) kept.push(step);
  }
  return kept;
}
