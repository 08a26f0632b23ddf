import { ChangeDetectionStrategy, Component, computed } from '@angular/core';
import { endpoints } from '@common/contract';
import { onLiveEvent, readEndpoint } from '../api';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { DateCard } from './date-card';
import { ForecastBasis } from './forecast-basis';
import { MeasuresBoard } from './rescues/measures-board';

/** Every key date ahead: its margin, how it stands, and what leads to it. */
@Component({
  selector: 'fettle-dates-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DateCard, ForecastBasis, MeasuresBoard, PageHeading, StatePanel],
  template: `
    <div class="page">
      <fettle-page-heading title="Dates" [lead]="lead()" />
      <fettle-state-panel
        [read]="dates"
        emptyTitle="No key dates ahead"
        emptyHint="Give a production its delivery or its technical rehearsal, and it shows here with what leads to it."
      >
        <fettle-forecast-basis [read]="forecast" />
        <fettle-measures-board />
        <div class="cards">
          @for (risk of dates.value(); track risk.keyDateId) {
            <fettle-date-card
              [risk]="risk"
              [productions]="byId()"
              [forecast]="forecasts().get(risk.keyDateId) ?? null"
              [draws]="forecast.value()?.draws ?? 0"
            />
          }
        </div>
      </fettle-state-panel>
    </div>
  `,
  styles: `
    .cards {
      display: grid;
      gap: var(--space-4);
      grid-template-columns: repeat(auto-fill, minmax(min(26rem, 100%), 1fr));
      align-items: start;
    }
  `,
})
export class DatesPage {
  protected readonly dates = readEndpoint(endpoints.readDates);
  protected readonly forecast = readEndpoint(endpoints.readForecast);
  protected readonly forecasts = computed(
    () => new Map(this.forecast.value()?.keyDates.map((one) => [one.keyDateId, one])),
  );
  private readonly productions = readEndpoint(endpoints.listProductions);
  protected readonly byId = computed(() => new Map(this.productions.value()?.map((one) => [one.id, one])));
  protected readonly lead = computed(() => {
    const dates = this.dates.value();
    if (!dates) return '';
    const count = (state: string): number => dates.filter((one) => one.state === state).length;
    const parts = [
      count('missed') > 0 ? `${count('missed')} late` : '',
      count('close') > 0 ? `${count('close')} close` : '',
      count('unplanned') > 0 ? `${count('unplanned')} not planned yet` : '',
    ].filter((part) => part !== '');
    return parts.length > 0
      ? `Of ${dates.length} ahead: ${parts.join(', ')}.`
      : `All ${dates.length} ahead are in time as the plan stands.`;
  });

  constructor() {
    onLiveEvent((event) => {
      if (event === null || event.kind === 'plan-revised') {
        this.dates.reload();
        this.forecast.reload();
      }
      if (event === null || event.kind === 'record-changed') {
        this.dates.reload();
        this.forecast.reload();
        this.productions.reload();
      }
    });
  }
}
