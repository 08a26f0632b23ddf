import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { sayUnmet } from '@common/planning';
import { formatDayAndTime } from '@common/time/format-instant';
import { PlanStore } from '../plan-store';

/** Everything that can't be met: the rule, by how much, and what would mend it. */
@Component({
  selector: 'fettle-unmet-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  template: `
    <header>
      <h2 tabindex="-1">What can’t be met</h2>
      <button matButton type="button" (click)="closed.emit()">Close</button>
    </header>
    <ul class="plain-list">
      @for (one of sentences(); track one.key) {
        <li>
          <p>{{ one.text }}</p>
          @if (one.stageId; as stageId) {
            <button matButton type="button" (click)="show.emit(stageId)">Show {{ one.stageName }}</button>
          }
        </li>
      } @empty {
        <li>Everything that was asked for is met.</li>
      }
    </ul>
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--space-3);
      align-content: start;
      min-height: 0;
      padding: var(--space-4);
      overflow-y: auto;
      background: var(--gesso);
      border-inline-start: 1px solid var(--rule-strong);
      font-size: 0.875rem;
    }
    header {
      display: flex;
      gap: var(--space-3);
      align-items: center;
      justify-content: space-between;
    }
    h2 {
      font-size: 1.1875rem;
    }
    li {
      padding: var(--space-2) 0 var(--space-2) var(--space-3);
      border-inline-start: 4px solid var(--resin);
      border-bottom: 1px solid var(--rule);
    }
  `,
})
export class UnmetPanel {
  private readonly plan = inject(PlanStore);

  readonly closed = output();
  readonly show = output<string>();

  protected readonly sentences = computed(() => {
    const view = this.plan.view();
    const names = this.plan.names();
    if (!view || !names) return [];
    return view.unmet.map((one, index) => {
      const text = sayUnmet(one, names, (at) => formatDayAndTime(at, view.zone));
      const stageId = one.stageIds.at(0) ?? null;
      return { key: index, text: capital(text), stageId, stageName: stageId ? names.stage(stageId) : '' };
    });
  });
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
