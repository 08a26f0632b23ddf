import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { hueColour } from './production-hues';

/** A production's two letters on its hue. Decorative where the production's name stands beside it. */
@Component({
  selector: 'fettle-mark-chip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span [attr.aria-hidden]="name() ? null : 'true'" [attr.title]="name() || null"
      >{{ mark() }}<span class="visually-hidden">{{ spoken() }}</span></span
    >
  `,
  styles: `
    :host {
      display: inline-grid;
      place-items: center;
      min-width: 1.9em;
      height: 1.5em;
      padding-inline: 0.25em;
      border-radius: 3px;
      font-size: 0.8125em;
      font-weight: 700;
      letter-spacing: 0.03em;
      line-height: 1;
      vertical-align: 0.08em;
      margin-inline-end: 0.4em;
      print-color-adjust: exact;
    }
  `,
  host: { '[style.background]': 'fill()', '[style.color]': 'on()' },
})
export class MarkChip {
  /** Two letters. */
  readonly mark = input.required<string>();
  /** The production's hue, counted from 0. */
  readonly hue = input.required<number>();
  /** The production's name, where it does not stand beside the chip. */
  readonly name = input('');

  protected readonly spoken = computed(() => (this.name() === '' ? '' : `, ${this.name()}`));
  protected readonly fill = computed(() => hueColour(this.hue()));
  protected readonly on = computed(() => hueColour(this.hue(), 'on'));
}
