import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** What a page is, in its own words, with its actions at the far end. */
@Component({
  selector: 'fettle-page-heading',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="words">
      <ng-content select="[above]" />
      <h1>
        <ng-content select="[before]" /><span>{{ title() }}</span>
      </h1>
      @if (lead()) {
        <p class="quiet">{{ lead() }}</p>
      }
    </div>
    <div class="actions no-print"><ng-content /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-3) var(--space-5);
      align-items: end;
      justify-content: space-between;
    }
    .words {
      display: grid;
      gap: var(--space-1);
      min-width: 0;
      max-width: 46rem;
    }
    h1 {
      display: flex;
      align-items: center;
      overflow-wrap: anywhere;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-2);
    }
    .actions:empty {
      display: none;
    }
  `,
})
export class PageHeading {
  readonly title = input.required<string>();
  readonly lead = input('');
}
