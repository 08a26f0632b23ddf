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
import { type ClimateLogResult, endpoints } from '@common/contract';
import { Api, toApiFailure } from '../../api';
import { NoteField } from '../../ui/note-field';
import { Notice } from '../../ui/notice';

/** Reads a logger's file for one place: tried first, taken only whole. Closes with true where it was taken. */
@Component({
  selector: 'fettle-climate-log-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, NoteField, Notice],
  template: `
    <h2 mat-dialog-title>Read a log of {{ data.name }}</h2>
    <mat-dialog-content>
      <div class="stack">
        <p>
          A logger’s readings as CSV, the first row naming the columns <strong>at</strong>, <strong>celsius</strong> and
          <strong>humidity</strong>. Days are read year first or day first; times without a zone are the studio’s.
        </p>
        <div class="stack">
          <label for="log-file">Choose a file</label>
          <input id="log-file" #file type="file" accept=".csv,text/csv,text/plain" (change)="readFile(file)" />
        </div>
        <fettle-note-field label="Or paste it here" [control]="text" [rows]="6" />
        @if (message(); as words) {
          <fettle-notice tone="fault" [text]="words" />
        }
        @if (tried(); as result) {
          @if (result.faults.length === 0) {
            <fettle-notice tone="good" [text]="result.readings + ' readings can be taken.'" />
            @if (result.gaps.length > 0) {
              <fettle-notice
                tone="caution"
                [text]="result.gaps.length + ' gaps of more than six hours; there the place’s usual climate stands in.'"
              />
            }
          } @else {
            <fettle-notice tone="fault" text="These rows need mending first; nothing was taken:" />
            <ul class="faults small" tabindex="0" aria-label="What needs mending">
              @for (fault of result.faults; track $index) {
                <li>Line {{ fault.line }}: {{ fault.detail }}</li>
              }
            </ul>
          }
        }
      </div>
    </mat-dialog-content>
    <mat-dialog-actions>
      <button matButton type="button" mat-dialog-close>Close</button>
      <button matButton="outlined" type="button" [disabled]="busy()" (click)="send('try')">Try it</button>
      <button
        matButton="filled"
        type="button"
        [disabled]="busy() || tried() === null || tried()!.faults.length > 0"
        (click)="send('take')"
      >
        Take it in
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    .faults {
      max-height: 14rem;
      overflow-y: auto;
    }
    input[type='file'] {
      max-width: 100%;
      font: inherit;
    }
  `,
})
export class ClimateLogDialog {
  private readonly api = inject(Api);
  private readonly ref = inject<MatDialogRef<ClimateLogDialog, boolean>>(MatDialogRef);
  protected readonly data = inject<{ readonly bayId: string | null; readonly name: string }>(MAT_DIALOG_DATA);

  protected readonly text = new FormControl('', { nonNullable: true });
  protected readonly busy = signal(false);
  protected readonly message = signal<string | null>(null);
  protected readonly tried = signal<ClimateLogResult | null>(null);

  constructor() {
    // What was tried is no longer what stands there.
    this.text.valueChanges.subscribe(() => this.tried.set(null));
  }

  protected async readFile(input: HTMLInputElement): Promise<void> {
    const file = input.files?.[0];
    if (!file) return;
    this.text.setValue(await file.text());
    input.value = '';
  }

  protected async send(mode: 'try' | 'take'): Promise<void> {
    this.busy.set(true);
    this.message.set(null);
    try {
      const body = { bayId: this.data.bayId, csv: this.text.value, mode };
      const result = await this.api.callEndpoint(endpoints.importClimateLog, { body });
      if (result.taken) this.ref.close(true);
      else this.tried.set(result);
    } catch (error) {
      this.message.set(toApiFailure(error).detail);
    } finally {
      this.busy.set(false);
    }
  }
}
