import { FormArray } from '@angular/forms';
import { patternOf, patternRow, usualPattern } from './pattern-form';
import { minutesBetween, ruleFault, ruleOfShape, sayPattern, shapeOfRule } from './say-rule';
import { weekOf } from './week-of';

const week = usualPattern('2026-11-30');

// Rules as in RFC 5545 section 3.3.10.
describe('patterns', () => {
  it('know the two usual shapes of a rule, and leave others as they stand', () => {
    expect(shapeOfRule('FREQ=WEEKLY;BYDAY=MO,FR')).toEqual({ shape: 'weekly', days: ['MO', 'FR'] });
    expect(shapeOfRule('FREQ=WEEKLY;INTERVAL=2;BYDAY=SA')).toEqual({ shape: 'alternate', days: ['SA'] });
    expect(shapeOfRule('FREQ=MONTHLY;BYDAY=1SA').shape).toBe('rule');
    expect(shapeOfRule('FREQ=WEEKLY;INTERVAL=3;BYDAY=SA').shape).toBe('rule');
  });

  it('write the days of a rule in the order of the week', () => {
    expect(ruleOfShape('alternate', ['FR', 'MO'])).toBe('FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,FR');
  });

  it('count hours over midnight', () => {
    expect(minutesBetween('08:00', '16:30')).toBe(510);
    expect(minutesBetween('22:00', '06:00')).toBe(480);
  });

  it('say what is wrong with a rule typed by hand', () => {
    expect(ruleFault('freq=weekly;byday=mo')).toBeNull();
    expect(ruleFault('FREQ=SOMETIMES')).toEqual(expect.any(String));
  });

  it('come out of their form as they went in', () => {
    for (const pattern of [
      week,
      { ...week, rule: 'FREQ=MONTHLY;BYDAY=1SA', exceptDays: ['2026-12-05'] },
      { ...week, startMinuteOfDay: 22 * 60, lengthMinutes: 480, kind: 'overtime' as const },
    ]) {
      expect(patternOf(patternRow(pattern))).toEqual(pattern);
    }
  });

  it('want at least one day, and days that are days', () => {
    const row = patternRow(week);
    row.controls.days.setValue([]);
    expect(row.valid).toBe(false);
    row.controls.days.setValue(['MO']);
    row.controls.exceptDays.setValue('tomorrow');
    expect(row.valid).toBe(false);
    row.controls.exceptDays.setValue('2026-12-24, 2026-12-31');
    expect(new FormArray([row]).valid).toBe(true);
  });

  it('are told in words', () => {
    expect(sayPattern({ ...week, rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=SA', kind: 'overtime' })).toBe(
      'Sat 08:00–16:00, every other week, overtime if asked',
    );
  });
});

describe('weekOf', () => {
  it('gives seven days with shifts, overtime beside them, and what keeps somebody away', () => {
    const overtime = { ...week, rule: 'FREQ=WEEKLY;BYDAY=MO', startMinuteOfDay: 15 * 60, lengthMinutes: 180 };
    const away = [{ days: { from: '2026-12-01', until: '2026-12-02' }, word: 'Leave' }];
    const days = weekOf([week, { ...overtime, kind: 'overtime' }], away, '2026-11-30', 'Europe/London');
    expect(days).toHaveLength(7);
    expect(days[0]).toEqual({
      day: '2026-11-30',
      minutes: 480,
      shifts: ['08:00–16:00'],
      overtime: ['16:00–18:00'],
      away: '',
    });
    expect(days[1]).toMatchObject({ minutes: 0, shifts: [], away: 'Leave' });
    expect(days[5]).toMatchObject({ minutes: 0, away: '' });
  });

  // Europe/London clocks go forward on 29 March 2026 at 01:00 UTC (IANA time zone database).
  it('loses an hour of the night on which the clocks go forward', () => {
    const night = {
      ...usualPattern('2026-03-23'),
      rule: 'FREQ=WEEKLY;BYDAY=SU',
      startMinuteOfDay: 0,
      lengthMinutes: 360,
    };
    const [, , , , , , sunday] = weekOf([night], [], '2026-03-23', 'Europe/London');
    expect(sunday.minutes).toBe(300);
    expect(sunday.shifts).toEqual(['00:00–06:00']);
  });
});
