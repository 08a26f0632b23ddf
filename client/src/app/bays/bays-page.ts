import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatAnchor, MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { type BayView, endpoints } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { readEndpoint, reloadOnChange } from '../api';
import { SessionStore } from '../session';
import { PageHeading } from '../ui/page-heading';
import { sayPattern } from '../ui/patterns';
import { StatePanel } from '../ui/state-panel';
import { BayDialog } from './bay-dialog';
import { BAY_KIND_WORDS, saySize } from './words';

/** The places and machines that work occupies, and the moulds. */
@Component({
  selector: 'fettle-bays-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatAnchor, MatButton, PageHeading, RouterLink, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Bays" lead="The places and machines that work occupies, and how much each holds.">
        <a matButton="outlined" routerLink="/bays/climate">Climate</a>
        @if (isOffice) {
          <button matButton="filled" type="button" (click)="edit(null)">Add a bay</button>
        }
      </fettle-page-heading>
      <fettle-state-panel
        [read]="bays"
        emptyTitle="No bays yet"
        emptyHint="Add what work has to share: the spray booth, the welding bay, the long table, the oven."
      >
        @for (group of groups(); track group.title) {
          <section class="board" [attr.aria-label]="group.title">
            <h2>{{ group.title }}</h2>
            <ul class="plain-list">
              @for (bay of group.bays; track bay.id) {
                <li>
                  <div>
                    <h3>{{ bay.name }}</h3>
                    <p class="small quiet">{{ describe(bay) }}</p>
                    @if (bay.note) {
                      <p class="small">{{ bay.note }}</p>
                    }
                  </div>
                  @if (isOffice) {
                    <button matButton type="button" [attr.aria-label]="'Change ' + bay.name" (click)="edit(bay)">
                      Change
                    </button>
                  }
                </li>
              }
            </ul>
          </section>
        }
      </fettle-state-panel>
    </div>
  `,
  styles: `
    section + section {
      margin-top: var(--space-4);
    }
    li {
      display: flex;
      gap: var(--space-3);
      justify-content: space-between;
      align-items: start;
      padding-block: var(--space-2);
      border-top: 1px solid var(--rule);
    }
    li:first-child {
      border-top: 0;
    }
  `,
})
export class BaysPage {
  private readonly dialog = inject(MatDialog);

  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly bays = readEndpoint(endpoints.listBays);
  protected readonly groups = computed(() => {
    const all = (this.bays.value() ?? []).toSorted((a, b) => a.name.localeCompare(b.name));
    return [
      { title: 'Bays', bays: all.filter((bay) => bay.active && bay.kind !== 'mould') },
      { title: 'Moulds', bays: all.filter((bay) => bay.active && bay.kind === 'mould') },
      { title: 'Out of use', bays: all.filter((bay) => !bay.active) },
    ].filter((group) => group.bays.length > 0);
  });

  constructor() {
    reloadOnChange(this.bays, 'bay');
  }

  protected describe(bay: BayView): string {
    return [
      BAY_KIND_WORDS[bay.kind],
      bay.capacity === 1 ? 'holds one piece' : `holds ${bay.capacity}`,
      bay.size && saySize(bay.size),
      bay.temperatureCelsius !== null && `${bay.temperatureCelsius} °C`,
      bay.humidityPercent !== null && `${bay.humidityPercent} % humidity`,
      bay.openings.length > 0 && `open ${bay.openings.map(sayPattern).join('; ')}`,
    ]
      .filter(Boolean)
      .join(' · ');
  }

  protected async edit(bay: BayView | null): Promise<void> {
    const opened = this.dialog.open<BayDialog, BayView | null, boolean>(BayDialog, { data: bay, width: '44rem' });
    if (await firstValueFrom(opened.afterClosed())) {
      this.bays.reload();
    }
  }
}
