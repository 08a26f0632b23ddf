import { effect, inject, Injectable, untracked } from '@angular/core';
import { Router } from '@angular/router';
import { PlanStore } from './plan-store';
import { BoardStore } from './timeline/board-store';
import { ROWS_BY } from './timeline/engine/board-rows';
import { readZoom, writeZoom } from './timeline/engine/zoom';
import type { Timeline } from './timeline/timeline';

/** How the wall is looked at, as the address bar tells it. */
export interface AddressParts {
  readonly rows: string | undefined;
  readonly zoom: string | undefined;
  readonly nights: string | undefined;
  /** Minutes since 1970 at the left edge. */
  readonly from: string | undefined;
}

type Kept = Readonly<Record<string, string | number | null>>;

/** How long the wall rests before its place is written down. */
const REST_MS = 350;

/** Keeps in the address how the wall is looked at, so that a reload or a link shows the same, and hangs the wall from it. */
@Injectable()
export class PlanAddress {
  private readonly router = inject(Router);
  private readonly board = inject(BoardStore);
  private readonly plan = inject(PlanStore);
  private isHung = false;
  private shownStage: string | null = null;
  private from: number | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private waiting: Kept = {};

  constructor() {
    effect(() => {
      const rows = this.board.rowsBy();
      const zoom = writeZoom(this.board.zoom());
      const nights = this.board.nights() === 'folded' ? null : 'whole';
      const from = this.board.from();
      if (untracked(() => this.isHung)) this.keep({ rows, zoom, nights, from });
    });
  }

  /** Takes what the address says. The left edge counts only before the wall is hung: afterwards the hand that scrolls is right. */
  read(parts: AddressParts): void {
    if (this.isHung) return;
    const by = ROWS_BY.find((one) => one === parts.rows);
    if (by) this.board.setRows(by);
    const zoom = readZoom(parts.zoom);
    if (zoom !== null) this.board.setZoom(zoom);
    if (parts.nights === 'whole') this.board.setNights('whole');
    const from = Number(parts.from);
    this.from = parts.from !== undefined && Number.isFinite(from) ? from : null;
  }

  /** Hangs the wall in place the first time it is drawn, and brings the stage that the address names into the window. */
  hang(timeline: Timeline, stageId: string | null): void {
    const now = this.plan.view()?.now;
    setTimeout(() => {
      if (!this.isHung && now !== undefined) {
        if (this.from === null) timeline.showInstant(now);
        else timeline.showInstant(this.from, 0);
        this.isHung = true;
      }
      if (stageId !== null && stageId !== this.shownStage) timeline.showStage(stageId);
      this.shownStage = stageId;
    });
  }

  /** Says that a stage is in the window already, so that nothing need be scrolled for it. */
  shown(stageId: string | null): void {
    this.shownStage = stageId;
  }

  /** Writes parts of the address, a little later and together. */
  keep(parts: Kept): void {
    this.waiting = { ...this.waiting, ...parts };
    clearTimeout(this.timer);
    const soon = 'stage' in parts;
    if (soon) this.write();
    else this.timer = setTimeout(() => this.write(), REST_MS);
  }

  private write(): void {
    const queryParams = this.waiting;
    this.waiting = {};
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
