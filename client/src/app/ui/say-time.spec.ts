import fc from 'fast-check';
import {
  fromDayAndTime,
  readClockTime,
  readHours,
  sayDayAndTime,
  sayDays,
  sayHours,
  toDayAndTime,
  writeClockTime,
  writeHours,
} from './say-time';

// Source of the notation: common practice in workshops, no published source.
describe('hours', () => {
  it.each([
    ['7.5', 450],
    ['7,5', 450],
    ['7:30', 450],
    ['7 h 30', 450],
    ['7h30', 450],
    ['7 h', 420],
    ['45 min', 45],
    ['0', 0],
  ])('reads %s', (text, minutes) => {
    expect(readHours(text)).toBe(minutes);
  });

  it.each(['', 'seven', '7.5.5', '-1', '1e3', '7 h 30 h'])('does not read “%s”', (text) => {
    expect(readHours(text)).toBeNull();
  });

  it.each([
    [450, '7 h 30'],
    [45, '45 min'],
    [0, '0 h'],
    [65, '1 h 05'],
    [-90, '−1 h 30'],
    [2400, '40 h'],
  ])('says %i min as %s', (minutes, text) => {
    expect(sayHours(minutes)).toBe(text);
  });

  it('reads back whatever it writes', () => {
    fc.assert(fc.property(fc.nat(500_000), (minutes) => readHours(writeHours(minutes)) === minutes));
  });
});

describe('time by the clock', () => {
  it.each([
    ['2 d 4 h', 3120],
    ['36 h', 2160],
    ['90 min', 90],
    ['1.5 d', 2160],
    ['24', 1440],
    ['1 h 30 min', 90],
  ])('reads %s', (text, minutes) => {
    expect(readClockTime(text)).toBe(minutes);
  });

  it.each(['two days', '4 weeks', 'h'])('does not read “%s”', (text) => {
    expect(readClockTime(text)).toBeNull();
  });

  it('reads back whatever it writes', () => {
    fc.assert(fc.property(fc.nat(5_256_000), (minutes) => readClockTime(writeClockTime(minutes)) === minutes));
  });
});

describe('instants', () => {
  // Offsets of the IANA time zone database: London is UTC+1 in July, New York UTC−4.
  it('are told in a named zone', () => {
    expect(sayDayAndTime('2026-07-14T08:10:00Z', 'Europe/London')).toBe('Tue 14 Jul 09:10');
    expect(sayDayAndTime('2026-07-14T08:10:00Z', 'America/New_York')).toBe('Tue 14 Jul 04:10');
  });

  it('come back from day and clock reading, on both sides of a change of clocks', () => {
    for (const instant of ['2026-03-28T10:00:00.000Z', '2026-03-30T10:00:00.000Z', '2026-10-25T12:00:00.000Z']) {
      const { day, time } = toDayAndTime(instant, 'Europe/London');
      expect(fromDayAndTime(day, time, 'Europe/London')).toBe(instant);
    }
  });

  it('are none where the day or the reading is none', () => {
    expect(fromDayAndTime('', '10:00', 'Europe/London')).toBeNull();
    expect(fromDayAndTime('2026-12-01', '25:00', 'Europe/London')).toBeNull();
  });
});

describe('days', () => {
  it('are told by the first and the last that are inside', () => {
    expect(sayDays({ from: '2026-12-24', until: '2026-12-28' }, '2026')).toBe('Thu 24 Dec – Sun 27 Dec');
    expect(sayDays({ from: '2026-12-24', until: '2026-12-25' }, '2026')).toBe('Thu 24 Dec');
    expect(sayDays({ from: '2027-01-01', until: '2027-01-02' }, '2026')).toBe('Fri 1 Jan 2027');
  });
});
