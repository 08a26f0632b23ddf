import {
  type AbstractControl,
  type FormArray,
  FormControl,
  FormGroup,
  type ValidationErrors,
  Validators,
} from '@angular/forms';
import type { Pattern } from '@common/contract';
import { isCalendarDay } from '@common/time/calendar-day';
import { localTimeOf, minuteOfDay } from '@common/time/local-time';
import { must, SENTENCE } from '../field-errors';
import { endOf, minutesBetween, type PatternShape, ruleFault, ruleOfShape, shapeOfRule } from './say-rule';

/** The usual week, from which a new pattern starts. */
export function usualPattern(firstDay: string): Pattern {
  return {
    firstDay,
    rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
    startMinuteOfDay: 8 * 60,
    lengthMinutes: 8 * 60,
    exceptDays: [],
    kind: 'ordinary',
  };
}

/** The form of one pattern. */
export function patternRow(pattern: Pattern) {
  const { shape, days } = shapeOfRule(pattern.rule);
  return new FormGroup(
    {
      kind: new FormControl(pattern.kind, { nonNullable: true }),
      shape: new FormControl<PatternShape>(shape, { nonNullable: true }),
      days: new FormControl<string[]>([...days], { nonNullable: true }),
      rule: new FormControl(pattern.rule, { nonNullable: true }),
      from: new FormControl(localTimeOf(pattern.startMinuteOfDay), {
        nonNullable: true,
        validators: Validators.required,
      }),
      until: new FormControl(endOf(pattern), { nonNullable: true, validators: Validators.required }),
      firstDay: new FormControl(pattern.firstDay, { nonNullable: true, validators: Validators.required }),
      exceptDays: new FormControl(pattern.exceptDays.join(', '), {
        nonNullable: true,
        validators: must((text: string) => daysIn(text).every(isCalendarDay), 'Write days as 2026-12-24, 2026-12-31.'),
      }),
    },
    { validators: rowFault },
  );
}

/** The form of one pattern. */
export type PatternRow = ReturnType<typeof patternRow>;
/** The form of several patterns. */
export type PatternRows = FormArray<PatternRow>;

/** The pattern that a row says; the row is to be valid. */
export function patternOf(row: PatternRow): Pattern {
  const raw = row.getRawValue();
  return {
    firstDay: raw.firstDay,
    rule: raw.shape === 'rule' ? raw.rule.trim().toUpperCase() : ruleOfShape(raw.shape, raw.days),
    startMinuteOfDay: minuteOfDay(raw.from),
    lengthMinutes: minutesBetween(raw.from, raw.until),
    exceptDays: daysIn(raw.exceptDays),
    kind: raw.kind,
  };
}

function rowFault(row: AbstractControl): ValidationErrors | null {
  const { shape, days, rule } = row.value as { shape: PatternShape; days: readonly string[]; rule: string };
  const sentence = shape === 'rule' ? ruleFault(rule) : days.length === 0 ? 'Choose at least one day.' : null;
  return sentence === null ? null : { [SENTENCE]: sentence };
}

function daysIn(text: string): string[] {
  return text.split(/[\s,;]+/).filter((day) => day !== '');
}
