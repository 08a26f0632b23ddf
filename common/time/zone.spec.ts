import * as fc from 'fast-check';
import {
  addDays,
  dayOfInstant,
  daySpan,
  daySpansIn,
  isCalendarDay,
  mondayOf,
  startOfDay,
  weekdayOf,
} from './calendar-day';
import { formatDay, formatDayAndTime, formatInstant, formatMinutes } from './format-instant';
import { spanMinutes } from './span';
import { instantOfLocal, isZone, localOfInstant } from './zone';

/** Reads an ISO text as minutes; with Z an instant, and so it stands for the reading of a wall that shows UTC. */
const at = (text: string) => Date.parse(`${text}Z`) / 60_000;

const zones = fc.constantFrom(
  'Europe/London',
  'America/New_York',
  'America/St_Johns',
  'Australia/Lord_Howe',
  'America/Sao_Paulo',
  'Asia/Kathmandu',
  'UTC',
);
const instants = fc.integer({ min: at('2000-01-01T00:00'), max: at('2037-01-01T00:00') });

describe('zones', () => {
  // RFC 5545 section 3.3.5, the two examples under form 3.
  it('takes the first of two readings when clocks go back', () => {
    expect(instantOfLocal(at('2007-11-04T01:30'), 'America/New_York')).toBe(at('2007-11-04T05:30'));
  });

  it('reads a time that never comes by the offset before the gap', () => {
    expect(instantOfLocal(at('2007-03-11T02:30'), 'America/New_York')).toBe(at('2007-03-11T07:30'));
  });

  it('gives back the reading of every instant, and the instant but for the second hour when clocks go back', () => {
    fc.assert(
      fc.property(instants, zones, (instant, zone) => {
        const again = instantOfLocal(localOfInstant(instant, zone), zone);
        expect(localOfInstant(again, zone)).toBe(localOfInstant(instant, zone));
        expect(instant - again).toBeGreaterThanOrEqual(0);
        expect(instant - again).toBeLessThanOrEqual(60);
      }),
    );
  });

  it('knows zones by their names', () => {
    expect(isZone('Europe/London')).toBe(true);
    expect(isZone('Europe/Lond')).toBe(false);
    expect(() => localOfInstant(0, 'Europe/Lond')).toThrow('Europe/Lond');
  });
});

describe('calendar days', () => {
  // Dates of the changes in Great Britain: the Summer Time Act 1972 as amended 2002, last Sundays of March and October, 01:00 UTC.
  it('is 23 hours long when clocks go forward and 25 when they go back', () => {
    expect(spanMinutes(daySpan('2026-03-29', 'Europe/London'))).toBe(23 * 60);
    expect(spanMinutes(daySpan('2026-10-25', 'Europe/London'))).toBe(25 * 60);
    expect(spanMinutes(daySpan('2026-10-26', 'Europe/London'))).toBe(24 * 60);
  });

  // From memory: Brazil went forward at midnight, so 4 November 2018 began at 01:00 in São Paulo, which is 03:00 UTC.
  it('begins after the gap where clocks skip midnight', () => {
    expect(startOfDay('2018-11-04', 'America/Sao_Paulo')).toBe(at('2018-11-04T03:00'));
  });

  it('tells leap days by the Gregorian rule', () => {
    expect(
      ['2024-02-29', '2000-02-29', '2026-02-29', '2100-02-29', '2026-13-01', '2026-1-1'].map(isCalendarDay),
    ).toEqual([true, true, false, false, false, false]);
    expect(addDays('2024-02-28', 1)).toBe('2024-02-29');
    expect(addDays('2026-02-28', 1)).toBe('2026-03-01');
  });

  // ISO 8601:2004 section 3.2.1: 1 January 2000 was a Saturday.
  it('counts weekdays from Monday', () => {
    expect(weekdayOf('2000-01-01')).toBe(6);
    expect(mondayOf('2000-01-01')).toBe('1999-12-27');
    expect(mondayOf('2026-11-30')).toBe('2026-11-30');
  });

  it('covers a frame with days that meet end to start', () => {
    fc.assert(
      fc.property(instants, fc.integer({ min: 1, max: 20_000 }), zones, (start, length, zone) => {
        const frame = { start, end: start + length };
        const days = daySpansIn(frame, zone);
        expect(days[0].start).toBeLessThanOrEqual(frame.start);
        expect(days[0].end).toBeGreaterThan(frame.start);
        expect(days.at(-1)?.end).toBeGreaterThanOrEqual(frame.end);
        expect(days.at(-1)?.start).toBeLessThan(frame.end);
        days.forEach((day, i) => {
          expect(dayOfInstant(day.start, zone)).toBe(day.day);
          expect(dayOfInstant(day.end - 1, zone)).toBe(day.day);
          if (i > 0) {
            expect(day.start).toBe(days[i - 1].end);
          }
        });
      }),
    );
  });
});

describe('formatting', () => {
  it('writes weekday and clock in the zone that is named', () => {
    expect(formatInstant(at('2026-06-02T08:10'), 'Europe/London')).toBe('Tue 09:10');
    expect(formatInstant(at('2026-06-02T23:10'), 'Europe/London')).toBe('Wed 00:10');
    expect(formatDayAndTime(at('2026-12-01T09:10'), 'Europe/London')).toBe('Tue 1 Dec 09:10');
    expect(formatDay('2026-12-01')).toBe('Tue 1 Dec');
  });

  it('writes lengths of time', () => {
    expect([45, 60, 200, 1440, 3120, -90, 0].map(formatMinutes)).toEqual([
      '45 min',
      '1 h',
      '3 h 20 min',
      '1 d',
      '2 d 4 h',
      '−1 h 30 min',
      '0 min',
    ]);
  });
});
