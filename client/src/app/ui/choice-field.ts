import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { type FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatOption, MatSelect } from '@angular/material/select';
import { controlErrors } from './control-errors';
import { FieldErrorPipe } from './field-errors';

/** One thing to choose, and what it is called. */
export interface Choice<T> {
  readonly value: T;
  readonly label: string;
}

/** One of several things to choose. */
@Component({
  selector: 'fettle-choice-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FieldErrorPipe, MatError, MatFormField, MatHint, MatLabel, MatOption, MatSelect, ReactiveFormsModule],
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <mat-select [formControl]="control()" [required]="needed()" (selectionChange)="chosen.emit()">
        @for (one of choices(); track one.value) {
          <mat-option [value]="one.value">{{ one.label }}</mat-option>
        }
      </mat-select>
      @if (hint()) {
        <mat-hint>{{ hint() }}</mat-hint>
      }
      @if (errors(); as wrong) {
        <mat-error>{{ wrong | fieldError }}</mat-error>
      }
    </mat-form-field>
  `,
  styles: `
    mat-form-field {
      width: 100%;
    }
  `,
})
export class ChoiceField<T> {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<T> | FormControl<T | null>>();
  readonly choices = input.required<readonly Choice<T>[]>();
  readonly hint = input('');
  /** A person chose, rather than the form being filled in. */
  readonly chosen = output();

  protected readonly errors = controlErrors(this.control);

  protected needed(): boolean {
    return this.control().hasValidator(Validators.required);
  }
}

/** Choices from a record of names. */
export function choicesOf<K extends string>(names: Readonly<Record<K, string>>): readonly Choice<K>[] {
  return (Object.entries(names) as [K, string][]).map(([value, label]) => ({ value, label }));
}
