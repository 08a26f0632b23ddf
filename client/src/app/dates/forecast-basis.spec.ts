import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { endpoints, type ForecastView } from '@common/contract';
import { ApiFailure, LiveEvents, OPEN_EVENT_SOURCE, type ReadState } from '../api';
import { FakeEventSource } from '../api/testing/fake-event-source';
import { ForecastBasis } from './forecast-basis';

const FORECAST: ForecastView = {
  revision: 3,
  madeAt: '2026-12-01T09:00:00.000Z',
  draws: 1000,
  drawsAsked: 1000,
  seed: 1,
  overrun: { learning: 'past-hours', middlePermille: 1080, spreadPermille: 90, pastStages: 12 },
  keyDates: [],
  productions: [],
  stages: [{ stageId: 'a', p10: 1, p50: 2, p80: 3, p90: 4 }],
};

const stopped = new ApiFailure({
  kind: 'forecast-stopped',
  status: 409,
  title: 'The forecast was stopped',
  detail: 'It was stopped before it had begun. Ask for it again.',
  requestId: 'r-1',
});

@Component({
  selector: 'fettle-basis-under-test',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ForecastBasis],
  template: `<fettle-forecast-basis [read]="read" />`,
})
class Page {
  reloads = 0;
  readonly state = signal<ReadState>('loading');
  readonly value = signal<ForecastView | undefined>(undefined);
  readonly failure = signal<ApiFailure | null>(null);
  readonly read = {
    state: this.state,
    value: this.value,
    failure: this.failure,
    reload: () => (this.reloads += 1),
    set: (next: ForecastView) => this.value.set(next),
  };
}

function setUp(state: ReadState, value?: ForecastView, failure: ApiFailure | null = null) {
  const source = new FakeEventSource('/api/live');
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      { provide: OPEN_EVENT_SOURCE, useValue: () => source as unknown as EventSource },
    ],
  });
  TestBed.inject(LiveEvents).connect();
  const fixture = TestBed.createComponent(Page);
  const page = fixture.componentInstance;
  page.state.set(state);
  page.value.set(value);
  page.failure.set(failure);
  fixture.detectChanges();
  const host = fixture.nativeElement as HTMLElement;
  const text = (): string => {
    fixture.detectChanges();
    return host.textContent.replace(/\s+/g, ' ').trim();
  };
  const click = (name: string): void => {
    const button = [...host.querySelectorAll('button')].find((one) => one.textContent.trim() === name);
    if (!button) throw new Error(`There is no button ${name}.`);
    button.click();
  };
  return { page, source, host, text, click, http: TestBed.inject(HttpTestingController) };
}

describe('what the chances are from', () => {
  it('is not known while the plan is lived through; how far that has come is told, and it can be stopped', () => {
    const { source, host, text, click, http } = setUp('loading');
    expect(text()).toContain('Living the plan through');
    expect(host.querySelector('[role="progressbar"]')?.getAttribute('aria-valuenow')).toBeNull();
    source.tell({ kind: 'forecast', revision: 3, draws: 320, drawsAsked: 1000 });
    expect(text()).toContain('320 of 1,000 draws');
    expect(host.querySelector('[role="progressbar"]')?.getAttribute('aria-valuenow')).toBe('32');
    click('Stop');
    http.expectOne({ method: endpoints.stopForecast.method, url: endpoints.stopForecast.path }).flush(null);
  });

  it('is said to be from before while it is made again, and the way come before is forgotten', () => {
    const { page, source, text } = setUp('stale', FORECAST);
    source.tell({ kind: 'forecast', revision: 3, draws: 900, drawsAsked: 1000 });
    expect(text()).toContain('These chances are from before: the plan is being lived through again.');
    expect(text()).toContain('900 of 1,000 draws');
    page.state.set('ready');
    expect(text()).toContain('12 finished stages say that the studio needs 108 % of its estimates.');
    expect(text()).not.toContain('Stop');
    page.state.set('stale');
    expect(text()).not.toContain('900');
  });

  it('can be asked for again where it was stopped or failed', () => {
    const { page, text, click } = setUp('failed', undefined, stopped);
    expect(text()).toContain('The chances can’t be told now.');
    expect(text()).toContain('It was stopped before it had begun.');
    click('Ask again');
    expect(page.reloads).toBe(1);
  });

  it('says that draws are missing, and makes them', () => {
    const { page, text, click } = setUp('ready', { ...FORECAST, draws: 320 });
    expect(text()).toContain('320 of 1,000 draws, for it was stopped.');
    click('Make all draws');
    expect(page.reloads).toBe(1);
  });
});
