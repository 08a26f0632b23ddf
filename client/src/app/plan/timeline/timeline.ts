import {
  afterNextRender,
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  type ElementRef,
  inject,
  Injector,
  input,
  output,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import type { Minute } from '@common/time/span';
import { MarkChip } from '../../ui/mark-chip';
import { PlanStore } from '../plan-store';
import { sayRefusal } from '../wording/say-refusal';
import { sayStage } from '../wording/say-stage';
import { awayBands, type Band } from './away-bands';
import { BoardStore, HEAD } from './board-store';
import { DateFan } from './date-fan';
import { type LaidRow, type LaidTape, TAPE_HEIGHT } from './engine/board-layout';
import { rowAt, rowsIn, tapesIn, tapesOf } from './engine/board-window';
import { edgeSpeed } from './engine/edge-scroll';
import { flagLines } from './engine/flags';
import { type TapeKey, walk } from './engine/focus-walk';
import { holdable } from './engine/take-targets';
import { minuteAt, scrollToShow, xOf } from './engine/time-scale';
import { type HandPoint, HoldByPointer } from './hold-by-pointer';
import { HoldStore } from './hold-store';
import { outlineOfFlag, type PlacedFlag, titleOfFlag } from './placed-flag';
import { RuleHead } from './rule-head';
import { scrollToTape } from './scroll-to-tape';
import { TapeMark } from './tape-mark';
import { answerHoldingKey, walkStepOf } from './timeline-keys';

/** Width of the row heads in pixels, on a desk. */
export const HEAD_WIDTH = 188;

/** The wall itself: the rule at its head, rows with their tapes, flags, the plumb line of now, and what is in the hand. */
@Component({
  selector: 'fettle-timeline',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DateFan, HoldByPointer, MarkChip, RuleHead, TapeMark],
  templateUrl: './timeline.html',
  styleUrl: './timeline.scss',
  host: { '(document:keydown.escape)': 'escape()', '[style.--head-width.px]': 'headWidth' },
})
export class Timeline {
  protected readonly plan = inject(PlanStore);
  protected readonly board = inject(BoardStore);
  protected readonly hand = inject(HoldStore);
  private readonly injector = inject(Injector);
  private readonly scroller = viewChild.required<ElementRef<HTMLElement>>('scroller');
  private readonly inHand = viewChild<ElementRef<HTMLElement>>('inHand');
  private point: HandPoint | null = null;
  private slide = 0;
  private swallowClick = false;
  /** The stage that the inspector shows. */
  readonly selected = input<string | null>(null);
  readonly chosen = output<string>();
  /** A stage to be moved by the form, asked for by key. */
  readonly saysWhy = output<string>();

  protected readonly namedBy = computed(() => (this.board.rowsBy() === 'piece' ? 'stage' : 'piece-and-stage'));
  protected readonly headWidth = HEAD_WIDTH;
  protected readonly tapeHeight = TAPE_HEIGHT;
  private readonly focusKey = signal<TapeKey | null>(null);

  protected readonly rows = computed(() => {
    const drawn = this.board.drawn();
    return rowsIn(this.board.layout(), drawn).map((row) => ({ row, tapes: this.drawnTapes(row) }));
  });
  protected readonly dark = computed(() => {
    const { left, right } = this.board.drawn();
    const scale = this.board.scale();
    return this.board
      .unlit()
      .map((span) => ({ x: xOf(scale, span.start), width: xOf(scale, span.end) - xOf(scale, span.start) }))
      .filter((band) => band.width >= 1.5 && band.x < right && band.x + band.width > left);
  });
  protected readonly poles = computed(() => this.flagsInPlace().map((flag) => ({ ...flag, ...this.poleOf(flag) })));
  protected readonly headFlags = computed(() => this.flagsOf(HEAD));
  protected readonly headFlagLines = computed(() => flagLines(this.board.flags().get(HEAD) ?? []));
  /** The one tape that Tab reaches: the one walked to last if it is on show, else the first that is. */
  protected readonly tabStop = computed<string | null>(() => {
    const shown = this.rows().flatMap(({ tapes }) => tapes);
    const key = this.focusKey();
    const last = shown.find((laid) => laid.rowKey === key?.rowKey && laid.tape.stageId === key.stageId);
    const first = last ?? shown.find((laid) => laid.tape.stageId === this.selected()) ?? shown[0];
    return first ? domKey(first) : null;
  });
  protected readonly heldTape = computed(() => {
    const hold = this.hand.hold();
    const state = this.hand.state().kind;
    if (!hold || hold.by !== 'pointer' || (state !== 'held' && state !== 'moving')) return null;
    return tapesOf(this.board.layout(), hold.stageId).find((laid) => laid.rowKey === hold.rowKey) ?? null;
  });
  protected readonly refusal = computed(() => {
    const over = this.hand.over();
    const names = this.plan.names();
    const row = this.board.rows().find((one) => one.key === over?.rowKey);
    return over?.refusal && names && row ? { rowKey: row.key, text: sayRefusal(over.refusal, names, row.title) } : null;
  });
  private readonly unmetStages = computed(() => new Set(this.plan.view()?.unmet.flatMap((one) => one.stageIds)));
  private readonly places = computed(
    () => new Map(this.plan.view()?.plan.placements.map((placement) => [placement.stageId, placement])),
  );
  private readonly stages = computed(() => new Map(this.plan.view()?.problem.stages.map((stage) => [stage.id, stage])));

  constructor() {
    inject(DestroyRef).onDestroy(() => cancelAnimationFrame(this.slide));
    afterNextRender(() => {
      const element = this.scroller().nativeElement;
      const watcher = new ResizeObserver(() => this.look());
      watcher.observe(element);
      this.injector.get(DestroyRef).onDestroy(() => watcher.disconnect());
      this.look();
    });
    this.keepPlaceWhileZooming();
    afterRenderEffect(() => {
      if (this.heldTape()) this.carry();
    });
  }

  /** Brings an instant to the left of the window, a little in. */
  showInstant(at: Minute, offset = 80): void {
    const element = this.scroller().nativeElement;
    element.scrollLeft = scrollToShow(this.board.scale(), at, offset);
    this.look();
  }

  /** Brings a stage into the window; false where it has no place on the wall. */
  showStage(stageId: string): boolean {
    const laid = tapesOf(this.board.layout(), stageId)[0];
    if (!laid) return false;
    this.bringIntoWindow(laid);
    this.focusKey.set({ rowKey: laid.rowKey, stageId });
    return true;
  }

  /** Puts the keyboard's focus on a stage, as after the inspector was closed. */
  focusStage(stageId: string): void {
    const laid = tapesOf(this.board.layout(), stageId)[0];
    if (laid) this.focusTape(laid);
  }

  /** Takes a stage in hand for the keys. */
  holdByKeys(stageId: string): void {
    const key = this.focusKey();
    const laid = tapesOf(this.board.layout(), stageId);
    const from = laid.find((one) => one.rowKey === key?.rowKey) ?? laid[0];
    if (!from) return;
    if (this.hand.take(stageId, from.rowKey, 'keys')) this.focusTape(from);
    else this.saysWhy.emit(stageId);
  }

  protected look(): void {
    const element = this.scroller().nativeElement;
    const { scrollLeft, scrollTop, clientWidth, clientHeight } = element;
    this.board.setWindow({
      left: scrollLeft,
      top: scrollTop,
      right: scrollLeft + Math.max(100, clientWidth - HEAD_WIDTH),
      bottom: scrollTop + clientHeight,
    });
  }

  protected wheel(event: WheelEvent): void {
    if (!event.ctrlKey) return;
    event.preventDefault();
    this.board.setZoom(this.board.zoom() * Math.exp(-event.deltaY / 300));
  }

  /** The mark and hue of the production that heads some rows. */
  protected headFace(productionId: string): { readonly mark: string; readonly hue: number } {
    const production = this.plan.view()?.directory.productions.find((one) => one.id === productionId);
    return { mark: production?.mark ?? '––', hue: production?.hue ?? 0 };
  }

  /** What is held, hung at the corner of the hand's own box. */
  protected asCarried(laid: LaidTape): LaidTape {
    return { ...laid, x: 0, room: laid.width };
  }

  protected faceOf(laid: LaidTape) {
    return this.board.faces().get(laid.tape.stageId);
  }

  protected canHold(laid: LaidTape): boolean {
    const stage = this.stages().get(laid.tape.stageId);
    return stage !== undefined && holdable(stage) === 'yes';
  }

  protected isUnmet(laid: LaidTape): boolean {
    return this.unmetStages().has(laid.tape.stageId);
  }

  protected keyOf(laid: LaidTape): string {
    return domKey(laid);
  }

  protected describe(laid: LaidTape): string {
    const face = this.faceOf(laid);
    const names = this.plan.names();
    if (!face || !names) return '';
    const unmet = this.isUnmet(laid) ? ' Something about it can’t be met.' : '';
    const how = { zone: this.board.zone(), namedBy: this.namedBy() } as const;
    return sayStage(face, this.places().get(face.id), names, how) + unmet;
  }

  protected flagsOf(key: string): readonly PlacedFlag[] {
    const { left, right } = this.board.drawn();
    const flags = this.board.flags().get(key) ?? [];
    return flags.filter((flag) => flag.x < right && flag.x + flag.width > left);
  }

  protected flagOutline(flag: PlacedFlag): string {
    return outlineOfFlag(flag);
  }

  protected flagTitle(flag: PlacedFlag): string {
    return titleOfFlag(flag, this.plan.names(), this.board.zone());
  }

  protected awayOf(row: LaidRow): readonly Band[] {
    return awayBands(row, this.board);
  }

  protected click(laid: LaidTape): void {
    if (this.swallowClick) return;
    this.focusKey.set({ rowKey: laid.rowKey, stageId: laid.tape.stageId });
    this.chosen.emit(laid.tape.stageId);
  }

  protected focusIn(laid: LaidTape): void {
    this.focusKey.set({ rowKey: laid.rowKey, stageId: laid.tape.stageId });
  }

  protected take(laid: LaidTape, point: HandPoint): void {
    this.swallowClick = true;
    this.point = point;
    if (this.hand.take(laid.tape.stageId, laid.rowKey, 'pointer')) this.slideAlong();
    else this.saysWhy.emit(laid.tape.stageId);
  }

  protected move(point: HandPoint): void {
    this.point = point;
    this.follow();
  }

  protected release(): void {
    this.point = null;
    cancelAnimationFrame(this.slide);
    void this.hand.drop();
    // The browser still sends the click that ends the press.
    setTimeout(() => (this.swallowClick = false));
  }

  protected escape(): void {
    if (this.hand.holding()) this.hand.escape();
  }

  protected keydown(event: KeyboardEvent, laid: LaidTape): void {
    const handled = this.hand.holding() ? answerHoldingKey(event, this.hand) : this.keyWhileWalking(event, laid);
    if (handled) event.preventDefault();
  }

  private keyWhileWalking(event: KeyboardEvent, laid: LaidTape): boolean {
    if (event.altKey || event.metaKey) return false;
    if (event.key.toLowerCase() === 'm' && !event.ctrlKey) {
      this.holdByKeys(laid.tape.stageId);
      return true;
    }
    const step = walkStepOf(event);
    if (!step) return false;
    const next = walk(this.board.layout(), { rowKey: laid.rowKey, stageId: laid.tape.stageId }, step);
    if (next) this.focusTape(next);
    return true;
  }

  private drawnTapes(row: LaidRow): readonly LaidTape[] {
    const inWindow = tapesIn(row, this.board.drawn());
    const hold = this.hand.hold();
    // What is held stays in the page however far the wall slides, or its drag would end with it.
    const held =
      hold?.rowKey === row.row.key ? row.tapes.find((laid) => laid.tape.stageId === hold.stageId) : undefined;
    return held && !inWindow.includes(held) ? [...inWindow, held] : inWindow;
  }

  private flagsInPlace(): readonly PlacedFlag[] {
    return this.board.rowsBy() === 'piece'
      ? [...this.board.flags().keys()].flatMap((key) => this.flagsOf(key))
      : this.headFlags();
  }

  private poleOf(flag: PlacedFlag): { readonly top: number; readonly height: number } {
    const layout = this.board.layout();
    if (this.board.rowsBy() !== 'piece') return { top: 0, height: layout.height };
    const own = layout.rows.filter((row) => row.row.productionId === flag.productionId);
    const top = own[0]?.top ?? 0;
    return { top, height: own.reduce((sum, row) => sum + row.height, 0) };
  }

  private follow(): void {
    const point = this.point;
    if (!point || !this.hand.holding()) return;
    this.carry();
    const box = this.scroller().nativeElement.getBoundingClientRect();
    const wall = this.scroller().nativeElement;
    const x = point.clientX - box.left - HEAD_WIDTH + wall.scrollLeft - point.gripX;
    const y = point.clientY - box.top - this.headHeight() + wall.scrollTop;
    const row = rowAt(this.board.layout(), y);
    const hold = this.hand.hold();
    if (hold) this.hand.aim(minuteAt(this.board.scale(), x), row?.row.key ?? hold.rowKey);
  }

  /** Draws what is held under the hand, outside the framework's round: it must not lag. */
  private carry(): void {
    const point = this.point;
    const element = this.inHand()?.nativeElement;
    if (!point || !element) return;
    element.style.transform = `translate(${point.clientX - point.gripX}px, ${point.clientY - point.gripY}px) rotate(-0.6deg)`;
  }

  private slideAlong(): void {
    let before = performance.now();
    const step = (now: number): void => {
      const seconds = Math.min(0.05, (now - before) / 1000);
      before = now;
      if (this.point && this.hand.holding()) this.slideBy(seconds);
      this.slide = requestAnimationFrame(step);
    };
    this.slide = requestAnimationFrame(step);
  }

  private slideBy(seconds: number): void {
    const point = this.point;
    const wall = this.scroller().nativeElement;
    const box = wall.getBoundingClientRect();
    if (!point) return;
    const dx = edgeSpeed(point.clientX, { from: box.left + HEAD_WIDTH, to: box.right }) * seconds;
    const dy = edgeSpeed(point.clientY, { from: box.top + this.headHeight(), to: box.bottom }) * seconds;
    if (dx === 0 && dy === 0) return;
    wall.scrollLeft += dx;
    wall.scrollTop += dy;
    this.follow();
  }

  private focusTape(laid: LaidTape): void {
    this.bringIntoWindow(laid);
    this.focusKey.set({ rowKey: laid.rowKey, stageId: laid.tape.stageId });
    afterNextRender(
      () => {
        const tapes = this.scroller().nativeElement.querySelectorAll<HTMLElement>('button.tape');
        [...tapes].find((tape) => tape.dataset['tape'] === domKey(laid))?.focus({ preventScroll: true });
      },
      { injector: this.injector },
    );
  }

  private bringIntoWindow(laid: LaidTape): void {
    scrollToTape(this.scroller().nativeElement, laid, { width: HEAD_WIDTH, height: this.headHeight() });
    this.look();
  }

  private headHeight(): number {
    const head = this.scroller().nativeElement.querySelector<HTMLElement>('.top');
    return head?.offsetHeight ?? 0;
  }

  /** When hours are drawn at another width, what was in the middle of the window stays there. */
  private keepPlaceWhileZooming(): void {
    let scale = untracked(this.board.scale);
    effect(() => {
      const next = this.board.scale();
      const before = scale;
      scale = next;
      if (before === next) return;
      const wall = untracked(this.scroller).nativeElement;
      const middle = Math.max(100, wall.clientWidth - HEAD_WIDTH) / 2;
      const at = minuteAt(before, wall.scrollLeft + middle);
      afterNextRender(
        () => {
          wall.scrollLeft = scrollToShow(next, at, middle);
          this.look();
        },
        { injector: this.injector },
      );
    });
  }
}

function domKey(laid: LaidTape): string {
  return `${laid.rowKey}|${laid.tape.stageId}`;
}
