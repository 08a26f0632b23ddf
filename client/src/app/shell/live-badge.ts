import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { LiveEvents, type LiveState } from '../api';

const WORDS: Readonly<Record<LiveState, { readonly word: string; readonly title: string }>> = {
  off: { word: '', title: '' },
  connecting: { word: 'Joining', title: 'Joining the studio’s live news' },
  live: { word: 'Live', title: 'What others change shows here as it happens' },
  lost: { word: 'Not live', title: 'The connection is lost; trying again. Pages may be out of date.' },
};

/** Whether what is shown follows the studio as it happens. */
@Component({
  selector: 'fettle-live-badge',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<span class="dot" aria-hidden="true"></span><span>{{ words().word }}</span>`,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 0.4em;
      font-size: 0.8125rem;
      color: var(--graphite);
      white-space: nowrap;
    }
    .dot {
      width: 0.55em;
      height: 0.55em;
      border-radius: 50%;
      border: 2px solid var(--graphite);
    }
    :host([data-state='live']) .dot {
      border-color: var(--verdigris);
      background: var(--verdigris);
    }
    :host([data-state='lost']) {
      color: var(--resin-ink);
      font-weight: 600;
    }
    :host([data-state='lost']) .dot {
      border-color: var(--resin-ink);
      border-radius: 0;
    }
    :host([data-state='off']) {
      display: none;
    }
  `,
  host: { role: 'status', '[attr.data-state]': 'state()', '[attr.title]': 'words().title' },
})
export class LiveBadge {
  protected readonly state = inject(LiveEvents).state;
  protected readonly words = computed(() => WORDS[this.state()]);
}
