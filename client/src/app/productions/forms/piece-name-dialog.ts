import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { endpoints, Name, Note, type PieceView } from '@common/contract';
import { Api } from '../../api';
import { VersionedWrites } from '../../ui/conflict-dialog';
import { keeps } from '../../ui/field-errors';
import { FormDialog } from '../../ui/form-dialog';
import { FormSave } from '../../ui/form-save';
import { NoteField } from '../../ui/note-field';
import { TextField } from '../../ui/text-field';

/** Changes what a piece is called and what is noted of it; closes with true where something was saved. */
@Component({
  selector: 'fettle-piece-name-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FormDialog, NoteField, TextField],
  template: `
    <fettle-form-dialog title="Change the piece" [save]="save" (submitted)="submit()">
      <fettle-text-field label="Name" [control]="form.controls.name" />
      <fettle-note-field label="Note" [control]="form.controls.note" />
    </fettle-form-dialog>
  `,
})
export class PieceNameDialog {
  private readonly api = inject(Api);
  private readonly writes = inject(VersionedWrites);
  private readonly ref = inject<MatDialogRef<PieceNameDialog, boolean>>(MatDialogRef);
  private readonly piece = inject<PieceView>(MAT_DIALOG_DATA);

  protected readonly save = new FormSave();
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: [this.piece.name, [Validators.required, keeps(Name)]],
    note: [this.piece.note, keeps(Note)],
  });

  protected async submit(): Promise<void> {
    const params = { id: this.piece.id };
    const saved = await this.save.run(this.form, () =>
      this.writes.save({
        version: this.piece.version,
        labels: { name: 'Name', note: 'Note' },
        send: (version) =>
          this.api.callEndpoint(endpoints.changePiece, { params, body: { ...this.form.getRawValue(), version } }),
      }),
    );
    if (saved !== undefined) {
      this.ref.close(true);
    }
  }
}
