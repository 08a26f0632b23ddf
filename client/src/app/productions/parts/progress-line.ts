import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** How many stages of all are finished, as words and as a ruled line that fills. */
@Component({
  selector: 'fettle-progress-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span class="small figures">{{ words() }}</span>
    <span class="line" aria-hidden="true"><span class="done" [style.inline-size.%]="share()"></span></span>
  `,
  styles: `
    :host {
      display: grid;
      gap: 3px;
    }
    .line {
      height: 5px;
      border: 1px solid var(--rule-strong);
      border-radius: 3px;
      overflow: hidden;
    }
    .done {
      display: block;
      height: 100%;
      background: var(--verdigris);
    }
  `,
})
export class ProgressLine {
  readonly finished = input.required<number>();
  readonly all = input.required<number>();

  protected readonly share = computed(() => (this.all() === 0 ? 0 : (100 * this.finished()) / this.all()));
  protected readonly words = computed(() =>
    this.all() === 0 ? 'No stages yet' : `${this.finished()} of ${this.all()} stages finished`,
  );
}
