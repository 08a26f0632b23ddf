import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel, MatSuffix } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { controlErrors } from './control-errors';
import { FieldErrorPipe } from './field-errors';
import { type FigureReader, ReadsText, WHOLE } from './reads-text';

/** A figure, typed the way people write it: hours, money, a number. Its control holds a number, or null for none. */
@Component({
  selector: 'fettle-figure-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldErrorPipe,
    MatError,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    MatSuffix,
    ReactiveFormsModule,
    ReadsText,
  ],
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <input
        matInput
        class="figures"
        type="text"
        [fettleReads]="reader()"
        [formControl]="control()"
        [required]="needed()"
      />
      @if (unit()) {
        <span matTextSuffix>&nbsp;{{ unit() }}</span>
      }
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
export class FigureField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<number | null>>();
  readonly reader = input<FigureReader>(WHOLE);
  /** What the figure counts, written behind it. */
  readonly unit = input('');
  readonly hint = input('');

  protected readonly errors = controlErrors(this.control);

  protected needed(): boolean {
    return this.control().hasValidator(Validators.required);
  }
}
