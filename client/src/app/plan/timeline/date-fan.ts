import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { formatDayAndTime } from '@common/time/format-instant';
import { ForecastStore } from '../forecast-store';
import { BoardStore } from './board-store';
import { fanShape } from './engine/fan-shape';

/** Height of a fan in pixels; it stands on the floor of its production's row. */
const FAN_HEIGHT = 22;

/** When a production is likely to be finished: a soft density from P10 to P90 against its flags, P50 and P80 marked. */
@Component({
  selector: 'fettle-date-fan',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (shape(); as fan) {
      <span
        class="fan"
        role="img"
        [attr.aria-label]="words()"
        [title]="words()"
        [class.stale]="!forecast.fresh()"
        [style.left.px]="fan.x"
        [style.width.px]="fan.width"
      >
        <svg aria-hidden="true" [attr.width]="fan.width" [attr.height]="height">
          <path class="body" [attr.d]="fan.path" />
          <line class="p50" [attr.x1]="fan.p50" [attr.x2]="fan.p50" y1="0" [attr.y2]="height" />
          <line class="p80" [attr.x1]="fan.p80" [attr.x2]="fan.p80" [attr.y1]="height / 3" [attr.y2]="height" />
        </svg>
      </span>
    }
  `,
  styles: `
    .fan {
      position: absolute;
      bottom: 0;
      height: 22px;
    }
    svg {
      display: block;
      overflow: visible;
    }
    .body {
      fill: color-mix(in oklab, var(--silicone) 34%, transparent);
      stroke: var(--silicone);
      stroke-width: 1;
    }
    line {
      stroke: var(--ink);
      stroke-width: 1.5;
    }
    .p80 {
      stroke-dasharray: 2 2;
    }
    .stale {
      opacity: 0.5;
    }
  `,
})
export class DateFan {
  private readonly board = inject(BoardStore);
  protected readonly forecast = inject(ForecastStore);
  protected readonly height = FAN_HEIGHT;

  readonly productionId = input.required<string>();

  private readonly fan = computed(() => this.forecast.fans().get(this.productionId()) ?? null);
  protected readonly shape = computed(() => {
    const fan = this.fan();
    return fan && fanShape(fan, this.board.scale(), FAN_HEIGHT);
  });
  protected readonly words = computed(() => {
    const fan = this.fan();
    if (!fan) return '';
    const at = (share: number): string =>
      formatDayAndTime(fan[Math.round(share * (fan.length - 1))], this.board.zone());
    return `Forecast of the finish: half of all draws by ${at(0.5)}, 80 % by ${at(0.8)}; from ${at(0.1)} (P10) to ${at(0.9)} (P90)`;
  });
}
