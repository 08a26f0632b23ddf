import * as fc from 'fast-check';
import { availableSpans } from './availability';
import { expandPatterns, type Pattern, patternFault } from './pattern';
import { clipSpans, intersectSpans, totalMinutes } from './span-list';
import { dayRangeSpan } from './calendar-day';

const LONDON = 'Europe/London';
const at = (text: string) => Date.parse(`${text}Z`) / 60_000;
const span = (start: string, end: string) => ({ start: at(start), end: at(end) });

const pattern = (given: Partial<Pattern>): Pattern => ({
  firstDay: '2026-01-01',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  startMinuteOfDay: 8 * 60 + 30,
  lengthMinutes: 8 * 60,
  exceptDays: [],
  ...given,
});

describe('patterns', () => {
  it('keep to the clock on the wall when the clocks change', () => {
    const spans = expandPatterns([pattern({})], span('2026-03-27T00:00', '2026-03-31T00:00'), LONDON);
    expect(spans).toEqual([span('2026-03-27T08:30', '2026-03-27T16:30'), span('2026-03-30T07:30', '2026-03-30T15:30')]);
  });

  it('lose and gain the hour of a night on which the clocks change', () => {
    const nights = pattern({ rule: 'FREQ=DAILY', startMinuteOfDay: 22 * 60 });
    const night = (day: string, next: string) =>
      expandPatterns([nights], span(`${day}T12:00`, `${next}T12:00`), LONDON);
    expect(totalMinutes(night('2026-03-27', '2026-03-28'))).toBe(8 * 60);
    expect(totalMinutes(night('2026-03-28', '2026-03-29'))).toBe(7 * 60);
    expect(totalMinutes(night('2026-10-24', '2026-10-25'))).toBe(9 * 60);
  });

  it('reach into a frame from the evening before it', () => {
    const nights = pattern({ rule: 'FREQ=DAILY', startMinuteOfDay: 22 * 60 });
    expect(expandPatterns([nights], span('2026-01-10T00:00', '2026-01-10T12:00'), LONDON)).toEqual([
      span('2026-01-10T00:00', '2026-01-10T06:00'),
    ]);
  });

  it('leave out exceptions and begin no earlier than their first day', () => {
    const weekdays = pattern({ firstDay: '2026-06-02', exceptDays: ['2026-06-04'] });
    const spans = expandPatterns([weekdays], span('2026-06-01T00:00', '2026-06-06T00:00'), LONDON);
    expect(spans.map(({ start }) => new Date(start * 60_000).toISOString().slice(0, 16))).toEqual([
      '2026-06-02T07:30',
      '2026-06-03T07:30',
      '2026-06-05T07:30',
    ]);
  });

  it('fall on a leap day', () => {
    const monthEnds = pattern({ firstDay: '2024-01-01', rule: 'FREQ=MONTHLY;BYMONTHDAY=-1' });
    expect(expandPatterns([monthEnds], span('2024-02-01T00:00', '2024-03-01T00:00'), LONDON)).toEqual([
      span('2024-02-29T08:30', '2024-02-29T16:30'),
    ]);
  });

  it('melt together where two overlap', () => {
    const long = pattern({ startMinuteOfDay: 12 * 60 });
    expect(expandPatterns([pattern({}), long], span('2026-06-01T00:00', '2026-06-02T00:00'), 'UTC')).toEqual([
      span('2026-06-01T08:30', '2026-06-01T20:00'),
    ]);
  });

  it('are told their faults in sentences', () => {
    expect(patternFault(pattern({}))).toBeNull();
    expect(patternFault(pattern({ firstDay: '2026-02-30' }))).toContain('2026-02-30');
    expect(patternFault(pattern({ lengthMinutes: 0 }))).toContain('one minute');
    expect(patternFault(pattern({ startMinuteOfDay: 1440 }))).toContain('23:59');
    expect(patternFault(pattern({ rule: 'FREQ=NEVER' }))).toContain('NEVER');
  });
});

describe('availability', () => {
  const patterns = fc.array(
    fc.record({
      firstDay: fc.constantFrom('2026-01-01', '2026-03-02', '2026-10-20'),
      rule: fc.constantFrom(
        'FREQ=DAILY',
        'FREQ=WEEKLY;BYDAY=MO,WE,FR',
        'FREQ=WEEKLY;INTERVAL=2;BYDAY=FR',
        'FREQ=MONTHLY;BYDAY=1MO',
      ),
      startMinuteOfDay: fc.integer({ min: 0, max: 1439 }),
      lengthMinutes: fc.integer({ min: 1, max: 1440 }),
      exceptDays: fc.constant<string[]>([]),
    }),
    { maxLength: 3 },
  );
  const zones = fc.constantFrom(LONDON, 'America/New_York', 'Australia/Lord_Howe');

  it('has no minute on a day away', () => {
    const frame = span('2026-03-20T00:00', '2026-04-10T00:00');
    fc.assert(
      fc.property(patterns, zones, fc.integer({ min: 20, max: 31 }), (list, zone, date) => {
        const away = [{ from: `2026-03-${date}`, until: '2026-04-02' }];
        const there = availableSpans({ patterns: list, away }, frame, zone);
        expect(intersectSpans(there, [dayRangeSpan(away[0], zone)])).toEqual([]);
      }),
    );
  });

  it('is the same whether a long frame is clipped or a short one is expanded', () => {
    const long = span('2026-03-01T00:00', '2026-11-30T00:00');
    fc.assert(
      fc.property(
        patterns,
        zones,
        fc.integer({ min: 0, max: 380_000 }),
        fc.integer({ min: 1, max: 9000 }),
        (list, zone, from, length) => {
          const short = { start: long.start + from, end: Math.min(long.end, long.start + from + length) };
          expect(expandPatterns(list, short, zone)).toEqual(clipSpans(expandPatterns(list, long, zone), short));
        },
      ),
      { numRuns: 60 },
    );
  });
});
