import { computed, inject, Injectable, signal } from '@angular/core';
import { daySpansIn } from '@common/time/calendar-day';
import type { Minute, Span } from '@common/time/span';
import { PlanStore } from '../plan-store';
import { boardFrame } from './engine/board-frame';
import { layOutBoard } from './engine/board-layout';
import { boardRows, type RowsBy } from './engine/board-rows';
import { type BoardWindow, sameWindow, withOverscan } from './engine/board-window';
import { flagLines, hangFlags } from './engine/flags';
import { litDays, unlitStretches } from './engine/lit-time';
import { writeRule } from './engine/rule-marks';
import { readFaces } from './engine/stage-face';
import { makeTimeScale, minuteAt, xOf } from './engine/time-scale';
import { clampZoom, hourWidths, type Zoom, ZOOM_PX } from './engine/zoom';
import { flagInputs } from './flag-inputs';

/** How nights and weekends are drawn. */
export type Nights = 'folded' | 'whole';

/** The wall as it is looked at: what hangs on it, at which scale, and which part of it is in the window. */
@Injectable()
export class BoardStore {
  private readonly plan = inject(PlanStore);
  private readonly rowsByNow = signal<RowsBy>('piece');
  private readonly zoomNow = signal<Zoom>(ZOOM_PX.days);
  private readonly nightsNow = signal<Nights>('folded');
  private readonly windowNow = signal<BoardWindow>({ left: 0, top: 0, right: 1200, bottom: 700 });

  readonly rowsBy = this.rowsByNow.asReadonly();
  readonly zoom = this.zoomNow.asReadonly();
  readonly nights = this.nightsNow.asReadonly();
  /** What is looked at, without the row heads. */
  readonly window = this.windowNow.asReadonly();
  /** What is drawn: the window and a margin around it. */
  readonly drawn = computed(() => withOverscan(this.windowNow()), { equal: sameWindow });

  readonly zone = computed(() => this.plan.view()?.zone ?? 'UTC');
  readonly frame = computed<Span>(() => {
    const view = this.plan.view();
    return view ? boardFrame(view) : { start: 0, end: 1440 };
  });
  readonly days = computed(() => daySpansIn(this.frame(), this.zone()));
  readonly lit = computed(() => {
    const view = this.plan.view();
    return view ? litDays(this.days(), view.problem.workingTime, view.problem.horizon.start) : [];
  });
  readonly unlit = computed(() => unlitStretches(this.frame(), this.lit()));
  readonly scale = computed(() => makeTimeScale(this.frame(), this.lit(), hourWidths(this.zoom(), this.nights())));
  readonly faces = computed(() => {
    const view = this.plan.view();
    return view ? readFaces(view) : new Map<string, never>();
  });
  readonly rows = computed(() => {
    const view = this.plan.view();
    return view ? boardRows(view, this.rowsBy()) : [];
  });
  private readonly flagInputs = computed(() => {
    const view = this.plan.view();
    const names = this.plan.names();
    return view && names ? flagInputs(view.problem.keyDates, this.plan.margins(), names, view.directory) : [];
  });
  /** Flags by the row that they hang on: each production's own where there are such rows, else the head of the wall. */
  readonly flags = computed(() => {
    const inputs = this.flagInputs();
    if (this.rowsBy() !== 'piece') return new Map([[HEAD, hangFlags(inputs.map(withMark), this.scale())]]);
    const productions = new Set(inputs.map((input) => input.productionId));
    return new Map(
      [...productions].map((id) => [
        id,
        hangFlags(
          inputs.filter((input) => input.productionId === id),
          this.scale(),
        ),
      ]),
    );
  });
  readonly layout = computed(() => {
    const lines = new Map([...this.flags()].map(([id, flags]) => [id, flagLines(flags)]));
    return layOutBoard(this.rows(), this.scale(), lines);
  });
  readonly rule = computed(() => {
    const { left, right } = this.drawn();
    const scale = this.scale();
    return writeRule(
      { scale, days: this.days(), lit: this.lit(), zoom: this.zoom(), zone: this.zone() },
      { start: minuteAt(scale, left), end: minuteAt(scale, right) },
    );
  });
  readonly nowX = computed(() => xOf(this.scale(), this.plan.view()?.now ?? this.frame().start));
  /** Where the issued days end, in pixels; null where nothing is frozen. */
  readonly freezeX = computed(() => {
    const problem = this.plan.view()?.problem;
    return problem && problem.freezeUntil > problem.horizon.start ? xOf(this.scale(), problem.freezeUntil) : null;
  });
  /** The instant at the left edge of the window. */
  readonly from = computed<Minute>(() => minuteAt(this.scale(), this.windowNow().left));

  /** Turns the wall to other rows. */
  setRows(by: RowsBy): void {
    this.rowsByNow.set(by);
  }

  /** Draws hours wider or narrower, within what can be read. */
  setZoom(zoom: Zoom): void {
    this.zoomNow.set(clampZoom(zoom));
  }

  /** Folds nights and weekends, or draws them whole. */
  setNights(nights: Nights): void {
    this.nightsNow.set(nights);
  }

  /** Says what is looked at, in the wall's own pixels. */
  setWindow(window: BoardWindow): void {
    if (!sameWindow(this.windowNow(), window)) this.windowNow.set(window);
  }
}

/** Key of the flags that hang from the head of the wall. */
export const HEAD = 'head';

function withMark<T extends { readonly text: string; readonly mark: string }>(input: T): T {
  return { ...input, text: `${input.mark}  ${input.text}` };
}
