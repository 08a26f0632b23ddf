import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import type { ClientProduction } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { firstValueFrom } from 'rxjs';
import { CalendarDialog, type CalendarDialogData } from '../calendar';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { hueColour } from '../ui/production-hues';
import { DecisionDialog, type DecisionDialogData, type DecisionKind } from './decision-dialog';

type Decision = ClientProduction['decisions'][number];

const STATE_WORDS: Readonly<Record<Decision['state'], string>> = {
  ahead: 'Comes later',
  open: 'Waits for you',
  approved: 'Approved',
  'changes-asked': 'Changes asked for',
};

/** One of a client's productions: ready when, key dates, decisions. */
@Component({
  selector: 'fettle-own-production',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, MatButton, Moment],
  templateUrl: './own-production.html',
  styleUrl: './own-production.scss',
})
export class OwnProduction {
  private readonly dialog = inject(MatDialog);

  readonly production = input.required<ClientProduction>();
  /** A decision was made. */
  readonly changed = output();

  protected readonly names = KEY_DATE_NAMES;
  protected readonly stateWords = STATE_WORDS;
  protected readonly edge = computed(() => hueColour(this.production().hue));
  protected readonly dates = computed(() => this.production().keyDates.toSorted((a, b) => a.at.localeCompare(b.at)));
  /** What waits for the client first, then what comes, then what was decided. */
  protected readonly decisions = computed(() => {
    const order: readonly Decision['state'][] = ['open', 'ahead', 'changes-asked', 'approved'];
    return this.production().decisions.toSorted((a, b) => order.indexOf(a.state) - order.indexOf(b.state));
  });

  protected async decide(decision: Decision, kind: DecisionKind): Promise<void> {
    const opened = this.dialog.open<DecisionDialog, DecisionDialogData, boolean>(DecisionDialog, {
      data: { decision, kind },
      width: '32rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.changed.emit();
    }
  }

  protected openCalendar(): void {
    const { id, name } = this.production();
    this.dialog.open<CalendarDialog, CalendarDialogData>(CalendarDialog, {
      data: { scope: { kind: 'production', productionId: id }, name },
      width: '40rem',
    });
  }
}
