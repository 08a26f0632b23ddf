import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { FormControl } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import { endpoints } from '@common/contract';
import { addDays, isCalendarDay } from '@common/time/calendar-day';
import { readEndpoint } from '../api';
import { CalendarDialog, type CalendarDialogData } from '../calendar';
import { SessionStore } from '../session';
import { ChoiceField } from '../ui/choice-field';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { DayPipe } from '../ui/time-pipes';
import { DaySheetStore } from './day-sheet-store';
import { DwellClock } from './dwell-clock';
import { SheetEntry } from './sheet-entry';

/** A maker's issued work for one day: what, where, with whom, in which order; for the phone and for paper. */
@Component({
  selector: 'fettle-day-sheet-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, DayPipe, DwellClock, MatButton, PageHeading, SheetEntry, StatePanel],
  providers: [DaySheetStore],
  templateUrl: './day-sheet-page.html',
  styleUrl: './day-sheet-page.scss',
})
export class DaySheetPage {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  /** From the query: a calendar day; absent for today. */
  readonly day = input<string>();
  /** From the query: whose sheet, for the office; absent for one's own. */
  readonly maker = input<string>();

  protected readonly store = inject(DaySheetStore);
  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly whose = new FormControl<string | null>(null);
  private readonly makers = readEndpoint(endpoints.listMakers, () => (this.isOffice ? {} : undefined));
  protected readonly makerChoices = computed(() =>
    (this.makers.value() ?? []).filter((one) => one.active).map((one) => ({ value: one.id, label: one.name })),
  );
  protected readonly shownName = computed(() => {
    const day = this.store.day();
    return day === this.store.today() ? 'Today' : day === this.store.tomorrow() ? 'Tomorrow' : 'Day sheet';
  });
  protected readonly isToday = computed(() => this.store.day() === this.store.today());

  constructor() {
    effect(() => {
      const day = this.day();
      this.store.show(day !== undefined && isCalendarDay(day) ? day : null, this.maker() ?? null);
    });
    effect(() => {
      // An office without hands of its own looks at the first maker's sheet.
      const first = this.makerChoices()[0]?.value ?? null;
      const shown = this.store.makerId();
      if (this.isOffice && shown === null && first !== null) {
        void this.go({ maker: first });
      }
      this.whose.setValue(shown, { emitEvent: false });
    });
  }

  protected move(days: number): void {
    void this.go({ day: addDays(this.store.day(), days) });
  }

  protected showDay(day: string): void {
    void this.go({ day: day === this.store.today() ? null : day });
  }

  protected showMaker(): void {
    void this.go({ maker: this.whose.value });
  }

  protected print(): void {
    window.print();
  }

  protected openCalendar(): void {
    const makerId = this.store.makerId();
    if (makerId !== null) {
      this.dialog.open<CalendarDialog, CalendarDialogData>(CalendarDialog, {
        data: { scope: { kind: 'maker', makerId }, name: this.isOffice ? 'this maker’s work' : 'your work' },
        width: '40rem',
      });
    }
  }

  private go(query: { day?: string | null; maker?: string | null }): Promise<boolean> {
    return this.router.navigate([], { queryParams: query, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
