import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatProgressBar } from '@angular/material/progress-bar';
import { endpoints, type ForecastView } from '@common/contract';
import { Api, type EndpointRead, onLiveEvent } from '../api';
import { Notice } from '../ui/notice';
import { Toasts } from '../ui/toasts';
import { sayBasis, sayDraws } from './say-chance';

/** What the chances on the page are drawn from, how far a forecast under way has come, and how to stop it or ask again. */
@Component({
  selector: 'fettle-forecast-basis',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatProgressBar, Notice],
  template: `
    <p class="small quiet" role="status">{{ sentence() }}</p>
    @if (underWay()) {
      <div class="way">
        <mat-progress-bar
          aria-label="Draws made"
          [mode]="progress() ? 'determinate' : 'indeterminate'"
          [value]="progress()?.percent ?? 0"
        />
        <span class="small quiet figures">{{ progress()?.words }}</span>
        <button matButton type="button" (click)="stop()">Stop</button>
      </div>
    } @else if (read().failure(); as failure) {
      <fettle-notice tone="caution">
        {{ failure.detail }}
        <button matButton type="button" (click)="read().reload()">Ask again</button>
      </fettle-notice>
    } @else if (isPartial()) {
      <button matButton type="button" (click)="read().reload()">Make all draws</button>
    }
  `,
  styles: `
    :host {
      display: block;
      margin-bottom: var(--space-3);
    }
    .way {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-2) var(--space-3);
      align-items: center;
    }
    mat-progress-bar {
      flex: 1 1 10rem;
      max-width: 24rem;
    }
  `,
})
export class ForecastBasis {
  private readonly api = inject(Api);
  private readonly toasts = inject(Toasts);

  readonly read = input.required<EndpointRead<ForecastView>>();

  protected readonly underWay = computed(() => {
    const read = this.read();
    return read.state() === 'loading' || (read.state() === 'stale' && read.failure() === null);
  });
  /** Draws made so far; forgotten when another forecast begins. */
  private readonly made = linkedSignal<boolean, { draws: number; drawsAsked: number } | null>({
    source: this.underWay,
    computation: () => null,
  });
  protected readonly progress = computed(() => {
    const made = this.made();
    return made && { percent: (100 * made.draws) / made.drawsAsked, words: sayDraws(made) };
  });
  protected readonly isPartial = computed(() => {
    const forecast = this.read().value();
    return forecast !== undefined && forecast.draws < forecast.drawsAsked;
  });
  protected readonly sentence = computed(() => {
    const forecast = this.read().value();
    if (this.underWay()) {
      return forecast
        ? 'These chances are from before: the plan is being lived through again.'
        : 'Living the plan through, to see what each date is worth…';
    }
    if (this.read().failure() !== null) {
      return forecast ? 'These chances are from before.' : 'The chances can’t be told now.';
    }
    return forecast ? sayBasis(forecast) : '';
  });

  constructor() {
    onLiveEvent((event) => {
      if (event?.kind === 'forecast' && this.underWay()) this.made.set(event);
    });
  }

  protected async stop(): Promise<void> {
    try {
      await this.api.callEndpoint(endpoints.stopForecast);
    } catch (error) {
      this.toasts.fail(error);
    }
  }
}
