import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { DaySheet } from '@common/contract';
import { formatMinutes } from '@common/time/format-instant';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { minuteOf } from '../ui/say-time';

/** Until when a piece is left alone, and how long that is from now. */
@Component({
  selector: 'fettle-dwell-clock',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarkChip, Moment],
  template: `
    <p>
      <fettle-mark-chip [mark]="dwell().mark" [hue]="dwell().hue" /> <strong>{{ dwell().pieceName }}</strong>
    </p>
    <p class="small quiet">after {{ dwell().name }}</p>
    @if (leftMinutes() > 0) {
      <p>Leave it until <fettle-moment [at]="dwell().until" /></p>
      <p class="left figures">{{ left() }} to go</p>
    } @else {
      <p class="over">May be touched since <fettle-moment [at]="dwell().until" /></p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 2px;
      padding-block: var(--space-2);
    }
    .left {
      font-weight: 600;
      color: var(--silicone);
    }
    .over {
      font-weight: 600;
      color: var(--verdigris);
    }
  `,
})
export class DwellClock {
  readonly dwell = input.required<DaySheet['dwells'][number]>();
  /** Now, in whole minutes since 1970. */
  readonly now = input.required<number>();

  protected readonly leftMinutes = computed(() => minuteOf(this.dwell().until) - this.now());
  protected readonly left = computed(() => formatMinutes(this.leftMinutes()));
}
