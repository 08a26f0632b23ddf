import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { endpoints } from '@common/contract';
import { Api, onLiveEvent, readEndpoint, toApiFailure } from '../../api';
import { Notice } from '../../ui/notice';

/** What the working plan counts on, each to be dropped again; nothing where it counts on nothing. */
@Component({
  selector: 'fettle-measures-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Notice],
  template: `
    @if (measures.value(); as taken) {
      @if (taken.length > 0) {
        <section class="board" aria-labelledby="measures-heading">
          <h2 id="measures-heading">The working plan counts on</h2>
          @if (failure(); as sentence) {
            <fettle-notice tone="fault" [text]="sentence" />
          }
          <ul class="plain-list">
            @for (one of taken; track $index) {
              <li>
                <span>{{ one.sentence }}</span>
                <button matButton type="button" [disabled]="busy()" (click)="drop($index)">
                  Drop it<span class="visually-hidden">: {{ one.sentence }}</span>
                </button>
              </li>
            }
          </ul>
        </section>
      }
    }
  `,
  styles: `
    section {
      margin-bottom: var(--space-4);
    }
    li {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-1) var(--space-3);
      align-items: center;
      justify-content: space-between;
    }
  `,
})
export class MeasuresBoard {
  private readonly api = inject(Api);
  protected readonly measures = readEndpoint(endpoints.listMeasures);
  protected readonly failure = signal<string | null>(null);
  protected readonly busy = signal(false);

  constructor() {
    onLiveEvent((event) => {
      if (event === null || event.kind === 'plan-revised') this.measures.reload();
    });
  }

  protected async drop(measure: number): Promise<void> {
    this.busy.set(true);
    this.failure.set(null);
    try {
      const { revision } = await this.api.callEndpoint(endpoints.readPlan, {});
      await this.api.callEndpoint(endpoints.dropMeasure, { body: { revision, measure } });
      this.measures.reload();
    } catch (error) {
      this.failure.set(toApiFailure(error).detail);
    } finally {
      this.busy.set(false);
    }
  }
}
