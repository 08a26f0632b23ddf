import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { Pattern } from '@common/contract';
import { STUDIO_CLOCK } from '../studio-clock';
import { HoursPipe } from '../time-pipes';
import { WEEKDAYS } from './say-rule';
import { type Away, weekOf } from './week-of';

/** The shift minutes at which a day's bar is full. */
const FULL_DAY_MINUTES = 10 * 60;

/** One week of somebody's shifts, a column a day. */
@Component({
  selector: 'fettle-week-strip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoursPipe],
  template: `
    <ol class="plain-list figures">
      @for (one of week(); track one.day; let index = $index) {
        <li [class.away]="one.away" [class.off]="one.minutes === 0">
          <span class="label">{{ weekdays[index].short }} {{ +one.day.slice(8) }}</span>
          <span class="bar" aria-hidden="true"><span [style.block-size.%]="share(one.minutes)"></span></span>
          <span class="small words">
            @if (one.away) {
              {{ one.away }}
            } @else if (detailed()) {
              @for (shift of one.shifts; track shift) {
                <span class="shift">{{ shift }}</span>
              } @empty {
                <span class="quiet">off</span>
              }
              @for (shift of one.overtime; track shift) {
                <span class="shift quiet">+ {{ shift }} overtime</span>
              }
            } @else {
              {{ one.minutes > 0 ? (one.minutes | hours) : '–' }}
            }
          </span>
        </li>
      }
    </ol>
  `,
  styles: `
    ol {
      display: grid;
      grid-template-columns: repeat(7, minmax(0, 1fr));
      gap: 2px;
    }
    li {
      display: grid;
      grid-template-rows: auto 1.5rem auto;
      gap: 2px;
      justify-items: center;
      padding: 2px;
      text-align: center;
      border-radius: 3px;
    }
    .label {
      white-space: nowrap;
    }
    .bar {
      display: flex;
      align-items: end;
      width: 100%;
      border-bottom: 1px solid var(--rule-strong);
    }
    .bar > span {
      width: 100%;
      background: var(--silicone);
      border-radius: 2px 2px 0 0;
    }
    .away .words {
      color: var(--resin-ink);
      font-weight: 600;
    }
    .words {
      font-size: 0.75rem;
      line-height: 1.3;
      overflow-wrap: anywhere;
    }
    .shift {
      display: block;
    }
  `,
})
export class WeekStrip {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly patterns = input.required<readonly Pattern[]>();
  readonly away = input<readonly Away[]>([]);
  /** The Monday from which the week is shown, `YYYY-MM-DD`. */
  readonly monday = input.required<string>();
  /** Whether to tell each shift's hours rather than the day's sum. */
  readonly detailed = input(false);

  protected readonly weekdays = WEEKDAYS;
  protected readonly week = computed(() => weekOf(this.patterns(), this.away(), this.monday(), this.clock.zone()));

  protected share(minutes: number): number {
    return Math.min(100, (100 * minutes) / FULL_DAY_MINUTES);
  }
}
