import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { endpoints } from '@common/contract';
import { Api, readEndpoint, toApiFailure } from '../../api';
import { NoteField } from '../../ui/note-field';
import { Notice } from '../../ui/notice';
import { StatePanel } from '../../ui/state-panel';
import { ChangeList } from '../level/change-list';
import { DateEffects } from '../level/date-effects';
import { PlanStore } from '../plan-store';

/** What issuing would change and for whom; with a note, it is issued. */
@Component({
  selector: 'fettle-issue-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    ChangeList,
    DateEffects,
    MatButton,
    MatDialogActions,
    MatDialogClose,
    MatDialogContent,
    MatDialogTitle,
    NoteField,
    Notice,
    ReactiveFormsModule,
    StatePanel,
  ],
  templateUrl: './issue-dialog.html',
  styleUrl: '../level/level-dialog.scss',
})
export class IssueDialog {
  private readonly api = inject(Api);
  private readonly plan = inject(PlanStore);
  private readonly dialog = inject<MatDialogRef<IssueDialog, number>>(MatDialogRef);

  protected readonly preview = readEndpoint(endpoints.previewIssue);
  protected readonly names = this.plan.names;
  protected readonly note = new FormControl('', { nonNullable: true });
  protected readonly busy = signal(false);
  protected readonly trouble = signal<string | null>(null);
  protected readonly people = computed(() =>
    (this.preview.value()?.forMakers ?? [])
      .filter((one) => one.changes > 0)
      .map((one) => ({ id: one.makerId, name: this.names()?.maker(one.makerId) ?? '', changes: one.changes }))
      .sort((a, b) => b.changes - a.changes),
  );
  protected readonly mayIssue = computed(() => {
    const preview = this.preview.value();
    return preview !== undefined && preview.obstacles.length === 0 && !this.busy();
  });

  protected async issue(): Promise<void> {
    const preview = this.preview.value();
    if (!preview || !this.mayIssue()) return;
    this.busy.set(true);
    this.trouble.set(null);
    try {
      const body = { revision: preview.revision, note: this.note.value };
      const issued = await this.api.callEndpoint(endpoints.issue, { body });
      this.plan.refresh(`Plan ${issued.number} is issued.`);
      this.dialog.close(issued.number);
    } catch (error) {
      this.trouble.set(toApiFailure(error).detail);
      this.preview.reload();
    } finally {
      this.busy.set(false);
    }
  }
}
