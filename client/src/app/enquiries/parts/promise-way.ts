import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { KeyDateView, PromiseWayView } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import { STUDIO_CLOCK } from '../../ui/studio-clock';
import { pushedBy, sayAgainst, sayEarliest, sayMargin } from '../say-promise';

const MOST_DRIVERS = 5;

/** One way of laying the enquiry into the plan: its promise dates, what they hang on, and what is pushed. */
@Component({
  selector: 'fettle-promise-way',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <h3>{{ heading() }}</h3>
    <p class="quiet small">{{ lead() }}</p>
    <div class="wide" tabindex="0" role="group" [attr.aria-label]="'Promise dates, ' + heading()">
      <table>
        <thead>
          <tr>
            <th scope="col">How sure</th>
            <th scope="col">Earliest delivery</th>
            <th scope="col">Against the date asked for</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.share) {
            <tr>
              <th scope="row" class="figures">{{ row.share }} %</th>
              <td class="figures">{{ row.when }}</td>
              <td>{{ row.against }}</td>
            </tr>
          }
        </tbody>
      </table>
    </div>
    @if (drivers().length > 0) {
      <p class="small">
        It hangs on
        @for (driver of drivers(); track driver.stageId; let last = $last) {
          <a [routerLink]="['/plan']" [queryParams]="{ stage: driver.stageId }">{{ driver.name }}</a> ({{
            driver.share
          }}
          %){{ last ? '.' : ', ' }}
        }
      </p>
    }
    @if (pushed().length === 0) {
      <p>Nothing else would be pushed.</p>
    } @else {
      <div class="wide" tabindex="0" role="group" [attr.aria-label]="'What would be pushed, ' + heading()">
        <table>
          <caption>
            What would be pushed
          </caption>
          <thead>
            <tr>
              <th scope="col">Key date</th>
              <th scope="col">Margin now</th>
              <th scope="col">Margin then</th>
              <th scope="col">Missed now</th>
              <th scope="col">Missed then</th>
            </tr>
          </thead>
          <tbody>
            @for (row of pushed(); track row.keyDateId) {
              <tr>
                <th scope="row">{{ row.name }}</th>
                <td class="figures">{{ row.marginBefore }}</td>
                <td class="figures">{{ row.marginAfter }}</td>
                <td class="figures">{{ row.before }} %</td>
                <td class="figures">{{ row.after }} %</td>
              </tr>
            }
          </tbody>
        </table>
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    .wide {
      overflow-x: auto;
    }
    th,
    td {
      padding: var(--space-1) var(--space-3) var(--space-1) 0;
      text-align: start;
    }
    caption {
      text-align: start;
    }
  `,
})
export class PromiseWay {
  private readonly clock = inject(STUDIO_CLOCK);

  readonly heading = input.required<string>();
  readonly lead = input.required<string>();
  readonly way = input.required<PromiseWayView>();
  readonly asked = input.required<KeyDateView | null>();

  protected readonly rows = computed(() => {
    const { p50, p80, p90 } = this.way();
    const line = (share: number, at: number | null) => ({
      share,
      when: sayEarliest(at, this.clock.zone()),
      against: sayAgainst(at, this.asked()) || '–',
    });
    return [line(50, p50), line(80, p80), line(90, p90)];
  });
  protected readonly drivers = computed(() =>
    this.way()
      .drivers.slice(0, MOST_DRIVERS)
      .map((driver) => ({ ...driver, share: Math.round(driver.share * 100) })),
  );
  protected readonly pushed = computed(() =>
    pushedBy(this.way()).map((date) => ({
      keyDateId: date.keyDateId,
      name: `${date.productionName}, ${KEY_DATE_NAMES[date.kind].toLowerCase()}`,
      marginBefore: sayMargin(date.marginBefore),
      marginAfter: sayMargin(date.marginAfter),
      before: Math.round(date.missChanceBefore * 100),
      after: Math.round(date.missChanceAfter * 100),
    })),
  );
}
