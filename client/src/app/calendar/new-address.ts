import { Clipboard } from '@angular/cdk/clipboard';
import { ChangeDetectionStrategy, Component, inject, input, resource } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { endpoints } from '@common/contract';
import { toString } from 'qrcode';
import type { EndpointResponse } from '../api';
import { Notice } from '../ui/notice';
import { Toasts } from '../ui/toasts';

/** A calendar address as it is shown once, at its making. */
export type NewCalendarAddress = EndpointResponse<(typeof endpoints)['createFeed']>;

/** A fresh calendar address: a code to scan, and its two spellings to tap or copy. */
@Component({
  selector: 'fettle-new-address',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Notice],
  template: `
    <div class="whole">
      @if (code.value(); as source) {
        <img [src]="source" width="200" height="200" alt="QR code of the calendar address" />
      }
      <div class="stack">
        <p>Scan the code with the phone, or open this on it:</p>
        <p><a matButton="filled" [href]="address().webcalUrl">Subscribe on this device</a></p>
        <p class="small">Where that opens nothing, copy the address into the calendar’s “from URL” or “subscribe”:</p>
        <p class="address figures small">{{ address().httpsUrl }}</p>
        <p><button matButton="outlined" type="button" (click)="copy()">Copy the address</button></p>
      </div>
    </div>
    <fettle-notice text="This address is shown only now. If it is lost, close it and make another." />
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--space-3);
    }
    .whole {
      display: grid;
      grid-template-columns: auto minmax(0, 1fr);
      gap: var(--space-4);
      align-items: start;
    }
    img {
      background: #fff;
      border: 1px solid var(--rule);
    }
    .address {
      overflow-wrap: anywhere;
      user-select: all;
    }
    @media (max-width: 34rem) {
      .whole {
        grid-template-columns: minmax(0, 1fr);
      }
    }
  `,
})
export class NewAddress {
  private readonly clipboard = inject(Clipboard);
  private readonly toasts = inject(Toasts);

  readonly address = input.required<NewCalendarAddress>();

  protected readonly code = resource({
    params: () => this.address().webcalUrl,
    loader: async ({ params }) => {
      const picture = await toString(params, { type: 'svg', margin: 4, errorCorrectionLevel: 'M' });
      return `data:image/svg+xml,${encodeURIComponent(picture)}`;
    },
  });

  protected copy(): void {
    const copied = this.clipboard.copy(this.address().httpsUrl);
    this.toasts.say(copied ? 'The address is copied.' : 'Copying is not allowed here; mark the address and copy it.');
  }
}
