import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Title } from '@angular/platform-browser';
import { Router, RouterLink } from '@angular/router';
import type { ProductionView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { SessionStore } from '../session';
import { MarkChip } from '../ui/mark-chip';
import { PageHeading } from '../ui/page-heading';
import { StatePanel } from '../ui/state-panel';
import { HoursPipe } from '../ui/time-pipes';
import { ImportDialog, type ImportDialogData } from './forms/import-dialog';
import { PieceDialog, type PieceDialogData } from './forms/piece-dialog';
import { ProductionDialog, type ProductionDialogData } from './forms/production-dialog';
import { HistoryBoard } from './parts/history-board';
import { KeyDatesBoard } from './parts/key-dates-board';
import { ProgressLine } from './parts/progress-line';
import { PurchasesBoard } from './parts/purchases-board';
import { ProductionStore } from './production-store';
import { PRODUCTION_STATE_WORDS } from './words';

/** One production: its pieces, key dates, purchases and history. */
@Component({
  selector: 'fettle-production-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    HistoryBoard,
    HoursPipe,
    KeyDatesBoard,
    MarkChip,
    MatButton,
    PageHeading,
    ProgressLine,
    PurchasesBoard,
    RouterLink,
    StatePanel,
  ],
  providers: [ProductionStore],
  templateUrl: './production-page.html',
  styleUrl: './production-page.scss',
})
export class ProductionPage {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  /** From the address. */
  readonly id = input.required<string>();

  protected readonly store = inject(ProductionStore);
  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly stateWords = computed(() => {
    const production = this.store.production();
    return production ? PRODUCTION_STATE_WORDS[production.state] : '';
  });

  constructor() {
    const title = inject(Title);
    effect(() => this.store.show(this.id()));
    effect(() => {
      const production = this.store.production();
      if (production) {
        title.setTitle(`${production.name} · Fettle`);
      }
    });
  }

  protected async change(production: ProductionView): Promise<void> {
    const opened = this.dialog.open<ProductionDialog, ProductionDialogData, ProductionView | 'read-again'>(
      ProductionDialog,
      { data: { production, others: [] }, width: '36rem' },
    );
    const saved = await firstValueFrom(opened.afterClosed());
    if (saved === 'read-again') {
      this.store.read.reload();
    } else if (saved) {
      this.store.read.set(saved);
    }
  }

  protected async addPiece(production: ProductionView): Promise<void> {
    const opened = this.dialog.open<PieceDialog, PieceDialogData, ProductionView>(PieceDialog, {
      data: { productionId: production.id, names: this.store },
      width: '44rem',
    });
    const saved = await firstValueFrom(opened.afterClosed());
    if (saved) {
      this.store.read.set(saved);
      const known = new Set(production.piecesInOrder.map((piece) => piece.id));
      const added = saved.piecesInOrder.find((piece) => !known.has(piece.id));
      if (added) {
        await this.router.navigate(['/productions', production.id, 'pieces', added.id]);
      }
    }
  }

  protected async importStages(production: ProductionView): Promise<void> {
    const opened = this.dialog.open<ImportDialog, ImportDialogData, boolean>(ImportDialog, {
      data: { productionId: production.id },
      width: '52rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.store.read.reload();
    }
  }
}
