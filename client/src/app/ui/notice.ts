import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** How a notice speaks: something is wrong, wants care, is good, or is only said. */
export type NoticeTone = 'fault' | 'caution' | 'good' | 'plain';

/** A sentence that stands beside what it is about. Faults and cautions begin with that word, so colour is never alone. */
@Component({
  selector: 'fettle-notice',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (tone() === 'caution') {
      <strong>Caution:</strong>
    }
    {{ text() }}
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      padding: var(--space-2) var(--space-3);
      border-inline-start: 4px solid var(--rule-strong);
      background: color-mix(in oklab, var(--plaster-deep) 60%, var(--gesso));
      color: var(--ink);
    }
    :host([data-tone='fault']) {
      border-color: var(--fault);
    }
    :host([data-tone='caution']) {
      border-color: var(--resin);
      background: var(--resin-wash);
    }
    :host([data-tone='good']) {
      border-color: var(--verdigris);
      background: var(--verdigris-wash);
    }
  `,
  host: { '[attr.data-tone]': 'tone()', '[attr.role]': "tone() === 'fault' ? 'alert' : null" },
})
export class Notice {
  readonly tone = input<NoticeTone>('plain');
  readonly text = input('');
}
