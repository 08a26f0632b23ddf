import * as fc from 'fast-check';
import ICAL from 'ical.js';
import { addDays } from './calendar-day';
import { recurrenceDays, recurrenceInstants, recurrenceRuleFault, type RecurrenceStart } from './recurrence-rule';

const NEW_YORK = 'America/New_York';
const EVER = { from: '1990-01-01', until: '2010-01-01' };

function startAtNine(day: string): RecurrenceStart {
  return { day, minuteOfDay: 9 * 60, zone: NEW_YORK };
}

/** Occurrences at 09:00 in New York as UTC text; 13Z is summer time, 14Z winter time. */
function expand(rule: string, day: string): string[] {
  return recurrenceInstants(rule, startAtNine(day), EVER).map((minute) =>
    new Date(minute * 60_000).toISOString().slice(0, 13),
  );
}

function days(text: string, hour: string): string[] {
  return text
    .trim()
    .split(/\s+/)
    .map((day) => `${day}T${hour}`);
}

describe('RFC 5545 section 3.8.5.3, examples for America/New_York', () => {
  it('weekly for 10 occurrences, over the change to winter time', () => {
    expect(expand('FREQ=WEEKLY;COUNT=10', '1997-09-02')).toEqual([
      ...days('1997-09-02 1997-09-09 1997-09-16 1997-09-23 1997-09-30 1997-10-07 1997-10-14 1997-10-21', '13'),
      ...days('1997-10-28 1997-11-04', '14'),
    ]);
  });

  it('every other week on Monday, Wednesday and Friday until 24 December 1997', () => {
    const rule = 'FREQ=WEEKLY;INTERVAL=2;UNTIL=19971224T000000Z;WKST=SU;BYDAY=MO,WE,FR';
    const found = expand(rule, '1997-09-01');
    expect(found).toEqual([
      ...days('1997-09-01 1997-09-03 1997-09-05 1997-09-15 1997-09-17 1997-09-19 1997-09-29', '13'),
      ...days('1997-10-01 1997-10-03 1997-10-13 1997-10-15 1997-10-17', '13'),
      ...days('1997-10-27 1997-10-29 1997-10-31 1997-11-10 1997-11-12 1997-11-14', '14'),
      ...days('1997-11-24 1997-11-26 1997-11-28 1997-12-08 1997-12-10 1997-12-12 1997-12-22', '14'),
    ]);
    expect(found).toHaveLength(25);
  });

  it('monthly on the first Friday for 10 occurrences', () => {
    expect(expand('FREQ=MONTHLY;COUNT=10;BYDAY=1FR', '1997-09-05')).toEqual([
      ...days('1997-09-05 1997-10-03', '13'),
      ...days('1997-11-07 1997-12-05 1998-01-02 1998-02-06 1998-03-06 1998-04-03', '14'),
      ...days('1998-05-01 1998-06-05', '13'),
    ]);
  });

  it('monthly on the second-to-last Monday for 6 months', () => {
    expect(expand('FREQ=MONTHLY;COUNT=6;BYDAY=-2MO', '1997-09-22')).toEqual([
      ...days('1997-09-22 1997-10-20', '13'),
      ...days('1997-11-17 1997-12-22 1998-01-19 1998-02-16', '14'),
    ]);
  });

  it('depends on the day a week begins where the interval is longer than one', () => {
    const rule = 'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU';
    expect(expand(`${rule};WKST=MO`, '1997-08-05')).toEqual(days('1997-08-05 1997-08-10 1997-08-19 1997-08-24', '13'));
    expect(expand(`${rule};WKST=SU`, '1997-08-05')).toEqual(days('1997-08-05 1997-08-17 1997-08-19 1997-08-31', '13'));
  });

  it('the third instance of Tuesday, Wednesday or Thursday, for 3 months', () => {
    expect(expand('FREQ=MONTHLY;COUNT=3;BYDAY=TU,WE,TH;BYSETPOS=3', '1997-09-04')).toEqual([
      ...days('1997-09-04 1997-10-07', '13'),
      ...days('1997-11-06', '14'),
    ]);
  });

  it('leaves out a date that does not exist, such as 30 February', () => {
    expect(expand('FREQ=MONTHLY;BYMONTHDAY=15,30;COUNT=5', '2007-01-15')).toEqual([
      ...days('2007-01-15 2007-01-30 2007-02-15', '14'),
      ...days('2007-03-15 2007-03-30', '13'),
    ]);
  });

  it('every 10 days, 5 occurrences', () => {
    expect(expand('FREQ=DAILY;INTERVAL=10;COUNT=5', '1997-09-02')).toEqual(
      days('1997-09-02 1997-09-12 1997-09-22 1997-10-02 1997-10-12', '13'),
    );
  });
});

describe('the end of a rule', () => {
  // RFC 5545 section 3.3.10: UNTIL bounds the rule inclusively, and is in UTC beside a zoned start.
  it('is read in UTC and includes an occurrence at that very instant', () => {
    const last = (until: string) => expand(`FREQ=DAILY;UNTIL=${until}`, '1997-09-02').at(-1);
    expect(last('19970905T130000Z')).toBe('1997-09-05T13');
    expect(last('19970905T125900Z')).toBe('1997-09-04T13');
  });

  // Common practice, no source: people write the last day.
  it('includes the whole of a bare date', () => {
    expect(expand('FREQ=DAILY;UNTIL=19970905', '1997-09-02').at(-1)).toBe('1997-09-05T13');
  });
});

describe('faults of a rule', () => {
  it.each([
    ['FREQ=HOURLY', 'FREQ'],
    ['BYDAY=MO', 'FREQ'],
    ['FREQ=WEEKLY;BYDAY=MX', 'MX'],
    ['FREQ=WEEKLY;BYHOUR=9', 'BYHOUR'],
    ['FREQ=WEEKLY;INTERVAL=0', 'INTERVAL'],
    ['FREQ=WEEKLY;COUNT=2;UNTIL=20260101', 'both'],
    ['FREQ=WEEKLY;FREQ=DAILY', 'twice'],
    ['FREQ=YEARLY;BYMONTH=13', 'BYMONTH'],
    ['', 'not a part'],
  ])('are told for “%s”', (rule, word) => {
    expect(recurrenceRuleFault(rule)).toContain(word);
    expect(() => recurrenceDays(rule, startAtNine('2026-01-01'), EVER)).toThrow(RangeError);
  });

  it('are none for every rule of the examples above', () => {
    expect(recurrenceRuleFault('FREQ=WEEKLY;INTERVAL=2;UNTIL=19971224T000000Z;WKST=SU;BYDAY=MO,WE,FR')).toBeNull();
    expect(recurrenceRuleFault('FREQ=MONTHLY;BYDAY=-2MO;BYMONTHDAY=1,-1;BYSETPOS=-1')).toBeNull();
  });
});

describe('beside a general-purpose library', () => {
  const weekdays = fc.uniqueArray(fc.constantFrom('MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'), {
    minLength: 1,
    maxLength: 4,
  });
  const rules = fc.oneof(
    fc
      .tuple(weekdays, fc.integer({ min: 1, max: 5 }), fc.constantFrom('MO', 'SU'))
      .map(
        ([byDay, interval, weekStart]) => `FREQ=WEEKLY;INTERVAL=${interval};BYDAY=${byDay.join()};WKST=${weekStart}`,
      ),
    fc.integer({ min: 1, max: 40 }).map((interval) => `FREQ=DAILY;INTERVAL=${interval}`),
    fc
      .tuple(fc.constantFrom(1, 2, 3, 4, -1, -2), fc.constantFrom('MO', 'WE', 'SU'))
      .map(([nth, day]) => `FREQ=MONTHLY;BYDAY=${nth}${day}`),
    fc
      .uniqueArray(fc.integer({ min: 1, max: 31 }), { minLength: 1, maxLength: 3 })
      .map((dates) => `FREQ=MONTHLY;BYMONTHDAY=${dates.join()}`),
    fc
      .tuple(fc.integer({ min: 1, max: 12 }), fc.constantFrom(1, -1))
      .map(([month, nth]) => `FREQ=YEARLY;BYMONTH=${month};BYDAY=${nth}TU`),
  );

  it('falls on the same days', () => {
    fc.assert(
      fc.property(rules, fc.integer({ min: 0, max: 1500 }), (rule, offset) => {
        const first = addDays('2024-01-01', offset);
        const until = addDays(first, 700);
        const start = { day: first, minuteOfDay: 9 * 60, zone: 'Europe/London' };
        expect(recurrenceDays(rule, start, { from: first, until })).toEqual(daysByIcal(rule, first, until));
      }),
      { numRuns: 300 },
    );
  });

  function daysByIcal(rule: string, first: string, until: string): string[] {
    const found: string[] = [];
    const occurrences = ICAL.Recur.fromString(rule).iterator(
      ICAL.Time.fromJSDate(new Date(`${first}T09:00:00Z`), true),
    );
    for (let next = occurrences.next(); next; next = occurrences.next()) {
      const day = next.toString().slice(0, 10);
      if (day >= until) {
        break;
      }
      found.push(day);
    }
    return found;
  }
});
