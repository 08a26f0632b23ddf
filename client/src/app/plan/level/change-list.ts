import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { PlanChange } from '@common/contract';

/** Changes shown before one asks for all of them. */
const FIRST = 8;

/** Changes between two plans, a sentence each. */
@Component({
  selector: 'fettle-change-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  template: `
    <ul>
      @for (change of shown(); track $index) {
        <li>{{ change.sentence }}</li>
      } @empty {
        <li class="quiet">Nothing changes.</li>
      }
    </ul>
    @if (rest(); as rest) {
      <button matButton type="button" (click)="all.set(true)">Show {{ rest }} more</button>
    }
  `,
  styles: `
    ul {
      margin: 0;
      padding-inline-start: 1.15rem;
    }
    li + li {
      margin-top: 3px;
    }
  `,
})
export class ChangeList {
  readonly changes = input.required<readonly PlanChange[]>();

  protected readonly all = signal(false);
  protected readonly shown = computed(() => (this.all() ? this.changes() : this.changes().slice(0, FIRST)));
  protected readonly rest = computed(() => this.changes().length - this.shown().length);
}
