import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import type { KeyDateView } from '@common/contract';
import { KEY_DATE_NAMES, keyDateCautions } from '@common/domain/key-date';
import { firstValueFrom } from 'rxjs';
import { Moment } from '../../ui/moment';
import { Notice } from '../../ui/notice';
import { KeyDateDialog, type KeyDateDialogData } from '../forms/key-date-dialog';
import { ProductionStore } from '../production-store';

/** A production's key dates in order, with what is odd about that order. */
@Component({
  selector: 'fettle-key-dates-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Moment, Notice],
  template: `
    <section class="board" aria-labelledby="key-dates-heading">
      <div class="row-ends">
        <h2 id="key-dates-heading">Key dates</h2>
        @if (canEdit()) {
          <button matButton type="button" (click)="edit(null)">Add a key date</button>
        }
      </div>
      <ul class="plain-list">
        @for (date of dates(); track date.id) {
          <li>
            <div>
              <p class="name">{{ names[date.kind] }}</p>
              <p><fettle-moment [at]="date.at" /></p>
              <p class="small quiet">
                {{ date.strength === 'hard' ? 'Hard: it can’t move' : 'Wished; weight ' + date.weight }}
              </p>
              @if (piecesOf(date); as pieces) {
                <p class="small quiet">For {{ pieces }}</p>
              }
            </div>
            @if (canEdit()) {
              <div class="do">
                <button matButton type="button" [attr.aria-label]="'Change ' + names[date.kind]" (click)="edit(date)">
                  Change
                </button>
                <button
                  matButton
                  type="button"
                  [attr.aria-label]="'Remove ' + names[date.kind]"
                  (click)="store.removeKeyDate(date, names[date.kind])"
                >
                  Remove
                </button>
              </div>
            }
          </li>
        } @empty {
          <li class="quiet">None yet. Without a key date the plan does not know what to hurry for.</li>
        }
      </ul>
      @for (caution of cautions(); track caution) {
        <fettle-notice tone="caution" [text]="caution" />
      }
    </section>
  `,
  styles: `
    li {
      display: flex;
      gap: var(--space-3);
      justify-content: space-between;
      padding-block: var(--space-2);
      border-top: 1px solid var(--rule);
    }
    li:first-child {
      border-top: 0;
    }
    .name {
      font-weight: 600;
    }
    .do {
      display: grid;
      align-content: start;
    }
  `,
})
export class KeyDatesBoard {
  private readonly dialog = inject(MatDialog);

  readonly canEdit = input(false);

  protected readonly store = inject(ProductionStore);
  protected readonly names = KEY_DATE_NAMES;
  protected readonly dates = computed(() =>
    (this.store.production()?.keyDates ?? []).toSorted((a, b) => a.at.localeCompare(b.at)),
  );
  protected readonly cautions = computed(() =>
    keyDateCautions(this.dates().map(({ kind, at }) => ({ kind, at: Date.parse(at) }))),
  );

  /** The pieces that a date is for; empty where it is for all. */
  protected piecesOf(date: KeyDateView): string {
    const pieces = this.store.production()?.piecesInOrder ?? [];
    return pieces
      .filter((piece) => date.pieceIds.includes(piece.id))
      .map((piece) => piece.name)
      .join(', ');
  }

  protected async edit(keyDate: KeyDateView | null): Promise<void> {
    const production = this.store.production();
    if (!production) {
      return;
    }
    const opened = this.dialog.open<KeyDateDialog, KeyDateDialogData, boolean>(KeyDateDialog, {
      data: {
        productionId: production.id,
        keyDate,
        pieces: production.piecesInOrder.map((piece) => ({ value: piece.id, label: piece.name })),
      },
      width: '32rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.store.read.reload();
    }
  }
}
