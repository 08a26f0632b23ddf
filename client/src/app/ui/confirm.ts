import { ChangeDetectionStrategy, Component, inject, Injectable } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialog,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogTitle,
} from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';

/** What a person is asked before something that is not easily taken back. */
export interface Question {
  readonly title: string;
  /** What will happen, and what will not come back. */
  readonly text: string;
  /** The verb on the button that does it. */
  readonly action: string;
}

@Component({
  selector: 'fettle-confirm-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>{{ question.title }}</h2>
    <mat-dialog-content>{{ question.text }}</mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" [mat-dialog-close]="false">Leave it</button>
      <button matButton="filled" type="button" [mat-dialog-close]="true">{{ question.action }}</button>
    </mat-dialog-actions>
  `,
})
export class ConfirmDialog {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
}

/** Asks before something that is not easily taken back. */
@Injectable({ providedIn: 'root' })
export class Confirm {
  private readonly dialog = inject(MatDialog);

  /** Whether the person said yes; closing the dialog is no. */
  async ask(question: Question): Promise<boolean> {
    const opened = this.dialog.open<ConfirmDialog, Question, boolean>(ConfirmDialog, {
      data: question,
      maxWidth: '30rem',
      role: 'alertdialog',
    });
    return (await firstValueFrom(opened.afterClosed())) === true;
  }
}
