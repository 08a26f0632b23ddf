import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { addDays, dayOfInstant, mondayOf } from '@common/time/calendar-day';
import { SessionStore } from '../session';
import { PageHeading } from '../ui/page-heading';
import { WeekStrip } from '../ui/patterns';
import { StatePanel } from '../ui/state-panel';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { DayPipe } from '../ui/time-pipes';
import { CraftsBoard } from './crafts-board';
import { CrewStore } from './crew-store';
import { LeaveBoard } from './leave-board';

/** Everybody who makes: their crafts, and one week of their shifts. */
@Component({
  selector: 'fettle-crew-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [CraftsBoard, DayPipe, LeaveBoard, MatButton, PageHeading, RouterLink, StatePanel, WeekStrip],
  providers: [CrewStore],
  templateUrl: './crew-page.html',
  styleUrl: './crew-page.scss',
})
export class CrewPage {
  private readonly clock = inject(STUDIO_CLOCK);

  protected readonly store = inject(CrewStore);
  protected readonly isOffice = inject(SessionStore).isOffice();
  private readonly thisMonday = computed(() =>
    mondayOf(dayOfInstant(Math.floor(this.clock.now() / 60_000), this.clock.zone())),
  );
  protected readonly weeksOn = signal(0);
  protected readonly monday = computed(() => addDays(this.thisMonday(), 7 * this.weeksOn()));

  protected move(weeks: number): void {
    this.weeksOn.update((now) => now + weeks);
  }
}
