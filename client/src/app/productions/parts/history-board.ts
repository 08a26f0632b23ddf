import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { endpoints } from '@common/contract';
import { readEndpoint } from '../../api';
import { Moment } from '../../ui/moment';
import { StatePanel } from '../../ui/state-panel';

/** How many entries are read at once. */
const ENTRIES = 30;

/** What was changed in one record, when and by whom, newest first; read when it is opened. */
@Component({
  selector: 'fettle-history-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Moment, StatePanel],
  template: `
    <section class="board" aria-labelledby="history-heading">
      <h2 id="history-heading">History</h2>
      <fettle-state-panel
        [read]="entries"
        emptyTitle="Nothing yet"
        emptyHint="Changes are listed here as they are made."
      >
        <ol class="plain-list small" tabindex="0" aria-label="Changes, newest first">
          @for (entry of entries.value() ?? []; track entry.id) {
            <li>
              <p>{{ entry.sentence }}</p>
              <p class="quiet"><fettle-moment [at]="entry.at" /> · {{ entry.accountName ?? 'Fettle itself' }}</p>
            </li>
          }
        </ol>
      </fettle-state-panel>
    </section>
  `,
  styles: `
    ol {
      max-height: 24rem;
      overflow-y: auto;
    }
    li {
      padding-block: var(--space-2);
      border-top: 1px solid var(--rule);
    }
    li:first-child {
      border-top: 0;
    }
  `,
})
export class HistoryBoard {
  readonly subjectId = input.required<string>();

  protected readonly entries = readEndpoint(endpoints.readAudit, () => ({
    query: { subjectId: this.subjectId(), limit: ENTRIES },
  }));
}
