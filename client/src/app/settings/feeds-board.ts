import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FormControl } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { endpoints, type FeedScope, type FeedView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { Api, readEndpoint, reloadOnChange } from '../api';
import { CalendarDialog, type CalendarDialogData } from '../calendar';
import { ChoiceField } from '../ui/choice-field';
import { Confirm } from '../ui/confirm';
import { Moment } from '../ui/moment';
import { StatePanel } from '../ui/state-panel';
import { Toasts } from '../ui/toasts';

/** One's own calendar addresses: the whole studio's, one maker's, one production's. */
@Component({
  selector: 'fettle-feeds-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ChoiceField, MatButton, Moment, StatePanel],
  template: `
    <section class="board stack" aria-labelledby="feeds-heading">
      <h2 id="feeds-heading">Calendar addresses</h2>
      <p class="small quiet">A calendar that subscribes to one follows what the studio issues.</p>
      <div class="make">
        <fettle-choice-field label="Calendar of" [control]="what" [choices]="choices()" />
        <button matButton="outlined" type="button" (click)="make()">Make an address</button>
      </div>
      <fettle-state-panel
        [read]="feeds"
        emptyTitle="None yet"
        emptyHint="Choose whose calendar it should be, then scan its code."
      >
        <ul class="plain-list">
          @for (feed of open(); track feed.id) {
            <li class="row-ends">
              <div>
                <p>{{ feed.name }}</p>
                <p class="small quiet">
                  @if (feed.lastReadAt; as at) {
                    last read <fettle-moment [at]="at" />
                  } @else {
                    not read yet
                  }
                </p>
              </div>
              <button
                matButton
                type="button"
                [attr.aria-label]="'Close the address of ' + feed.name"
                (click)="revoke(feed)"
              >
                Close it
              </button>
            </li>
          } @empty {
            <li class="quiet">None open.</li>
          }
        </ul>
      </fettle-state-panel>
    </section>
  `,
  styles: `
    .make {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      gap: var(--space-3);
      align-items: center;
    }
    @media (max-width: 34rem) {
      .make {
        grid-template-columns: minmax(0, 1fr);
      }
    }
  `,
})
export class FeedsBoard {
  private readonly api = inject(Api);
  private readonly confirm = inject(Confirm);
  private readonly dialog = inject(MatDialog);
  private readonly toasts = inject(Toasts);
  private readonly makers = readEndpoint(endpoints.listMakers);
  private readonly productions = readEndpoint(endpoints.listProductions);

  protected readonly feeds = readEndpoint(endpoints.listFeeds);
  protected readonly what = new FormControl('studio', { nonNullable: true });
  protected readonly open = computed(() => (this.feeds.value() ?? []).filter((feed) => feed.revokedAt === null));
  protected readonly choices = computed(() => [
    { value: 'studio', label: 'The whole studio' },
    ...(this.makers.value() ?? [])
      .filter((maker) => maker.active)
      .map((maker) => ({ value: `maker:${maker.id}`, label: maker.name })),
    ...(this.productions.value() ?? []).map((one) => ({ value: `production:${one.id}`, label: one.name })),
  ]);

  constructor() {
    reloadOnChange(this.feeds, 'feed');
  }

  protected async make(): Promise<void> {
    const scope = scopeOf(this.what.value);
    const name = this.choices().find((one) => one.value === this.what.value)?.label ?? 'the studio';
    const opened = this.dialog.open<CalendarDialog, CalendarDialogData>(CalendarDialog, {
      data: { scope, name },
      width: '40rem',
    });
    await firstValueFrom(opened.afterClosed());
    this.feeds.reload();
  }

  protected async revoke(feed: FeedView): Promise<void> {
    const sure = await this.confirm.ask({
      title: `Close the address of ${feed.name}?`,
      text: 'Calendars that subscribe to it stop being brought up to date, for good.',
      action: 'Close it',
    });
    if (!sure) {
      return;
    }
    try {
      await this.api.callEndpoint(endpoints.revokeFeed, { params: { id: feed.id } });
    } catch (error) {
      this.toasts.fail(error);
    }
    this.feeds.reload();
  }
}

function scopeOf(value: string): FeedScope {
  const [kind, id] = value.split(':');
  if (kind === 'maker') {
    return { kind, makerId: id };
  }
  return kind === 'production' ? { kind, productionId: id } : { kind: 'studio' };
}
