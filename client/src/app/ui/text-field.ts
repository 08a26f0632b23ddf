import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { controlErrors } from './control-errors';
import { FieldErrorPipe } from './field-errors';

/** One line of text, or a calendar day or a clock reading in the browser's own picker. */
@Component({
  selector: 'fettle-text-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FieldErrorPipe, MatError, MatFormField, MatHint, MatInput, MatLabel, ReactiveFormsModule],
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <input
        matInput
        [type]="type()"
        [formControl]="control()"
        [required]="needed()"
        [autocomplete]="autocomplete()"
        [attr.maxlength]="longest()"
      />
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
export class TextField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string> | FormControl<string | null>>();
  readonly type = input<'text' | 'email' | 'password' | 'date' | 'time'>('text');
  readonly hint = input('');
  readonly autocomplete = input('off');
  /** Most characters; null for no limit of its own. */
  readonly longest = input<number | null>(null);

  protected readonly errors = controlErrors(this.control);

  protected needed(): boolean {
    return this.control().hasValidator(Validators.required);
  }
}
