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
import { ApiFailure } from '../api';
import { differencesOf, type Difference } from './differences';

/** What a person decides where somebody else changed the same record meanwhile. */
export type ConflictChoice = 'theirs' | 'mine';

@Component({
  selector: 'fettle-conflict-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Someone else changed this meanwhile</h2>
    <mat-dialog-content>
      @if (differences.length > 0) {
        <div class="scroll-x">
          <table class="ledger">
            <thead>
              <tr>
                <th scope="col"><span class="visually-hidden">Field</span></th>
                <th scope="col">As it stands now</th>
                <th scope="col">What you wrote</th>
              </tr>
            </thead>
            <tbody>
              @for (one of differences; track one.label) {
                <tr>
                  <th scope="row">{{ one.label }}</th>
                  <td>{{ one.theirs }}</td>
                  <td>{{ one.mine }}</td>
                </tr>
              }
            </tbody>
          </table>
        </div>
      } @else {
        <p>It was changed in another place than yours. You can put your change on top.</p>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" mat-dialog-close="theirs">Keep theirs</button>
      <button matButton="filled" type="button" mat-dialog-close="mine">Put mine again</button>
    </mat-dialog-actions>
  `,
})
export class ConflictDialog {
  protected readonly differences = inject<readonly Difference[]>(MAT_DIALOG_DATA);
}

/** A versioned write, as `VersionedWrites` carries it out. */
export interface VersionedWrite<T> {
  /** The version that the person saw. */
  readonly version: number;
  /** Sends the change with a version. */
  readonly send: (version: number) => Promise<T>;
  /** What the fields are called, by their key in the record. */
  readonly labels: Readonly<Record<string, string>>;
}

/** Saves changes to versioned records, and asks the person where somebody else was faster. */
@Injectable({ providedIn: 'root' })
export class VersionedWrites {
  private readonly dialog = inject(MatDialog);

  /**
   * What the server answered; null where the person kept the other's change, and the record is to be read again. Rejects with
   * an `ApiFailure` for everything that is not a conflict of versions.
   */
  async save<T>(write: VersionedWrite<T>): Promise<T | null> {
    let { version } = write;
    for (;;) {
      try {
        return await write.send(version);
      } catch (error) {
        const current = error instanceof ApiFailure && error.kind === 'version-conflict' ? error.current : undefined;
        const stored = versionOf(current);
        if (stored === null || (await this.choose(error as ApiFailure, write.labels)) === 'theirs') {
          if (stored === null) {
            throw error;
          }
          return null;
        }
        version = stored;
      }
    }
  }

  private async choose(failure: ApiFailure, labels: VersionedWrite<unknown>['labels']): Promise<ConflictChoice> {
    const opened = this.dialog.open<ConflictDialog, readonly Difference[], ConflictChoice>(ConflictDialog, {
      data: differencesOf(failure.current, failure.sent, labels),
      maxWidth: '42rem',
      role: 'alertdialog',
    });
    return (await firstValueFrom(opened.afterClosed())) ?? 'theirs';
  }
}

function versionOf(record: unknown): number | null {
  const version = (record as { version?: unknown } | null | undefined)?.version;
  return typeof version === 'number' ? version : null;
}
