import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { type DaySheetEntry, Note } from '@common/contract';
import { keeps } from '../ui/field-errors';
import { FigureField } from '../ui/figure-field';
import { FormDialog } from '../ui/form-dialog';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { HOURS } from '../ui/reads-text';

/** What a maker adds when finishing: hands-on minutes in all, and a note. Both may be left out. */
export interface FinishReport {
  readonly spentMinutes?: number;
  readonly note?: string;
}

/** Asks how long it took; closes with the report, or with nothing where it is not finished after all. */
@Component({
  selector: 'fettle-finish-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FigureField, FormDialog, NoteField],
  template: `
    <fettle-form-dialog
      [title]="entry.pieceName + ': ' + entry.name"
      action="Finish"
      [save]="save"
      (submitted)="submit()"
    >
      <fettle-figure-field
        label="Hands-on time in all"
        unit="h"
        hint="Of everybody together; the next quote learns from it."
        [reader]="hours"
        [control]="form.controls.spent"
      />
      <fettle-note-field label="Anything to tell" [control]="form.controls.note" />
    </fettle-form-dialog>
  `,
})
export class FinishDialog {
  private readonly ref = inject<MatDialogRef<FinishDialog, FinishReport>>(MatDialogRef);

  protected readonly entry = inject<DaySheetEntry>(MAT_DIALOG_DATA);
  protected readonly hours = HOURS;
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    spent: new FormControl<number | null>(null),
    note: new FormControl('', { nonNullable: true, validators: keeps(Note) }),
  });

  protected async submit(): Promise<void> {
    const report = await this.save.run(this.form, () => {
      const { spent, note } = this.form.getRawValue();
      return Promise.resolve<FinishReport>({
        ...(spent === null ? {} : { spentMinutes: spent }),
        ...(note.trim() === '' ? {} : { note }),
      });
    });
    if (report) {
      this.ref.close(report);
    }
  }
}
