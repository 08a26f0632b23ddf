import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../ui/page-heading';
import { AccountsBoard } from './accounts-board';
import { ClosuresBoard } from './closures-board';
import { ForecastBoard } from './forecast-board';
import { FeedsBoard } from './feeds-board';
import { RescueBoard } from './rescue-board';
import { StudioBoard } from './studio-board';

/** What holds for the whole studio: its name and zone, limits and weights, closures, who may sign in, calendar addresses. */
@Component({
  selector: 'fettle-settings-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [AccountsBoard, ClosuresBoard, FeedsBoard, ForecastBoard, RescueBoard, PageHeading, StudioBoard],
  template: `
    <div class="page">
      <fettle-page-heading title="Settings" lead="What holds for the whole studio." />
      <div class="columns">
        <div class="stack">
          <fettle-studio-board />
          <fettle-forecast-board />
        </div>
        <div class="stack">
          <fettle-closures-board />
          <fettle-accounts-board />
          <fettle-feeds-board />
          <fettle-rescue-board />
        </div>
      </div>
    </div>
  `,
  styles: `
    .columns {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: minmax(0, 1fr) minmax(0, 1fr);
      align-items: start;
    }
    .stack {
      gap: var(--space-4);
    }
    @media (max-width: 60rem) {
      .columns {
        grid-template-columns: minmax(0, 1fr);
      }
    }
  `,
})
export class SettingsPage {}
