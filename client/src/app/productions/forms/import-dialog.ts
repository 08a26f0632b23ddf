import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { endpoints, type StageImportResult } from '@common/contract';
import { Api, toApiFailure } from '../../api';
import { NoteField } from '../../ui/note-field';
import { Notice } from '../../ui/notice';

/** What the dialog is opened with. */
export interface ImportDialogData {
  readonly productionId: string;
}

/** The most characters that the server takes at once. */
const LONGEST_TEXT = 1_500_000;

/** Reads stages from a table: pasted or from a file, tried first, taken only whole. Closes with true where it was taken. */
@Component({
  selector: 'fettle-import-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, NoteField, Notice],
  templateUrl: './import-dialog.html',
  styles: `
    .body {
      padding-top: var(--space-2);
    }
    .faults {
      max-height: 14rem;
      overflow-y: auto;
    }
    input[type='file'] {
      font: inherit;
      max-width: 100%;
    }
    .gap {
      flex: 1;
    }
  `,
})
export class ImportDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<ImportDialog, boolean>>(MatDialogRef);
  private readonly data = inject<ImportDialogData>(MAT_DIALOG_DATA);

  protected readonly text = new FormControl('', { nonNullable: true });
  protected readonly busy = signal(false);
  protected readonly message = signal<string | null>(null);
  protected readonly tried = signal<StageImportResult | null>(null);

  constructor() {
    // What was tried is no longer what stands there.
    this.text.valueChanges.subscribe(() => this.tried.set(null));
  }

  protected async readFile(input: HTMLInputElement): Promise<void> {
    const file = input.files?.[0];
    if (file) {
      this.text.setValue(await file.text());
      input.value = '';
    }
  }

  /** The column that a fault is in; a dash where it is of the row or of the whole table. */
  protected columnOf(pointer: string): string {
    const last = pointer.split('/').at(-1) ?? '';
    return last === '' || last === 'csv' ? '–' : last;
  }

  protected async send(mode: 'try' | 'take'): Promise<void> {
    const csv = this.text.value;
    if (csv.trim() === '') {
      this.message.set('Paste a table or choose a file first.');
      return;
    }
    if (csv.length > LONGEST_TEXT) {
      this.message.set('That is too much at once: import it in parts, one piece at a time.');
      return;
    }
    this.busy.set(true);
    this.message.set(null);
    try {
      const params = { id: this.data.productionId };
      const result = await this.api.callEndpoint(endpoints.importStages, { params, body: { csv, mode } });
      if (result.taken) {
        this.ref.close(true);
      } else {
        this.tried.set(result);
      }
    } catch (error) {
      this.message.set(toApiFailure(error).detail);
    } finally {
      this.busy.set(false);
    }
  }
}
