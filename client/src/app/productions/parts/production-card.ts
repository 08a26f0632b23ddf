import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { ProductionSummary } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { MarkChip } from '../../ui/mark-chip';
import { Moment } from '../../ui/moment';
import { hueColour } from '../../ui/production-hues';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { HoursPipe } from '../../ui/time-pipes';
import { PRODUCTION_STATE_WORDS } from '../words';
import { ProgressLine } from './progress-line';

/** How many key dates a card has room for. */
const DATES_SHOWN = 3;

/** One production on the wall: its mark, for whom, the next key dates, and how far it is. */
@Component({
  selector: 'fettle-production-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoursPipe, MarkChip, Moment, ProgressLine, RouterLink],
  template: `
    <article class="board card" [style.border-inline-start-color]="edge()">
      <h2>
        <fettle-mark-chip [mark]="production().mark" [hue]="production().hue" />
        <a [routerLink]="['/productions', production().id]">{{ production().name }}</a>
      </h2>
      <p class="quiet small">
        {{ production().clientName }} · {{ stateWords() }} · {{ production().pieces }}
        {{ production().pieces === 1 ? 'piece' : 'pieces' }} · {{ production().handsOnMinutes | hours }} hands-on
      </p>
      <ul class="plain-list dates small">
        @for (date of ahead(); track date.id) {
          <li>
            <span>{{ names[date.kind] }}</span>
            <span class="rule" aria-hidden="true"></span>
            <span [class.hard]="date.strength === 'hard'">
              <fettle-moment [at]="date.at" />{{ date.strength === 'hard' ? ' · hard' : '' }}
            </span>
          </li>
        } @empty {
          <li class="quiet">No key dates ahead.</li>
        }
      </ul>
      <fettle-progress-line [finished]="production().finishedStages" [all]="production().stages" />
    </article>
  `,
  styles: `
    .card {
      display: grid;
      gap: var(--space-3);
      height: 100%;
      align-content: start;
      border-inline-start-width: 6px;
      position: relative;
    }
    .card:hover {
      border-color: var(--rule-strong);
    }
    h2 {
      font-size: 1.125rem;
    }
    h2 a {
      color: var(--ink);
      text-decoration: none;
    }
    h2 a::after {
      content: '';
      position: absolute;
      inset: 0;
    }
    .card:hover h2 a {
      text-decoration: underline;
    }
    .dates {
      display: grid;
      gap: var(--space-1);
    }
    .dates li {
      display: flex;
      gap: var(--space-2);
      align-items: baseline;
      justify-content: space-between;
    }
    .rule {
      flex: 1;
      border-bottom: 1px dotted var(--rule-strong);
    }
    .hard {
      font-weight: 600;
    }
  `,
})
export class ProductionCard {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly production = input.required<ProductionSummary>();

  protected readonly names = KEY_DATE_NAMES;
  protected readonly edge = computed(() => hueColour(this.production().hue));
  protected readonly stateWords = computed(() => PRODUCTION_STATE_WORDS[this.production().state]);
  protected readonly ahead = computed(() => {
    const now = new Date(this.clock.now()).toISOString();
    return this.production()
      .keyDates.filter((date) => date.at >= now)
      .toSorted((a, b) => a.at.localeCompare(b.at))
      .slice(0, DATES_SHOWN);
  });
}
