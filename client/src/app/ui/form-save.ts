import { signal } from '@angular/core';
import { FormArray, type FormControl, FormGroup } from '@angular/forms';
import { toApiFailure } from '../api';
import { showFaults } from './field-errors';

/** The saving of one form: whether it is under way, and what it says where it did not go well. */
export class FormSave {
  private readonly underWay = signal(false);
  private readonly words = signal<readonly string[]>([]);

  readonly busy = this.underWay.asReadonly();
  /** Sentences that belong to the form and to none of its fields. */
  readonly messages = this.words.asReadonly();

  /**
   * Runs the saving where the form is filled in rightly, and puts what the server finds wrong beside its fields. Gives what the
   * saving gave; undefined where it was not done.
   */
  async run<T>(
    form: FormGroup | FormArray,
    save: () => Promise<T>,
    place?: (path: readonly string[]) => readonly string[],
  ): Promise<T | undefined> {
    if (this.underWay()) {
      return undefined;
    }
    if (form.invalid) {
      touchAll(form);
      this.words.set(['Some fields need another look.']);
      return undefined;
    }
    this.underWay.set(true);
    this.words.set([]);
    try {
      return await save();
    } catch (error) {
      const failure = toApiFailure(error);
      const placeless = showFaults(form, failure.faults, place).map((fault) => fault.detail);
      this.words.set(
        failure.faults.length > 0 && placeless.length === 0 ? [failure.detail] : [failure.detail, ...placeless],
      );
      return undefined;
    } finally {
      this.underWay.set(false);
    }
  }

  /** Says something of one's own about the form. */
  say(sentence: string): void {
    this.words.set([sentence]);
  }
}

/** Marks each control by itself, so that every field hears of it. */
function touchAll(form: FormGroup | FormArray): void {
  const controls = Object.values(form.controls) as (FormGroup | FormArray | FormControl)[];
  for (const control of controls) {
    control.markAsTouched();
    if (control instanceof FormGroup || control instanceof FormArray) {
      touchAll(control);
    }
  }
}
