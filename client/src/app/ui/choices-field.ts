import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatOption, MatSelect } from '@angular/material/select';
import type { Choice } from './choice-field';
import { controlErrors } from './control-errors';
import { FieldErrorPipe } from './field-errors';

/** Any number of several things to choose. */
@Component({
  selector: 'fettle-choices-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FieldErrorPipe, MatError, MatFormField, MatHint, MatLabel, MatOption, MatSelect, ReactiveFormsModule],
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <mat-select multiple [formControl]="control()" [required]="needed()">
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
export class ChoicesField<T> {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<T[]>>();
  readonly choices = input.required<readonly Choice<T>[]>();
  readonly hint = input('');
  protected readonly errors = controlErrors(this.control);

  protected needed(): boolean {
    return this.control().hasValidator(Validators.required);
  }
}
