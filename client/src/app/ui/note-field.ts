import { CdkTextareaAutosize } from '@angular/cdk/text-field';
import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { controlErrors } from './control-errors';
import { FieldErrorPipe } from './field-errors';

/** Several lines of text, growing with what is written. */
@Component({
  selector: 'fettle-note-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    CdkTextareaAutosize,
    FieldErrorPipe,
    MatError,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    ReactiveFormsModule,
  ],
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <textarea matInput cdkTextareaAutosize [cdkAutosizeMinRows]="rows()" [formControl]="control()"></textarea>
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
export class NoteField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly hint = input('');
  readonly rows = input(2);

  protected readonly errors = controlErrors(this.control);
}
