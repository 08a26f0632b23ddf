import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { DateRisk, KeyDateForecastView } from '@common/contract';
import { formatDay, formatDayAndTime } from '@common/time/format-instant';
import { Plot } from '../ui/plot/plot';
import { minuteOf } from '../ui/say-time';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { drawSpread } from './draw-spread';
import { judgeChance, sayChance, sayChanceMoved } from './say-chance';

/** Every fifth of the fan's steps stands in the table: 0, 12.5, 25 … 100 per cent. */
const TABLE_EVERY = 5;
const MOST_DRIVERS = 6;

/** What the forecast says of one key date: the chance, four marks of its spread, and on demand the curve and what moves it. */
@Component({
  selector: 'fettle-date-forecast',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Plot, RouterLink],
  templateUrl: './date-forecast.html',
  styleUrl: './date-forecast.scss',
})
export class DateForecast {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly forecast = input.required<KeyDateForecastView>();
  readonly risk = input.required<DateRisk>();
  readonly draws = input.required<number>();

  protected readonly open = signal(false);
  protected readonly chance = computed(() => sayChance(this.forecast().missChance, this.draws()));
  protected readonly judged = computed(() => judgeChance(this.forecast().missChance));
  protected readonly moved = computed(() => {
    const { earlier, missChance } = this.forecast();
    return earlier && sayChanceMoved(missChance, earlier.missChance, formatDay(earlier.day));
  });
  protected readonly marks = computed(() => {
    const { p10, p50, p80, p90 } = this.forecast();
    return [
      { name: 'P10', when: this.say(p10) },
      { name: 'P50', when: this.say(p50) },
      { name: 'P80', when: this.say(p80) },
      { name: 'P90', when: this.say(p90) },
    ];
  });
  protected readonly draw = computed(() => drawSpread(this.forecast(), minuteOf(this.risk().at), this.clock.zone()));
  protected readonly plotLabel = computed(
    () => `The chance of being ready by each time, rising from ${this.rows()[0].when}; the table says the same.`,
  );
  protected readonly rows = computed(() => {
    const { fan } = this.forecast();
    return fan
      .map((finish, step) => ({ share: (100 * step) / (fan.length - 1), when: this.say(finish) }))
      .filter((_, step) => step % TABLE_EVERY === 0);
  });
  protected readonly drivers = computed(() => {
    const { drivers, correlations } = this.forecast();
    const ranks = new Map(correlations.map(({ stageId, rank }) => [stageId, rank.toFixed(2)]));
    return drivers.slice(0, MOST_DRIVERS).map(({ stageId, name, share }) => ({
      stageId,
      name,
      share: Math.round(share * 100),
      rank: ranks.get(stageId) ?? 'hardly',
    }));
  });

  private say(at: number): string {
    return formatDayAndTime(at, this.clock.zone());
  }
}
