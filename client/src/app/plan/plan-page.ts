import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { Router } from '@angular/router';
import { Notice } from '../ui/notice';
import { StatePanel } from '../ui/state-panel';
import { Toasts } from '../ui/toasts';
import { InsightStore } from './insight-store';
import { LoadStrip } from './load-strip/load-strip';
import { PlanToolbar } from './plan-toolbar';
import { PlanStore } from './plan-store';
import { PlanningLine } from './planning-worker/planning-line';
import { BoardStore } from './timeline/board-store';
import { ROWS_BY } from './timeline/engine/board-rows';
import { holdable } from './timeline/engine/take-targets';
import { readZoom, writeZoom } from './timeline/engine/zoom';
import { HoldLedger } from './timeline/hold-ledger';
import { HoldStore } from './timeline/hold-store';
import { Timeline } from './timeline/timeline';
import { sayUnholdable } from './wording/say-refusal';

/** The plan on the wall: the timeline, the load under it, and whatever is looked at more closely beside it. */
@Component({
  selector: 'fettle-plan-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoldLedger, LoadStrip, Notice, PlanToolbar, StatePanel, Timeline],
  providers: [PlanningLine, PlanStore, BoardStore, HoldStore, InsightStore],
  templateUrl: './plan-page.html',
  styleUrl: './plan-page.scss',
  host: { '(document:keydown)': 'keydown($event)' },
})
export class PlanPage {
  protected readonly plan = inject(PlanStore);
  protected readonly board = inject(BoardStore);
  protected readonly hand = inject(HoldStore);
  private readonly router = inject(Router);
  private readonly toasts = inject(Toasts);
  private readonly timeline = viewChild(Timeline);

  /** From the address: what rows stand for, the stage looked at, the left edge, the zoom, whether nights are folded. */
  readonly rows = input<string>();
  readonly stage = input<string>();
  readonly from = input<string>();
  readonly zoom = input<string>();
  readonly nights = input<string>();

  protected readonly selected = computed(() => {
    const id = this.stage();
    return id !== undefined && this.plan.view()?.problem.stages.some((stage) => stage.id === id) ? id : null;
  });
  protected readonly showLoad = signal(true);
  private placed = false;
  private shownStage: string | null = null;

  constructor() {
    effect(() => {
      const by = ROWS_BY.find((one) => one === this.rows());
      const zoom = readZoom(this.zoom());
      const nights = this.nights();
      untracked(() => {
        this.board.setRows(by ?? 'piece');
        if (zoom !== null) this.board.setZoom(zoom);
        if (nights === 'whole' || nights === 'folded') this.board.setNights(nights);
      });
    });
    effect(() => this.keepAddress());
    effect(() => {
      if (this.plan.view() && this.timeline()) untracked(() => this.hangInPlace());
    });
  }

  protected select(stageId: string | null): void {
    this.shownStage = stageId;
    void this.router.navigate([], { queryParams: { stage: stageId }, queryParamsHandling: 'merge' });
  }

  protected toNow(): void {
    const now = this.plan.view()?.now;
    if (now !== undefined) this.timeline()?.showInstant(now);
  }

  protected sayWhy(stageId: string): void {
    const stage = this.plan.view()?.problem.stages.find((one) => one.id === stageId);
    const why = stage ? holdable(stage) : 'yes';
    if (why !== 'yes') this.toasts.say(sayUnholdable(why));
  }

  protected keydown(event: KeyboardEvent): void {
    const letter = event.key.toLowerCase();
    const typing =
      event.target instanceof Element && event.target.closest('input, textarea, select, [contenteditable]') !== null;
    const elsewhere = document.querySelector('.cdk-overlay-container [role="dialog"]') !== null;
    if (!(event.ctrlKey || event.metaKey) || typing || elsewhere || this.hand.holding()) return;
    if (letter === 'z' && !event.shiftKey && this.plan.view()?.canUndo) {
      event.preventDefault();
      void this.plan.undo();
    } else if ((letter === 'y' || (letter === 'z' && event.shiftKey)) && this.plan.view()?.canRedo) {
      event.preventDefault();
      void this.plan.redo();
    }
  }

  /** The first time the wall is drawn it opens where the address says, or a little before now. */
  private hangInPlace(): void {
    const timeline = this.timeline();
    const view = this.plan.view();
    if (!timeline || !view) return;
    const stage = this.selected();
    queueMicrotask(() => {
      if (!this.placed) {
        const from = Number(this.from());
        if (this.from() !== undefined && Number.isFinite(from)) timeline.showInstant(from, 0);
        else timeline.showInstant(view.now);
        this.placed = true;
      }
      if (stage !== null && stage !== this.shownStage) timeline.showStage(stage);
      this.shownStage = stage;
    });
  }

  /** Keeps in the address how the wall is looked at, so that a reload or a link shows the same. */
  private keepAddress(): void {
    const rows = this.board.rowsBy();
    const zoom = writeZoom(this.board.zoom());
    const nights = this.board.nights();
    const from = this.board.from();
    if (!untracked(() => this.placed)) return;
    clearTimeout(this.addressTimer);
    this.addressTimer = setTimeout(() => {
      const queryParams = { rows, zoom, from, nights: nights === 'folded' ? null : nights };
      void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
    }, 400);
  }

  private addressTimer: ReturnType<typeof setTimeout> | undefined;
}
