import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { sayHours } from '../ui/say-time';
import type { LoadCell } from './load-cells';

const HEIGHT = 46;
const WIDTH = 78;
const FLOOR = HEIGHT - 1;
const MOST = HEIGHT - 8;

/** A stretch of time as a vessel, its figures beneath: capacity is the brim, tentative hours are dotted, too much runs over. */
@Component({
  selector: 'fettle-vessel-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg [attr.width]="width" [attr.height]="height" aria-hidden="true" focusable="false">
      @let draw = drawing();
      <rect
        class="committed"
        x="1"
        [attr.y]="draw.committedTop"
        [attr.width]="width - 2"
        [attr.height]="draw.committed"
      />
      <rect
        class="tentative"
        x="1"
        [attr.y]="draw.tentativeTop"
        [attr.width]="width - 2"
        [attr.height]="draw.tentative"
      />
      <path class="strokes" [attr.d]="draw.strokes" />
      @if (draw.over > 0) {
        <rect class="over" x="-3" [attr.y]="draw.overTop" [attr.width]="width + 6" [attr.height]="draw.over" />
      }
      <path class="sides" [attr.d]="draw.sides" />
    </svg>
    @if (asked()) {
      <span
        >{{ load() }} <span class="quiet">of {{ capacity() }}</span></span
      >
    } @else {
      <span class="quiet">{{ cell().capacityMinutes > 0 ? capacity() + ' free' : 'nobody there' }}</span>
    }
    @if (cell().tentativeMinutes > 0) {
      <span class="note quiet">{{ tentative() }} tentative</span>
    }
    @if (cell().overMinutes > 0) {
      <strong class="note is-over">{{ over() }}</strong>
    }
  `,
  styles: `
    :host {
      display: grid;
      justify-items: center;
      font-size: 0.75rem;
      line-height: 1.35;
      white-space: nowrap;
    }
    svg {
      overflow: visible;
    }
    .committed {
      fill: color-mix(in oklab, var(--verdigris) 42%, var(--gesso));
    }
    .tentative {
      fill: var(--gesso);
    }
    .strokes {
      stroke: var(--verdigris);
      stroke-width: 1;
      fill: none;
    }
    .over {
      fill: var(--oxide);
    }
    .sides {
      fill: none;
      stroke: var(--graphite);
      stroke-width: 1.25;
    }
    .is-over {
      color: var(--fault);
    }
  `,
})
export class VesselCell {
  readonly cell = input.required<LoadCell>();
  /** The most minutes, asked or there, of any vessel in the row: rows are drawn to one scale. */
  readonly tallestMinutes = input.required<number>();

  protected readonly width = WIDTH;
  protected readonly height = HEIGHT;
  protected readonly asked = computed(() => this.cell().committedMinutes + this.cell().tentativeMinutes > 0);
  protected readonly load = computed(() => sayHours(this.cell().committedMinutes + this.cell().tentativeMinutes));
  protected readonly capacity = computed(() => sayHours(this.cell().capacityMinutes));
  protected readonly tentative = computed(() => sayHours(this.cell().tentativeMinutes));
  protected readonly over = computed(() => {
    const { overMinutes, daysOver } = this.cell();
    return daysOver > 1 ? `${sayHours(overMinutes)} over, ${daysOver} days` : `${sayHours(overMinutes)} over`;
  });
  protected readonly drawing = computed(() => {
    const { committedMinutes, tentativeMinutes, capacityMinutes } = this.cell();
    const px = MOST / Math.max(1, this.tallestMinutes());
    const committed = Math.min(committedMinutes, capacityMinutes) * px;
    const tentative = Math.max(0, Math.min(tentativeMinutes, capacityMinutes - committedMinutes)) * px;
    const brim = capacityMinutes * px;
    const over = Math.max(0, committedMinutes + tentativeMinutes - capacityMinutes) * px;
    const tentativeTop = FLOOR - committed - tentative;
    return {
      committed,
      committedTop: FLOOR - committed,
      tentative,
      tentativeTop,
      strokes: tentative > 1 ? slants(tentativeTop, tentative) : '',
      over,
      overTop: FLOOR - brim - over,
      sides: `M0.5 ${FLOOR - brim} V${FLOOR} H${WIDTH - 0.5} V${FLOOR - brim}`,
    };
  });
}

/** Upright strokes, open between: what is promised to nobody yet. */
function slants(top: number, height: number): string {
  return Array.from({ length: Math.floor(WIDTH / 6) }, (_, index) => `M${4 + index * 6} ${top} v${height}`).join(' ');
}
