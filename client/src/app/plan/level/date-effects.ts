import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { LevelProposal } from '@common/contract';
import { marginState } from '../date-margins';
import type { PlanNames } from '../wording/plan-names';
import { sayLoss, sayMargin } from '../wording/say-margin';

/** How one key date fares in two plans; margins in minutes by the clock. */
export type KeyDateFare = LevelProposal['keyDates'][number];

/** How key dates fare in two plans, those that change first; shape and word tell a gain from a loss. */
@Component({
  selector: 'fettle-date-effects',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="scroll-x">
      <table class="ledger">
        <caption class="visually-hidden">
          Margins of the key dates before and after
        </caption>
        <thead>
          <tr>
            <th scope="col">Key date</th>
            <th scope="col">Now</th>
            <th scope="col">Then</th>
            <th scope="col">Change</th>
          </tr>
        </thead>
        <tbody>
          @for (line of lines(); track line.id) {
            <tr>
              <th scope="row">{{ line.name }}</th>
              <td [class.late]="line.lateBefore">{{ line.before }}</td>
              <td [class.late]="line.lateAfter">{{ line.after }}</td>
              <td><span class="way" aria-hidden="true" [class]="line.way"></span>{{ line.change }}</td>
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  styles: `
    .late {
      color: var(--fault);
      font-weight: 600;
    }
    td {
      white-space: nowrap;
    }
    .way {
      display: inline-block;
      width: 10px;
      margin-inline-end: 5px;
      border: 4.5px solid transparent;
    }
    .way.gains {
      border-top: 0;
      border-bottom: 7px solid var(--verdigris);
    }
    .way.loses {
      border-bottom: 0;
      border-top: 7px solid var(--resin);
    }
  `,
})
export class DateEffects {
  readonly effects = input.required<readonly KeyDateFare[]>();
  readonly names = input.required<PlanNames>();

  protected readonly lines = computed(() =>
    [...this.effects()]
      .sort((a, b) => gain(a) - gain(b) || (a.marginAfter ?? 0) - (b.marginAfter ?? 0))
      .sort((a, b) => Number(gain(b) !== 0) - Number(gain(a) !== 0))
      .map((effect) => ({
        id: effect.keyDateId,
        name: this.names().keyDateInFull(effect.keyDateId),
        before: sayMargin(effect.marginBefore),
        after: sayMargin(effect.marginAfter),
        lateBefore: marginState(effect.marginBefore) === 'missed',
        lateAfter: marginState(effect.marginAfter) === 'missed',
        change: sayLoss({ before: effect.marginBefore, after: effect.marginAfter }) || 'newly planned',
        way: gain(effect) > 0 ? 'way gains' : gain(effect) < 0 ? 'way loses' : 'way',
      })),
  );
}

function gain(effect: KeyDateFare): number {
  if (effect.marginBefore === null || effect.marginAfter === null) return 0;
  return effect.marginAfter - effect.marginBefore;
}
