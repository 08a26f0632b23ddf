import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogTitle,
} from '@angular/material/dialog';
import { endpoints, type FeedScope, type FeedView } from '@common/contract';
import { Api, readEndpoint, toApiFailure } from '../api';
import { Moment } from '../ui/moment';
import { Notice } from '../ui/notice';
import { NewAddress, type NewCalendarAddress } from './new-address';

/** What the dialog is opened with. */
export interface CalendarDialogData {
  readonly scope: FeedScope;
  /** Whose or what calendar it is: "your work", "The Glass Harbour". */
  readonly name: string;
}

/** Makes a calendar address for one scope, shows it once, and lists those of the same scope that are open. */
@Component({
  selector: 'fettle-calendar-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, Moment, NewAddress, Notice],
  template: `
    <h2 mat-dialog-title>On your phone’s calendar</h2>
    <mat-dialog-content>
      <div class="stack">
        @if (made(); as address) {
          <fettle-new-address [address]="address" />
        } @else {
          <p>
            Subscribe once to {{ data.name }}, and the calendar follows what the studio issues. Whoever has the address
            can read it, so keep it to yourself; close it if it got about.
          </p>
          <p>
            <button matButton="filled" type="button" [disabled]="busy()" (click)="make()">
              Make a calendar address
            </button>
          </p>
        }
        @if (message(); as words) {
          <fettle-notice tone="fault" [text]="words" />
        }
        @if (open().length > 0) {
          <h3>Open addresses</h3>
          <ul class="plain-list">
            @for (feed of open(); track feed.id) {
              <li class="row-ends">
                <span class="small">
                  Made <fettle-moment [at]="feed.createdAt" />,
                  @if (feed.lastReadAt; as read) {
                    last read <fettle-moment [at]="read" />
                  } @else {
                    not read yet
                  }
                </span>
                <button matButton type="button" (click)="close(feed)">Close it for good</button>
              </li>
            }
          </ul>
        }
      </div>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" mat-dialog-close>Close</button>
    </mat-dialog-actions>
  `,
})
export class CalendarDialog {
  private readonly api = inject(Api);
  private readonly feeds = readEndpoint(endpoints.listFeeds);

  protected readonly data = inject<CalendarDialogData>(MAT_DIALOG_DATA);
  protected readonly made = signal<NewCalendarAddress | null>(null);
  protected readonly busy = signal(false);
  protected readonly message = signal<string | null>(null);
  protected readonly open = computed(() =>
    (this.feeds.value() ?? []).filter((feed) => feed.revokedAt === null && isSameScope(feed.scope, this.data.scope)),
  );

  protected async make(): Promise<void> {
    await this.attempt(async () => {
      this.made.set(await this.api.callEndpoint(endpoints.createFeed, { body: { scope: this.data.scope } }));
    });
  }

  protected async close(feed: FeedView): Promise<void> {
    await this.attempt(async () => {
      await this.api.callEndpoint(endpoints.revokeFeed, { params: { id: feed.id } });
      if (this.made()?.id === feed.id) {
        this.made.set(null);
      }
    });
  }

  private async attempt(change: () => Promise<void>): Promise<void> {
    this.busy.set(true);
    this.message.set(null);
    try {
      await change();
    } catch (error) {
      this.message.set(toApiFailure(error).detail);
    } finally {
      this.busy.set(false);
      this.feeds.reload();
    }
  }
}

/** Whether two calendar addresses show the same. */
export function isSameScope(a: FeedScope, b: FeedScope): boolean {
  switch (a.kind) {
    case 'maker':
      return b.kind === 'maker' && a.makerId === b.makerId;
    case 'production':
      return b.kind === 'production' && a.productionId === b.productionId;
    case 'studio':
      return b.kind === 'studio';
  }
}
