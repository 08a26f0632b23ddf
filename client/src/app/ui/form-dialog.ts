import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import type { FormSave } from './form-save';
import { Notice } from './notice';

/** The frame of a form in a dialog: its title, its fields, what went wrong, and the way out. Enter saves. */
@Component({
  selector: 'fettle-form-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, Notice],
  template: `
    <form novalidate (submit)="submit($event)">
      <h2 mat-dialog-title>{{ title() }}</h2>
      <mat-dialog-content>
        <div class="stack fields-above">
          <ng-content />
          @for (sentence of save().messages(); track sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
        </div>
      </mat-dialog-content>
      <mat-dialog-actions>
        <ng-content select="[aside]" />
        <span class="gap"></span>
        <button matButton type="button" mat-dialog-close>Close</button>
        <button matButton="filled" type="submit" [disabled]="save().busy()">
          {{ save().busy() ? 'Saving…' : action() }}
        </button>
      </mat-dialog-actions>
    </form>
  `,
  styles: `
    /* Room for the floating label of a first field. */
    .fields-above {
      padding-top: var(--space-2);
    }
    .gap {
      flex: 1;
    }
  `,
})
export class FormDialog {
  readonly title = input.required<string>();
  readonly save = input.required<FormSave>();
  /** The verb on the button. */
  readonly action = input('Save');
  readonly submitted = output();

  protected submit(event: Event): void {
    event.preventDefault();
    this.submitted.emit();
  }
}
