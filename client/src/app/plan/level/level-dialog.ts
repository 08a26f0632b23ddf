import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { MatProgressBar } from '@angular/material/progress-bar';
import { formatMoney } from '@common/domain/money';
import { STUDIO_CURRENCY } from '../../ui/money';
import { Notice } from '../../ui/notice';
import { PlanStore } from '../plan-store';
import { ChangeList } from './change-list';
import { DateEffects } from './date-effects';
import { LevelStore } from './level-store';
import { objectiveLines, sayAmount } from './say-objective';

/** A levelling: how far it is, what it found beside the plan as it stands, and whether to take it. */
@Component({
  selector: 'fettle-level-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    ChangeList,
    DateEffects,
    MatButton,
    MatDialogActions,
    MatDialogContent,
    MatDialogTitle,
    MatProgressBar,
    Notice,
  ],
  templateUrl: './level-dialog.html',
  styleUrl: './level-dialog.scss',
})
export class LevelDialog {
  protected readonly level = inject(LevelStore);
  private readonly plan = inject(PlanStore);
  private readonly dialog = inject<MatDialogRef<LevelDialog>>(MatDialogRef);
  private readonly currency = inject(STUDIO_CURRENCY);

  protected readonly names = this.plan.names;
  protected readonly evening = computed(() => this.level.run()?.mode === 'within-dates');
  protected readonly title = computed(() => (this.evening() ? 'Even out within the dates' : 'Level all productions'));
  protected readonly progress = computed(() => {
    const run = this.level.run();
    if (!run) return null;
    const tried = `${run.schedules.toLocaleString('en-GB')} plans tried`;
    if (!run.objective) return { tried, best: 'Nothing found yet', proven: '' };
    const { unplaced, hardLateness, wishedLateness } = run.objective;
    const late = [
      unplaced > 0 ? `${unplaced} that can’t be met` : '',
      `hard dates late: ${sayAmount('hardLateness', hardLateness, this.money)}`,
      `wished: ${sayAmount('wishedLateness', wishedLateness, this.money)}`,
    ];
    return { tried, best: `Best so far: ${late.filter((part) => part !== '').join(' · ')}`, proven: this.sayGap() };
  });
  protected readonly ended = computed(() => {
    const run = this.level.run();
    if (!run) return '';
    if (run.state === 'failed') return run.failure ?? 'The levelling failed.';
    if (run.state === 'cancelled') return 'Stopped. This is the best that was found until then.';
    return (
      {
        'proven-best': 'Proven: no plan does better in what was sought.',
        'nothing-to-improve': 'Nothing more to improve was found.',
        cancelled: 'Stopped. This is the best that was found until then.',
      }[run.stop ?? ''] ?? 'Time is up. This is the best that was found.'
    );
  });
  protected readonly lines = computed(() => {
    const proposal = this.level.proposal();
    return proposal ? objectiveLines(proposal.before, proposal.after, proposal.run.bound, this.money) : [];
  });

  protected async take(): Promise<void> {
    if (await this.level.take()) this.dialog.close();
  }

  protected leave(): void {
    void this.level.leave();
    this.dialog.close();
  }

  protected again(): void {
    const run = this.level.run();
    void this.level.start(run?.mode ?? 'dates', Math.min(120, (run?.seconds ?? 6) * 3));
  }

  protected away(): void {
    this.dialog.close();
  }

  /** The gap as far as it is proven, for the first part that is not already at its bound. */
  private sayGap(): string {
    const run = this.level.run();
    const parts = ['unplaced', 'hardLateness', 'wishedLateness'] as const;
    if (!run?.objective || !run.bound) return '';
    for (const part of parts) {
      const bound = run.bound[part] ?? null;
      const value = run.objective[part];
      if (bound === null) return '';
      if (value > bound) return `Proven so far: not below ${sayAmount(part, bound, this.money)} there.`;
    }
    return 'Proven: the dates can’t be met better. Looking for less cost and an evener load.';
  }

  private readonly money = (minor: number): string => formatMoney(minor, this.currency());
}
