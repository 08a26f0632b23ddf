import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** How many hues productions share out; the theme writes `--hue-0` to `--hue-11`. */
export const HUE_COUNT = 12;

/** The CSS colour of a production's hue: itself, the text that stands on it, or a tint to read ink on. */
export function hueColour(hue: number, part: 'fill' | 'on' | 'wash' = 'fill'): string {
  const index = ((Math.trunc(hue) % HUE_COUNT) + HUE_COUNT) % HUE_COUNT;
  return `var(--hue-${index}${part === 'fill' ? '' : `-${part}`})`;
}

/** A production's two letters on its hue. Decorative where the production's name stands beside it. */
@Component({
  selector: 'fettle-mark-chip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<span [attr.aria-hidden]="name() ? null : 'true'" [attr.title]="name() || null"
    >{{ mark() }}
    @if (name()) {
      <span class="visually-hidden">, {{ name() }}</span>
    }
  </span>`,
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
      print-color-adjust: exact;
    }
  `,
  host: { '[style.background]': 'fill()', '[style.color]': 'on()' },
})
export class MarkChip {
  /** Two letters. */
  readonly mark = input.required<string>();
  /** 0 to 11. */
  readonly hue = input.required<number>();
  /** The production's name, where it does not stand beside the chip. */
  readonly name = input('');

  protected readonly fill = computed(() => hueColour(this.hue()));
  protected readonly on = computed(() => hueColour(this.hue(), 'on'));
}
