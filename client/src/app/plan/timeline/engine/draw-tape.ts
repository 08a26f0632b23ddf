import type { Span } from '@common/time/span';
import { TAPE_HEIGHT } from './board-layout';
import { cratePath, hatchPath, tagPath, tapePath, ticketPath } from './shapes';
import type { StageFace } from './stage-face';
import type { Tape, TapePart } from './tape';
import { type TimeScale, xOf } from './time-scale';

/** A tape as SVG paths in pixels from its own corner; an empty path where it has no such part. */
export interface TapeDrawing {
  /** Hands-on work, in the outline of what the stage is. */
  readonly work: string;
  /** What is done of a started stage. */
  readonly done: string;
  /** The thread between pieces of work on different days. */
  readonly thread: string;
  /** The strokes of a dwell, and the box that they lie in with its firm end. */
  readonly hatch: string;
  readonly dwellBox: string;
  /** Dots where somebody stays by a fresh batch. */
  readonly attend: string;
  /** The bracket around what a bay is kept for. */
  readonly hold: string;
  /** Where hands-on work begins. */
  readonly startX: number;
  /** The widest piece of hands-on work: where the mark is written. */
  readonly bodyX: number;
  readonly bodyWidth: number;
  /** Where hands-on work ends, and how much dwell lies after it. */
  readonly workEndX: number;
  readonly dwellWidth: number;
}

/** Work stopped for less than this is one piece of tape: nobody goes home for lunch and calls it another day. */
const BREAK_MINUTES = 75;
const LEAST_WORK_PX = 3;
/** Work narrower than its own outline is drawn as wide as that, so that a visit can be seen. */
const LEAST_OUTLINE_PX: Readonly<Record<StageFace['kind'], number>> = {
  make: LEAST_WORK_PX,
  'sign-off': 14,
  check: 14,
  transport: 14,
};

interface DrawInput {
  readonly tape: Tape;
  readonly kind: StageFace['kind'];
  readonly scale: TimeScale;
  /** What is drawn of the wall from side to side, in its own pixels. */
  readonly drawn: { readonly left: number; readonly right: number };
}

/** Draws a tape; a dwell of weeks costs no more strokes than what is seen of it. */
export function drawTape({ tape, kind, scale, drawn }: DrawInput): TapeDrawing {
  const originX = xOf(scale, tape.span.start);
  const local = (span: Span): Extent => {
    const x = xOf(scale, span.start) - originX;
    return { x, width: xOf(scale, span.end) - originX - x };
  };
  const spansOf = (wanted: TapePart['kind']): Extent[] =>
    tape.parts.filter((part) => part.kind === wanted).map((part) => local(part.span));
  const pieces = joinBreaks(tape.parts.filter((part) => part.kind === 'work').map((part) => part.span));
  const work = pieces.map(local).map((extent) => atLeast(extent, LEAST_OUTLINE_PX[kind]));
  const widest = work.reduce((best, extent) => (extent.width > best.width ? extent : best));
  const dwell = spansOf('dwell');
  const window = { from: drawn.left - originX, to: drawn.right - originX };
  return {
    work: work.map((extent, index) => shifted(outline(kind, extent.width, index, work.length), extent.x)).join(' '),
    done: spansOf('done')
      .map((extent) => shifted(box(extent.width, 4, TAPE_HEIGHT - 4), extent.x))
      .join(' '),
    thread: threads(work),
    hatch: dwell
      .map((extent) =>
        shifted(hatchPath(extent.width, DWELL_HEIGHT, shiftWindow(window, extent.x)), extent.x, DWELL_TOP),
      )
      .join(' '),
    dwellBox: dwell.map((extent) => shifted(box(extent.width, DWELL_HEIGHT, 0), extent.x, DWELL_TOP)).join(' '),
    attend: spansOf('attend')
      .map((extent) => dots(extent))
      .join(' '),
    hold: spansOf('hold')
      .map((extent) => bracket(extent))
      .join(' '),
    startX: work[0].x,
    bodyX: widest.x,
    bodyWidth: widest.width,
    workEndX: work[work.length - 1].x + work[work.length - 1].width,
    dwellWidth: dwell[0]?.width ?? 0,
  };
}

/** A dwell lies lower than the work that it follows: nobody's hands are on it. */
const DWELL_TOP = 4;
const DWELL_HEIGHT = TAPE_HEIGHT - 2 * DWELL_TOP;

interface Extent {
  readonly x: number;
  readonly width: number;
}

function joinBreaks(spans: readonly Span[]): Span[] {
  const joined: Span[] = [];
  for (const span of spans) {
    const last = joined.at(-1);
    if (last && span.start - last.end <= BREAK_MINUTES)
      joined[joined.length - 1] = { start: last.start, end: span.end };
    else joined.push(span);
  }
  return joined;
}

function outline(kind: StageFace['kind'], width: number, index: number, count: number): string {
  switch (kind) {
    case 'make':
      return tapePath(width, TAPE_HEIGHT, { start: index > 0, end: index < count - 1 });
    case 'sign-off':
      return ticketPath(width, TAPE_HEIGHT);
    case 'check':
      return tagPath(width, TAPE_HEIGHT);
    case 'transport':
      return cratePath(width, TAPE_HEIGHT);
  }
}

/** Moves an absolute path; every command used here takes pairs, but for an arc's radii and flags. */
function shifted(path: string, dx: number, dy = 0): string {
  return path.replace(
    /([ML])(-?[\d.]+) (-?[\d.]+)|(A\S+ \S+ \d \d \d) (-?[\d.]+) (-?[\d.]+)/g,
    (_, command, x, y, arc, ax, ay) =>
      arc
        ? `${arc} ${round(Number(ax) + dx)} ${round(Number(ay) + dy)}`
        : `${command}${round(Number(x) + dx)} ${round(Number(y) + dy)}`,
  );
}

function box(width: number, height: number, top: number): string {
  return `M0 ${top} L${round(width)} ${top} L${round(width)} ${top + height} L0 ${top + height} Z`;
}

function threads(work: readonly Extent[]): string {
  const middle = TAPE_HEIGHT / 2;
  return work
    .slice(1)
    .map((extent, index) => {
      const before = work[index];
      return `M${round(before.x + before.width)} ${middle} L${round(extent.x)} ${middle}`;
    })
    .join(' ');
}

function dots({ x, width }: Extent): string {
  const count = Math.max(1, Math.floor(width / 5));
  return Array.from({ length: count }, (_, index) => `M${round(x + 2 + index * 5)} 1.5 h0`).join(' ');
}

function bracket({ x, width }: Extent): string {
  const right = round(x + width - 0.5);
  const bottom = TAPE_HEIGHT - 0.5;
  return `M${round(x + 0.5)} 0.5 L${right} 0.5 L${right} ${bottom} L${round(x + 0.5)} ${bottom} Z`;
}

function atLeast(extent: Extent, width: number): Extent {
  return extent.width >= width ? extent : { x: extent.x, width };
}

function shiftWindow(window: { readonly from: number; readonly to: number }, dx: number): { from: number; to: number } {
  return { from: window.from - dx, to: window.to - dx };
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
