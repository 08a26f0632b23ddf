import { CdkTrapFocus } from '@angular/cdk/a11y';
import { BreakpointObserver } from '@angular/cdk/layout';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  inject,
  Injector,
  input,
  signal,
  untracked,
  viewChild,
  ViewContainerRef,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatDialog, type MatDialogRef } from '@angular/material/dialog';
import type { LevelRun } from '@common/contract';
import { map } from 'rxjs';
import { Notice } from '../ui/notice';
import { StatePanel } from '../ui/state-panel';
import { Toasts } from '../ui/toasts';
import { DayReading } from './day-reading/day-reading';
import { ForecastStore } from './forecast-store';
import { InsightStore } from './insight-store';
import { Inspector } from './inspector/inspector';
import { IssueDialog } from './issue/issue-dialog';
import { LevelDialog } from './level/level-dialog';
import { LevelStore } from './level/level-store';
import { LoadStrip } from './load-strip/load-strip';
import { MoveDialog, type MoveDialogData } from './move/move-dialog';
import { PlanAddress } from './plan-address';
import { PlanToolbar } from './plan-toolbar';
import { PlanStore } from './plan-store';
import { PlanningLine } from './planning-worker/planning-line';
import { BoardStore } from './timeline/board-store';
import { holdable } from './timeline/engine/take-targets';
import { HoldLedger } from './timeline/hold-ledger';
import { HoldStore } from './timeline/hold-store';
import { Timeline } from './timeline/timeline';
import { UnmetPanel } from './unmet/unmet-panel';
import { sayUnholdable } from './wording/say-refusal';

/** Below this the wall is read day by day. */
const SMALL_SCREEN = '(max-width: 46rem)';

/** The plan on the wall: the timeline, the load under it, and whatever is looked at more closely beside it. */
@Component({
  selector: 'fettle-plan-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    CdkTrapFocus,
    DayReading,
    HoldLedger,
    Inspector,
    LoadStrip,
    Notice,
    PlanToolbar,
    StatePanel,
    Timeline,
    UnmetPanel,
  ],
  providers: [PlanningLine, PlanStore, BoardStore, HoldStore, InsightStore, ForecastStore, LevelStore, PlanAddress],
  templateUrl: './plan-page.html',
  styleUrl: './plan-page.scss',
  host: { '(document:keydown)': 'keydown($event)', '[class.small]': 'small()' },
})
export class PlanPage {
  protected readonly plan = inject(PlanStore);
  protected readonly level = inject(LevelStore);
  protected readonly hand = inject(HoldStore);
  private readonly address = inject(PlanAddress);
  private readonly toasts = inject(Toasts);
  private readonly dialog = inject(MatDialog);
  private readonly injector = inject(Injector);
  private readonly views = inject(ViewContainerRef);
  private readonly timeline = viewChild(Timeline);
  private readonly inspector = viewChild(Inspector);
  private isResumed = false;
  private levelDialog: MatDialogRef<LevelDialog> | null = null;

  /** From the address: what rows stand for, the stage looked at, the left edge, the zoom, the nights, a levelling under way. */
  readonly rows = input<string>();
  readonly stage = input<string>();
  readonly from = input<string>();
  readonly zoom = input<string>();
  readonly nights = input<string>();
  readonly levelling = input<string>();

  protected readonly small = toSignal(
    inject(BreakpointObserver)
      .observe(SMALL_SCREEN)
      .pipe(map((screen) => screen.matches)),
    { initialValue: false },
  );
  protected readonly selected = computed(() => {
    const id = this.stage();
    return id !== undefined && this.plan.view()?.problem.stages.some((stage) => stage.id === id) ? id : null;
  });
  protected readonly showsUnmet = signal(false);

  constructor() {
    effect(() => {
      const address = { rows: this.rows(), zoom: this.zoom(), nights: this.nights(), from: this.from() };
      untracked(() => this.address.read(address));
    });
    effect(() => {
      const timeline = this.timeline();
      const stage = this.selected();
      if (this.plan.view() && timeline) untracked(() => this.address.hang(timeline, stage));
    });
    effect(() => {
      const id = this.levelling();
      if (!this.plan.view() || this.isResumed) return;
      // Only as the page opens: later the address follows the levelling, not the other way round.
      this.isResumed = true;
      if (id !== undefined) untracked(() => void this.resumeLevel(id));
    });
    effect(() => {
      const run = this.level.run();
      // Before the plan is there the address knows more than the store.
      if (this.isResumed) untracked(() => this.address.keep({ levelling: run?.id ?? null }));
    });
    inject(DestroyRef).onDestroy(() => this.levelDialog?.close());
  }

  protected select(stageId: string | null): void {
    this.showsUnmet.set(false);
    this.address.shown(stageId);
    this.address.keep({ stage: stageId });
    if (stageId !== null) setTimeout(() => this.inspector()?.focusHeading());
  }

  protected closeInspector(): void {
    const stage = this.selected();
    this.select(null);
    if (stage !== null) setTimeout(() => this.timeline()?.focusStage(stage));
  }

  protected showStage(stageId: string): void {
    this.showsUnmet.set(false);
    this.address.keep({ stage: stageId });
    this.timeline()?.showStage(stageId);
  }

  protected showUnmet(): void {
    this.address.keep({ stage: null });
    this.showsUnmet.set(true);
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

  protected openMove(stageId: string): void {
    const data: MoveDialogData = { stageId };
    this.dialog.open(MoveDialog, {
      data,
      injector: this.injector,
      viewContainerRef: this.views,
      width: '34rem',
      maxWidth: '96vw',
    });
  }

  protected startLevel(mode: LevelRun['mode']): void {
    if (!this.level.underWay() && this.level.proposal() === null) void this.level.start(mode);
    this.openLevel();
  }

  protected openLevel(): void {
    if (this.levelDialog !== null) return;
    const size = { width: '54rem', maxWidth: '96vw', maxHeight: '92dvh' };
    this.levelDialog = this.dialog.open(LevelDialog, {
      injector: this.injector,
      viewContainerRef: this.views,
      ...size,
    });
    this.levelDialog.afterClosed().subscribe(() => (this.levelDialog = null));
  }

  protected openIssue(): void {
    const size = { width: '54rem', maxWidth: '96vw', maxHeight: '92dvh' };
    this.dialog.open(IssueDialog, { injector: this.injector, viewContainerRef: this.views, ...size });
  }

  protected keydown(event: KeyboardEvent): void {
    const letter = event.key.toLowerCase();
    const typing =
      event.target instanceof Element && event.target.closest('input, textarea, [contenteditable]') !== null;
    const elsewhere = this.dialog.openDialogs.length > 0;
    if (!(event.ctrlKey || event.metaKey) || typing || elsewhere || this.hand.holding()) return;
    const view = this.plan.view();
    if (letter === 'z' && !event.shiftKey && view?.canUndo) {
      event.preventDefault();
      void this.plan.undo();
    } else if ((letter === 'y' || (letter === 'z' && event.shiftKey)) && view?.canRedo) {
      event.preventDefault();
      void this.plan.redo();
    }
  }

  private async resumeLevel(id: string): Promise<void> {
    if (this.level.run()?.id === id) return;
    await this.level.resume(id);
    const state = this.level.run()?.state;
    if (state === 'waiting' || state === 'running' || this.level.proposal() !== null) this.openLevel();
    else await this.level.leave();
  }
}
