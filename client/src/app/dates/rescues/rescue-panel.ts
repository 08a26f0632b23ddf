import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatProgressBar } from '@angular/material/progress-bar';
import type { RescueView } from '@common/contract';
import { formatDayAndTime } from '@common/time/format-instant';
import { MoneyPipe } from '../../ui/money';
import { Notice } from '../../ui/notice';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { Toasts } from '../../ui/toasts';
import { sayChance } from '../say-chance';
import { RescueStore } from './rescue-store';

/** What is told of one rescue. */
interface ToldRescue {
  readonly title: string;
  readonly measures: RescueView['measures'];
  readonly cautions: readonly string[];
  readonly priceMinor: number;
  readonly chance: string;
  readonly p80: string;
  readonly saves: boolean;
  readonly others: readonly { readonly keyDateId: string; readonly words: string }[];
}

/** What would save one date: searched on demand, ranked with prices, and taken into the working plan. */
@Component({
  selector: 'fettle-rescue-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatProgressBar, MoneyPipe, Notice],
  providers: [RescueStore],
  templateUrl: './rescue-panel.html',
  styleUrl: './rescue-panel.scss',
})
export class RescuePanel {
  protected readonly store = inject(RescueStore);
  private readonly clock = inject(STUDIO_CLOCK);
  private readonly toasts = inject(Toasts);

  readonly keyDateId = input.required<string>();
  readonly dateName = input.required<string>();
  readonly draws = input.required<number>();

  protected readonly share = computed(() => {
    const search = this.store.search();
    return search && search.of > 0 ? (100 * search.weighed) / search.of : null;
  });
  protected readonly progress = computed(() => {
    const search = this.store.search();
    return search && search.of > 0
      ? `Weighed ${search.weighed} of ${search.of} changes…`
      : 'Looking for what could be changed…';
  });
  protected readonly now = computed(() => sayChance(this.store.search()?.before?.missChance ?? 1, this.draws()));
  protected readonly rescues = computed(() => (this.store.search()?.rescues ?? []).map((rescue) => this.tell(rescue)));

  protected find(): void {
    void this.store.start(this.keyDateId());
  }

  protected async take(place: number): Promise<void> {
    const title = this.rescues()[place].title;
    if (await this.store.take(place))
      this.toasts.say(`The working plan counts on it: ${title}. Undo there takes it back.`);
  }

  private tell(rescue: RescueView): ToldRescue {
    const { measures, priceMinor, missChance, p80, saves, others } = rescue;
    return {
      title: measures.map(({ sentence }) => sentence).join('; ') || 'Level the plan again',
      measures,
      cautions: [...new Set(measures.map(({ caution }) => caution))].filter((caution) => caution !== ''),
      priceMinor,
      chance: sayChance(missChance, this.draws()),
      p80: formatDayAndTime(p80, this.clock.zone()),
      saves,
      others: others.map((other) => ({
        keyDateId: other.keyDateId,
        words: `${other.missChance > other.missChanceBefore ? 'Costs' : 'Helps'} ${other.name}: ${sayChance(other.missChanceBefore, this.draws())} → ${sayChance(other.missChance, this.draws())}`,
      })),
    };
  }
}
