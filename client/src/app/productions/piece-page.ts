import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Title } from '@angular/platform-browser';
import { Router, RouterLink } from '@angular/router';
import type { PieceView, StageView } from '@common/contract';
import { firstValueFrom } from 'rxjs';
import { SessionStore } from '../session';
import { MarkChip } from '../ui/mark-chip';
import { Notice } from '../ui/notice';
import { PageHeading } from '../ui/page-heading';
import { sayHours } from '../ui/say-time';
import { StatePanel } from '../ui/state-panel';
import { PieceNameDialog } from './forms/piece-name-dialog';
import { StageDialog, type StageDialogData } from './forms/stage-dialog';
import { HistoryBoard } from './parts/history-board';
import { StageLine } from './parts/stage-line';
import { ProductionStore } from './production-store';

/** One piece: its stages in order, and what each waits for. */
@Component({
  selector: 'fettle-piece-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HistoryBoard, MarkChip, MatButton, Notice, PageHeading, RouterLink, StageLine, StatePanel],
  providers: [ProductionStore],
  templateUrl: './piece-page.html',
  styles: `
    .whole {
      display: grid;
      gap: var(--space-5);
    }
    .stages > li {
      border-top: 1px solid var(--rule);
    }
    .stages > li:first-child {
      border-top: 0;
    }
    .note {
      white-space: pre-line;
    }
  `,
})
export class PiecePage {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  /** The production's id, from the address. */
  readonly id = input.required<string>();
  /** From the address. */
  readonly pieceId = input.required<string>();

  protected readonly store = inject(ProductionStore);
  protected readonly isOffice = inject(SessionStore).isOffice();
  protected readonly one = computed(() => this.store.pieces().find(({ piece }) => piece.id === this.pieceId()) ?? null);
  protected readonly lead = computed(() => {
    const one = this.one();
    return one === null
      ? ''
      : `${one.finished} of ${one.stages.length} stages finished · ${sayHours(one.handsOnMinutes)} hands-on`;
  });

  constructor() {
    const title = inject(Title);
    effect(() => this.store.show(this.id()));
    effect(() => {
      const one = this.one();
      if (one) {
        title.setTitle(`${one.piece.name} · Fettle`);
      }
    });
  }

  /** Opens the form of a stage; null adds one at the end. */
  protected async edit(stage: StageView | null): Promise<void> {
    const production = this.store.production();
    const one = this.one();
    if (!production || !one) {
      return;
    }
    const opened = this.dialog.open<StageDialog, StageDialogData, boolean>(StageDialog, {
      data: { production, piece: one.piece, stage, lastStageId: one.stages.at(-1)?.id ?? null, names: this.store },
      width: '52rem',
      maxWidth: '100vw',
    });
    await firstValueFrom(opened.afterClosed());
    this.store.read.reload();
  }

  protected async rename(piece: PieceView): Promise<void> {
    const opened = this.dialog.open<PieceNameDialog, PieceView, boolean>(PieceNameDialog, {
      data: piece,
      width: '32rem',
    });
    if (await firstValueFrom(opened.afterClosed())) {
      this.store.read.reload();
    }
  }

  protected async remove(piece: PieceView): Promise<void> {
    if (await this.store.removePiece(piece)) {
      await this.router.navigate(['/productions', this.id()]);
    }
  }
}
