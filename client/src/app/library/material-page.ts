import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Title } from '@angular/platform-browser';
import { RouterLink } from '@angular/router';
import { endpoints } from '@common/contract';
import { CAUTION_NOTICE } from '@common/domain/safety';
import { readEndpoint } from '../api';
import { SessionStore } from '../session';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { ClockTimePipe } from '../ui/time-pipes';
import { MaterialForm } from './material-form';
import { sayLaw, sayLimits, sayMilestone } from './words';

/** One material: its dwells with the source of each figure, and its cautions; the office may change it. */
@Component({
  selector: 'fettle-material-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClockTimePipe, MatButton, MaterialForm, Notice, PageHeading, RouterLink, StatePanel],
  template: `
    <div class="page">
      <fettle-state-panel [read]="materials">
        @if (materials.value() && id() && material() === null) {
          <fettle-notice tone="fault" text="This material is not there any more." />
        }
        @if (isEditing()) {
          <div class="whole">
            <fettle-page-heading [title]="material()?.name ?? 'A new material'">
              <a above class="small" routerLink="/library">Library</a>
            </fettle-page-heading>
            <fettle-material-form [material]="material()" (done)="finish()" />
          </div>
        } @else if (material(); as shown) {
          <div class="whole">
            <fettle-page-heading
              [title]="shown.name"
              [lead]="
                shown.family +
                ' · figures at ' +
                shown.referenceCelsius +
                ' °C and ' +
                shown.referenceHumidityPercent +
                ' % humidity'
              "
            >
              <a above class="small" routerLink="/library">Library</a>
              @if (isOffice) {
                <button matButton="outlined" type="button" (click)="isChanging.set(true)">Change</button>
              }
            </fettle-page-heading>
            @if (shown.note) {
              <p class="note">{{ shown.note }}</p>
            }
            <section class="board" aria-labelledby="dwells-heading">
              <h2 id="dwells-heading">Dwells</h2>
              @if (shown.attendedMinutes > 0) {
                <p>Somebody stays by a fresh batch for {{ shown.attendedMinutes | clockTime }}.</p>
              }
              <ul class="plain-list dwells">
                @for (dwell of shown.dwells; track dwell.milestone) {
                  <li>
                    <div>
                      <h3>{{ sayMilestone(dwell.milestone) }}</h3>
                      <p class="small quiet">
                        {{ sayLaw(dwell.law) }}{{ sayLimits(dwell) ? '; ' + sayLimits(dwell) : '' }}
                      </p>
                    </div>
                    <p class="figures">
                      <strong>{{ dwell.minutes.likely | clockTime }}</strong>
                      @if (dwell.minutes.low !== dwell.minutes.high) {
                        <br /><span class="small quiet"
                          >{{ dwell.minutes.low | clockTime }} – {{ dwell.minutes.high | clockTime }}</span
                        >
                      }
                    </p>
                    <p class="small quiet source">Source: {{ dwell.source || 'not given' }}</p>
                  </li>
                }
              </ul>
            </section>
            <section class="board stack" aria-labelledby="cautions-heading">
              <h2 id="cautions-heading">Cautions</h2>
              @for (caution of shown.cautions; track caution) {
                <fettle-notice tone="caution" [text]="caution" />
              } @empty {
                <p class="quiet">None written down. That is not the same as none.</p>
              }
              <p class="small quiet">{{ notice }}</p>
            </section>
          </div>
        }
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .whole {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: minmax(0, 1fr);
    }
    .note {
      white-space: pre-line;
    }
    .dwells li {
      display: grid;
      grid-template-columns: minmax(0, 3fr) minmax(6rem, 1fr) minmax(0, 3fr);
      gap: var(--space-1) var(--space-4);
      align-items: baseline;
      padding-block: var(--space-3);
      border-top: 1px solid var(--rule);
    }
    .dwells li:first-child {
      border-top: 0;
    }
    @media (max-width: 40rem) {
      .dwells li {
        grid-template-columns: minmax(0, 1fr) auto;
      }
      .source {
        grid-column: 1 / -1;
      }
    }
  `,
})
export class MaterialPage {
  /** From the address; absent for a new material. */
  readonly id = input<string>();

  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly materials = readEndpoint(endpoints.listMaterials);
  protected readonly notice = CAUTION_NOTICE;
  protected readonly sayLaw = sayLaw;
  protected readonly sayLimits = sayLimits;
  protected readonly sayMilestone = sayMilestone;
  protected readonly isChanging = signal(false);
  protected readonly isEditing = computed(() => this.isChanging() || this.id() === undefined);
  protected readonly material = computed(() => this.materials.value()?.find((one) => one.id === this.id()) ?? null);

  constructor() {
    const title = inject(Title);
    effect(() => {
      const material = this.material();
      if (material) {
        title.setTitle(`${material.name} · Fettle`);
      }
    });
  }

  protected finish(): void {
    this.isChanging.set(false);
    this.materials.reload();
  }
}
