import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { type ClientProduction, endpoints, Note } from '@common/contract';
import { Api } from '../api';
import { keeps } from '../ui/field-errors';
import { FormDialog } from '../ui/form-dialog';
import { FormSave } from '../ui/form-save';
import { NoteField } from '../ui/note-field';
import { STUDIO_CLOCK } from '../ui/studio-clock';

/** What a client decides of what was made so far. */
export type DecisionKind = 'approved' | 'changes-asked';

/** What the dialog is opened with. */
export interface DecisionDialogData {
  readonly decision: ClientProduction['decisions'][number];
  readonly kind: DecisionKind;
}

/** Takes a client's decision with its words; closes with true where it was taken. */
@Component({
  selector: 'fettle-decision-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FormDialog, NoteField],
  template: `
    <fettle-form-dialog
      [title]="approves ? 'Approve ' + data.decision.pieceName : 'Ask for changes to ' + data.decision.pieceName"
      [action]="approves ? 'Approve it' : 'Ask for changes'"
      [save]="save"
      (submitted)="submit()"
    >
      <p>
        {{
          approves
            ? 'The studio goes on from here as it is now. A change after this costs more, for later work stands on it.'
            : 'Say what should be different. The studio answers with what it takes, what it costs and which dates it moves, before anything is changed.'
        }}
      </p>
      <fettle-note-field
        [label]="approves ? 'A word to the makers' : 'What should be different'"
        [rows]="4"
        [control]="form.controls.note"
      />
    </fettle-form-dialog>
  `,
})
export class DecisionDialog {
  private readonly api = inject(Api);
  private readonly clock = inject(STUDIO_CLOCK);
  private readonly ref = inject<MatDialogRef<DecisionDialog, boolean>>(MatDialogRef);

  protected readonly data = inject<DecisionDialogData>(MAT_DIALOG_DATA);
  protected readonly approves = this.data.kind === 'approved';
  protected readonly save = new FormSave();
  protected readonly form = new FormGroup({
    note: new FormControl('', { nonNullable: true, validators: keeps(Note) }),
  });

  protected async submit(): Promise<void> {
    const { note } = this.form.getRawValue();
    if (!this.approves && note.trim() === '') {
      this.save.say('Say what should be different.');
      return;
    }
    const { stageId, version } = this.data.decision;
    const at = new Date(this.clock.now()).toISOString();
    const decided = await this.save.run(this.form, () =>
      this.api.callEndpoint(endpoints.decideSignOff, {
        params: { id: stageId },
        body: { decision: this.data.kind, at, note, version },
      }),
    );
    if (decided) {
      this.ref.close(true);
    }
  }
}
