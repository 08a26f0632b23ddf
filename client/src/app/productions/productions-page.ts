import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatButtonToggle, MatButtonToggleGroup } from '@angular/material/button-toggle';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import { endpoints, type ProductionSummary, type ProductionView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { readEndpoint, reloadOnChange } from '../api';
import { SessionStore } from '../session';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { ProductionDialog, type ProductionDialogData } from './forms/production-dialog';
import { ProductionCard } from './parts/production-card';

type Shown = 'current' | 'past';

const CURRENT: readonly ProductionSummary['state'][] = ['committed', 'tentative'];

/** All productions: the current ones by their next key date, or those that have left the plan. */
@Component({
  selector: 'fettle-productions-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatButtonToggle, MatButtonToggleGroup, PageHeading, ProductionCard, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Productions" lead="What the studio is making, and by when.">
        @if (isOffice) {
          <button matButton="filled" type="button" (click)="enter()">Enter a production</button>
        }
      </fettle-page-heading>
      <fettle-state-panel
        [read]="productions"
        emptyTitle="No productions yet"
        emptyHint="A production is a job for a client: a show or an exhibition. Enter one, give it its key dates, then add its pieces."
      >
        @if (productions.value(); as all) {
          @if (pastCount() > 0) {
            <mat-button-toggle-group
              aria-label="Which productions"
              [value]="shown()"
              (change)="shown.set($event.value)"
              hideSingleSelectionIndicator
            >
              <mat-button-toggle value="current">Current ({{ all.length - pastCount() }})</mat-button-toggle>
              <mat-button-toggle value="past">Delivered and declined ({{ pastCount() }})</mat-button-toggle>
            </mat-button-toggle-group>
          }
          <ul class="plain-list cards">
            @for (production of listed(); track production.id) {
              <li><fettle-production-card [production]="production" /></li>
            } @empty {
              <li class="quiet">None at present.</li>
            }
          </ul>
        }
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .cards {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: repeat(auto-fill, minmax(min(21rem, 100%), 1fr));
    }
    mat-button-toggle-group {
      margin-bottom: var(--space-4);
    }
  `,
})
export class ProductionsPage {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly productions = readEndpoint(endpoints.listProductions);
  protected readonly shown = signal<Shown>('current');
  protected readonly pastCount = computed(
    () => this.productions.value()?.filter((one) => !CURRENT.includes(one.state)).length ?? 0,
  );
  protected readonly listed = computed(() => {
    const wanted = this.shown() === 'current';
    return (this.productions.value() ?? [])
      .filter((one) => CURRENT.includes(one.state) === wanted)
      .toSorted((a, b) => lastDate(a).localeCompare(lastDate(b)) || a.name.localeCompare(b.name));
  });

  constructor() {
    reloadOnChange(this.productions, 'production', 'key-date', 'piece', 'stage');
  }

  protected async enter(): Promise<void> {
    const opened = this.dialog.open<ProductionDialog, ProductionDialogData, ProductionView>(ProductionDialog, {
      data: { production: null, others: this.productions.value() ?? [] },
      width: '36rem',
    });
    const entered = await firstValueFrom(opened.afterClosed());
    if (entered) {
      await this.router.navigate(['/productions', entered.id]);
    }
  }
}

/** The last key date, by which productions are put in order; those without one come last. */
function lastDate(production: ProductionSummary): string {
  return production.keyDates.reduce((last, date) => (date.at > last ? date.at : last), '') || '~';
}
