import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import type { DaySheetEntry } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { Notice } from '../ui/notice';
import { HoursPipe } from '../ui/time-pipes';
import { DaySheetStore } from './day-sheet-store';
import { FinishDialog, type FinishReport } from './finish-dialog';
import type { ReportAction } from './report-outbox';

const STATE_WORDS: Readonly<Record<DaySheetEntry['state'], string>> = {
  'to-do': '',
  started: 'Under way',
  paused: 'Paused',
  finished: 'Finished',
};

/** One stretch of a maker's day, with large buttons for what happens to it. */
@Component({
  selector: 'fettle-sheet-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoursPipe, MarkChip, MatButton, Moment, Notice],
  templateUrl: './sheet-entry.html',
  styleUrl: './sheet-entry.scss',
})
export class SheetEntry {
  private readonly dialog = inject(MatDialog);
  private readonly store = inject(DaySheetStore);

  readonly entry = input.required<DaySheetEntry>();
  /** Whether it is the day on which work is reported. */
  readonly canReport = input(false);

  protected readonly busy = signal(false);
  protected readonly title = computed(() => {
    const { name, nth, of } = this.entry();
    return nth === null || of === null ? name : `${name} (${nth} of ${of})`;
  });
  protected readonly stateWords = computed(() => STATE_WORDS[this.entry().state]);

  protected async report(action: ReportAction): Promise<void> {
    const entry = this.entry();
    let more: FinishReport = {};
    if (action === 'finish') {
      const opened = this.dialog.open<FinishDialog, DaySheetEntry, FinishReport>(FinishDialog, {
        data: entry,
        width: '28rem',
      });
      const given = await firstValueFrom(opened.afterClosed());
      if (given === undefined) {
        return;
      }
      more = given;
    }
    this.busy.set(true);
    await this.store.report(entry, action, more);
    this.busy.set(false);
  }
}
