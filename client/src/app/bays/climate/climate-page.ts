import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { endpoints } from '@common/contract';
import { readEndpoint, reloadOnChange } from '../../api';
import { PageHeading } from '../../ui/page-heading';
import { StatePanel } from '../../ui/state-panel';
import { ClimateBoard } from './climate-board';

/** Temperature and humidity of the studio and of each bay: what every cure is reckoned with. */
@Component({
  selector: 'fettle-climate-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClimateBoard, PageHeading, RouterLink, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Climate" lead="What every cure and every drying coat is reckoned with.">
        <a routerLink="/bays">To the bays</a>
      </fettle-page-heading>
      <fettle-state-panel [read]="climates">
        <div class="boards">
          @for (place of climates.value(); track place.bayId) {
            <fettle-climate-board [place]="place" (changed)="climates.reload()" />
          }
        </div>
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .boards {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: repeat(auto-fill, minmax(min(28rem, 100%), 1fr));
      align-items: start;
    }
  `,
})
export class ClimatePage {
  protected readonly climates = readEndpoint(endpoints.listClimates);

  constructor() {
    reloadOnChange(this.climates, 'climate', 'bay', 'studio');
  }
}
