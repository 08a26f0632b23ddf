import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { EndpointRead } from '../api';
import { Notice } from './notice';

/**
 * Stands around whatever a read shows, and says how the read stands: under way, nothing there yet and what to do first, gone
 * wrong and how to try again, or shown from before. The content is shown as soon as there is a value that is not empty; put it
 * in an `@if` on that value. An element marked `emptyAction` stands under the words for an empty read.
 */
@Component({
  selector: 'fettle-state-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Notice],
  template: `
    @switch (view()) {
      @case ('loading') {
        <p class="loading quiet" role="status">Reading…</p>
      }
      @case ('empty') {
        <div class="empty">
          <h2>{{ emptyTitle() }}</h2>
          <p class="quiet">{{ emptyHint() }}</p>
          <ng-content select="[emptyAction]" />
        </div>
      }
      @case ('failed') {
        <fettle-notice tone="fault">
          <strong>{{ read().failure()?.title }}.</strong> {{ read().failure()?.detail }}
          <div class="retry">
            <button matButton="outlined" type="button" (click)="read().reload()">Try again</button>
            @if (read().failure()?.requestId; as id) {
              <span class="quiet small">If you ask for help, name request {{ id }}.</span>
            }
          </div>
        </fettle-notice>
      }
      @default {
        @if (read().failure(); as failure) {
          <fettle-notice class="stale" tone="caution">
            This is from before: {{ failure.detail }}
            <button matButton type="button" (click)="read().reload()">Try again</button>
          </fettle-notice>
        }
        <ng-content />
      }
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    .loading {
      padding: var(--space-5) 0;
      animation: appear 0.2s 0.2s backwards;
    }
    @keyframes appear {
      from {
        opacity: 0;
      }
    }
    .empty {
      display: grid;
      justify-items: start;
      gap: var(--space-2);
      max-width: 38rem;
      padding: var(--space-5);
      border: 1px dashed var(--rule-strong);
      border-radius: 6px;
    }
    /* On a board of its own it needs no second frame. */
    :host-context(.board) .empty {
      padding: var(--space-1) 0;
      border: 0;
    }
    :host-context(.board) h2 {
      font-size: 1rem;
    }
    :host-context(.board) .loading {
      padding: var(--space-2) 0;
    }
    .retry {
      display: flex;
      flex-wrap: wrap;
      gap: var(--space-3);
      align-items: center;
      margin-top: var(--space-2);
    }
    .stale {
      margin-bottom: var(--space-3);
    }
  `,
  host: { '[attr.aria-busy]': "view() === 'loading'" },
})
export class StatePanel {
  readonly read = input.required<Pick<EndpointRead<unknown>, 'state' | 'failure' | 'reload'>>();
  /** What to say where the read is empty; a list with nothing in it counts as empty. */
  readonly emptyTitle = input('Nothing here yet');
  /** What to do first. */
  readonly emptyHint = input('');

  protected readonly view = computed(() => {
    const state = this.read().state();
    return state === 'idle' ? 'loading' : state;
  });
}
