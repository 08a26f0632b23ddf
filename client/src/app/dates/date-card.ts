import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { DateRisk, KeyDateForecastView, ProductionSummary } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { MarkChip } from '../ui/mark-chip';
import { Moment } from '../ui/moment';
import { minuteOf, sayDayAndTime } from '../ui/say-time';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { DateForecast } from './date-forecast';
import { RescuePanel } from './rescues/rescue-panel';
import { marginPlace, sayDateMargin, STATE_WORDS } from './say-date-state';

/** Before the first stage of a chain comes into the window of the plan. */
const LEAD_MINUTES = 12 * 60;
/** From this chance of being missed on, what would save a date is offered. */
const WORTH_SAVING = 0.05;
/** Steps of a chain shown before one asks for all. */
const STEPS_SHOWN = 7;

/** One key date ahead: its margin, how it stands, and the chain of stages and waits that leads to it. */
@Component({
  selector: 'fettle-date-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DateForecast, MarkChip, Moment, RescuePanel, RouterLink],
  templateUrl: './date-card.html',
  styleUrl: './date-card.scss',
  host: { '[class]': "'state-' + risk().state" },
})
export class DateCard {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly risk = input.required<DateRisk>();
  readonly productions = input.required<ReadonlyMap<string, ProductionSummary>>();

  /** Null where it is not forecast: not yet, or because a part of it has no place in the plan. */
  readonly forecast = input<KeyDateForecastView | null>(null);
  readonly draws = input(0);

  protected readonly isAtRisk = computed(() => (this.forecast()?.missChance ?? 0) > WORTH_SAVING);
  protected readonly production = computed(() => this.productions().get(this.risk().productionId));
  protected readonly name = computed(() => KEY_DATE_NAMES[this.risk().kind]);
  protected readonly word = computed(() => STATE_WORDS[this.risk().state]);
  protected readonly margin = computed(() => sayDateMargin(this.risk()));
  protected readonly place = computed(() => {
    const place = marginPlace(this.risk().marginMinutes);
    return place === null ? null : `${place * 100}%`;
  });
  protected readonly drivers = computed(() =>
    this.risk().drivers.map((driver) => {
      const production = this.productions().get(driver.productionId);
      return {
        ...driver,
        mark: production?.mark ?? '––',
        hue: production?.hue ?? 0,
        production: production?.name ?? '',
        elsewhere: driver.productionId !== this.risk().productionId,
        when: `${sayDayAndTime(driver.start, this.clock.zone())} – ${sayDayAndTime(driver.end, this.clock.zone())}`,
        link: { stage: driver.stageId, from: minuteOf(driver.start) - LEAD_MINUTES },
      };
    }),
  );
  /** Chains can be long: their end is nearest to the date, and is shown first. */
  protected readonly all = signal(false);
  protected readonly shown = computed(() => (this.all() ? this.drivers() : this.drivers().slice(-STEPS_SHOWN)));
  protected readonly before = computed(() => this.drivers().length - this.shown().length);
  protected readonly others = computed(
    () =>
      new Set(
        this.drivers()
          .filter((one) => one.elsewhere)
          .map((one) => one.production),
      ).size,
  );
}
