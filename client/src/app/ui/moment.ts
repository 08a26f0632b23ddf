import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { Instant } from '@common/contract';
import { sayDayAndTime, sayTime } from './say-time';
import { STUDIO_CLOCK } from './studio-clock';

/** How much of an instant to tell. */
export type MomentShape = 'day-and-time' | 'time';

/** An instant in the studio's zone and, where the viewer's clock reads differently, by that too. */
@Component({
  selector: 'fettle-moment',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<time [attr.datetime]="at()">{{ here() }}</time>
    @if (viewer(); as there) {
      <span class="quiet small"> ({{ there }} for you)</span>
    }`,
  styles: `
    time {
      white-space: nowrap;
    }
  `,
})
export class Moment {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly at = input.required<Instant>();
  readonly shape = input<MomentShape>('day-and-time');

  private readonly say = computed(() => (this.shape() === 'time' ? sayTime : sayDayAndTime));
  protected readonly here = computed(() => this.say()(this.at(), this.clock.zone()));
  protected readonly viewer = computed(() => {
    const there = this.say()(this.at(), this.clock.viewerZone);
    return there === this.here() ? null : there;
  });
}
