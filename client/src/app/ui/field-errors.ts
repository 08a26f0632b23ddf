import { Pipe, type PipeTransform } from '@angular/core';
import { type AbstractControl, FormArray, FormGroup, type ValidationErrors, type ValidatorFn } from '@angular/forms';
import type { FieldFault } from '@common/contract';
import type { z } from 'zod';

/** The error under which a sentence from the server or from a schema of the contract stands on a control. */
export const SENTENCE = 'sentence';

/** A validator from a schema of the contract, so that a rule is written once. Empty text counts as given, null does not. */
export function keeps(schema: z.ZodType): ValidatorFn {
  return (control) => {
    if (control.value === null) {
      return null;
    }
    const parsed = schema.safeParse(control.value);
    return parsed.success ? null : { [SENTENCE]: parsed.error.issues[0].message };
  };
}

/** A validator that says a sentence of one's own where a rule is broken. */
export function must(rule: (value: never) => boolean, sentence: string): ValidatorFn {
  return (control) => (rule(control.value as never) ? null : { [SENTENCE]: sentence });
}

/**
 * Puts the faults that the server found beside the fields that they are about, and gives back those for which the form has no
 * field. A fault goes as soon as its field is changed. `place` may turn a pointer into a path of controls of one's own.
 */
export function showFaults(
  form: FormGroup | FormArray,
  faults: readonly FieldFault[],
  place: (path: readonly string[]) => readonly string[] = (path) => path,
): readonly FieldFault[] {
  return faults.filter((fault) => {
    const control = nearest(form, place(pathOf(fault.pointer)));
    if (control === null) {
      return true;
    }
    control.setErrors({ ...control.errors, [SENTENCE]: fault.detail });
    control.markAsTouched();
    return false;
  });
}

/** The steps of an RFC 6901 JSON pointer. */
function pathOf(pointer: string): readonly string[] {
  return pointer
    .split('/')
    .slice(1)
    .map((step) => step.replace(/~1/g, '/').replace(/~0/g, '~'));
}

/** The control at a path, or the last one on the way there that is a field and not a group. */
function nearest(form: AbstractControl, path: readonly string[]): AbstractControl | null {
  const [step, ...rest] = path;
  if (step === undefined) {
    return form instanceof FormGroup ? null : form;
  }
  const next = form instanceof FormGroup || form instanceof FormArray ? form.get(step) : null;
  if (next === null) {
    return form instanceof FormGroup || form instanceof FormArray ? null : form;
  }
  return nearest(next, rest);
}

/** The sentence to show for what is wrong with a control. */
export function sayError(errors: ValidationErrors | null): string {
  if (errors === null) {
    return '';
  }
  const known: Readonly<Record<string, string>> = {
    required: 'This is needed.',
    email: 'Write the whole e-mail address.',
    matDatepickerParse: 'Write a date such as 14/04/2026.',
    matDatepickerMin: 'That day is too early.',
    matDatepickerMax: 'That day is too late.',
  };
  const sentence: unknown = errors[SENTENCE];
  if (typeof sentence === 'string') {
    return sentence;
  }
  const first = Object.keys(errors)[0];
  const limit = errors[first] as { min?: number; max?: number } | undefined;
  if (first === 'min') {
    return `At least ${limit?.min}.`;
  }
  if (first === 'max') {
    return `At most ${limit?.max}.`;
  }
  return known[first] ?? 'This is not right yet.';
}

/** The sentence for a control's `errors`, for use inside `mat-error`. */
@Pipe({ name: 'fieldError' })
export class FieldErrorPipe implements PipeTransform {
  transform(errors: ValidationErrors | null): string {
    return sayError(errors);
  }
}
