import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The name, set so that one trued line crosses both t's. Takes the size of the text around it. */
@Component({
  selector: 'fettle-wordmark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<span class="visually-hidden">Fettle</span
    ><span aria-hidden="true">Fe<span class="trued">tt</span>le</span>`,
  styles: `
    :host {
      font-weight: 700;
      font-size: 1.5rem;
      letter-spacing: -0.03em;
      line-height: 1;
      color: var(--ink);
    }
    .trued {
      position: relative;
    }
    .trued::after {
      content: '';
      position: absolute;
      inset-inline: 0 -0.02em;
      top: 0.395em;
      height: 0.146em;
      background: var(--oxide);
    }
  `,
})
export class Wordmark {}
