import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { endpoints, type ProductionSummary, type ProductionView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { onLiveEvent, readEndpoint, reloadOnChange } from '../api';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { EnquiryDialog, type EnquiryDialogData } from './enquiry-dialog';
import { askedFor, sayAge, sayAgainst, sayEarliest } from './say-promise';

/** Everything that is asked for and promised to nobody yet, with the last promise for each. */
@Component({
  selector: 'fettle-enquiries-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, MatButton, Moment, PageHeading, RouterLink, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Enquiries" lead="Asked for, and promised to nobody yet.">
        <button matButton="filled" type="button" (click)="enter()">Enter an enquiry</button>
      </fettle-page-heading>
      <fettle-state-panel [read]="productions">
        <ul class="plain-list cards">
          @for (one of listed(); track one.production.id) {
            <li class="card">
              <h2>
                <fettle-mark-chip [mark]="one.production.mark" [hue]="one.production.hue" />
                <a [routerLink]="['/enquiries', one.production.id]">{{ one.production.name }}</a>
              </h2>
              <p class="quiet">{{ one.production.clientName }}</p>
              <dl>
                <dt>Asked for</dt>
                <dd>
                  @if (one.asked; as asked) {
                    <fettle-moment [at]="asked.at" />
                  } @else {
                    no date yet
                  }
                </dd>
                <dt>Promise at 80 %</dt>
                <dd>{{ one.promise }}</dd>
              </dl>
              @if (one.age) {
                <p class="small quiet">{{ one.age }}</p>
              }
            </li>
          } @empty {
            <li>
              <h2>No enquiries</h2>
              <p class="quiet">
                When somebody asks whether the studio can make something, enter it here with the date they wish for and
                its pieces. It then says when it could be delivered, and what that would push.
              </p>
            </li>
          }
        </ul>
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .cards {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: repeat(auto-fill, minmax(min(21rem, 100%), 1fr));
    }
    .card {
      padding: var(--space-4);
      border: 1px solid var(--rule);
      background: var(--gesso);
    }
    h2 {
      overflow-wrap: anywhere;
    }
    dl {
      display: grid;
      grid-template-columns: auto 1fr;
      gap: var(--space-1) var(--space-3);
      margin: var(--space-3) 0 0;
    }
    dd {
      margin: 0;
    }
  `,
})
export class EnquiriesPage {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly clock = inject(STUDIO_CLOCK);

  protected readonly productions = readEndpoint(endpoints.listProductions);
  protected readonly promises = readEndpoint(endpoints.listPromises);
  protected readonly listed = computed(() =>
    (this.productions.value() ?? []).filter(({ state }) => state === 'tentative').map((one) => this.lineOf(one)),
  );

  constructor() {
    reloadOnChange(this.productions, 'production', 'key-date');
    onLiveEvent((event) => {
      if (event === null || event.kind !== 'level') this.promises.reload();
    });
  }

  protected async enter(): Promise<void> {
    const opened = this.dialog.open<EnquiryDialog, EnquiryDialogData, ProductionView>(EnquiryDialog, {
      data: { others: this.productions.value() ?? [] },
      width: '36rem',
    });
    const entered = await firstValueFrom(opened.afterClosed());
    if (entered) await this.router.navigate(['/enquiries', entered.id]);
  }

  private lineOf(production: ProductionSummary) {
    const asked = askedFor(production.keyDates);
    const known = this.promises.value()?.find(({ productionId }) => productionId === production.id);
    const answer = known?.answer ?? null;
    if (!known || !answer) {
      const promise = known ? 'being worked out' : 'not asked yet';
      return { production, asked, promise, age: '' };
    }
    const against = sayAgainst(answer.among.p80, asked);
    const promise = `${sayEarliest(answer.among.p80, this.clock.zone())}${against && `, ${against}`}`;
    const stale = known.stale ? '; the studio has changed since' : '';
    return { production, asked, promise, age: `Asked ${sayAge(known.startedAt, this.clock.now())}${stale}` };
  }
}
