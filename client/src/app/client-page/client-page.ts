import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { endpoints } from '@common/contract';
import { readEndpoint, reloadOnChange } from '../api';
import { SessionStore } from '../session';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { OwnProduction } from './own-production';

/** A client's own productions: when they are ready, and what waits for a decision. */
@Component({
  selector: 'fettle-client-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [OwnProduction, PageHeading, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Your productions" [lead]="'At ' + studioName()" />
      <fettle-state-panel
        [read]="productions"
        emptyTitle="Nothing under way"
        emptyHint="When the studio begins a production for you, its dates and the decisions that wait for you stand here."
      >
        <div class="all">
          @for (production of productions.value() ?? []; track production.id) {
            <fettle-own-production [production]="production" (changed)="productions.reload()" />
          }
        </div>
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .all {
      display: grid;
      gap: var(--space-5);
      grid-template-columns: minmax(0, 1fr);
      max-width: 54rem;
    }
  `,
})
export class ClientPage {
  protected readonly studioName = inject(SessionStore).studioName;
  protected readonly productions = readEndpoint(endpoints.readClientPage);

  constructor() {
    reloadOnChange(this.productions, 'client-page');
  }
}
