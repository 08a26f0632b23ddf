import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import type { PurchaseView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { MoneyPipe } from '../../ui/money';
import { DayPipe } from '../../ui/time-pipes';
import { PurchaseDialog, type PurchaseDialogData } from '../forms/purchase-dialog';
import { ProductionStore } from '../production-store';

/** A production's bought-in parts: which stage needs each, and how far it is on its way. */
@Component({
  selector: 'fettle-purchases-board',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DayPipe, MatButton, MoneyPipe],
  template: `
    <section class="board" aria-labelledby="purchases-heading">
      <div class="row-ends">
        <h2 id="purchases-heading">Purchases</h2>
        @if (canEdit() && hasStages()) {
          <button matButton type="button" (click)="edit(null)">Add a purchase</button>
        }
      </div>
      <ul class="plain-list">
        @for (purchase of purchases(); track purchase.id) {
          <li>
            <div>
              <p class="name">{{ purchase.name }}</p>
              <p class="small quiet">
                {{ purchase.supplier || 'No supplier yet' }} · needed for {{ store.stageName(purchase.stageId) }}
              </p>
              <p class="small" [class.done]="purchase.receivedOn">
                @if (purchase.receivedOn; as day) {
                  Received {{ day | day }}
                } @else if (purchase.orderedOn; as day) {
                  Ordered {{ day | day }}
                  @if (purchase.dueOn; as due) {
                    , due {{ due | day }}
                  }
                } @else {
                  To order; takes {{ purchase.leadDays }} {{ purchase.leadDays === 1 ? 'day' : 'days' }}
                }
                @if (purchase.costMinor !== undefined) {
                  · {{ purchase.costMinor | money }}
                }
              </p>
            </div>
            @if (canEdit()) {
              <div class="do">
                <button matButton type="button" [attr.aria-label]="'Change ' + purchase.name" (click)="edit(purchase)">
                  Change
                </button>
                <button
                  matButton
                  type="button"
                  [attr.aria-label]="'Remove ' + purchase.name"
                  (click)="store.removePurchase(purchase)"
                >
                  Remove
                </button>
              </div>
            }
          </li>
        } @empty {
          <li class="quiet">
            {{
              hasStages()
                ? 'None yet. Parts bought in, such as castors, profiles or fabric: the stage that needs one waits for it.'
                : 'Add a piece with stages first; a purchase belongs to the stage that needs it.'
            }}
          </li>
        }
      </ul>
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
      font-weight: 500;
    }
    .done {
      color: var(--verdigris);
    }
    .do {
      display: flex;
      flex-wrap: wrap;
      align-content: start;
      justify-content: end;
    }
  `,
})
export class PurchasesBoard {
  private readonly dialog = inject(MatDialog);

  readonly canEdit = input(false);

  protected readonly store = inject(ProductionStore);
  protected readonly purchases = computed(() => this.store.production()?.purchases ?? []);
  protected readonly hasStages = computed(() => (this.store.production()?.stages ?? 0) > 0);

  protected async edit(purchase: PurchaseView | null): Promise<void> {
    const production = this.store.production();
    if (!production) {
      return;
    }
    const stages = production.stagesInOrder.map((stage) => ({
      value: stage.id,
      label: this.store.stageName(stage.id),
    }));
    const opened = this.dialog.open<PurchaseDialog, PurchaseDialogData, boolean>(PurchaseDialog, {
      data: { productionId: production.id, purchase, stages },
      width: '36rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.store.read.reload();
    }
  }
}
