/**
 * Outlines of what hangs on the wall, as SVG paths in pixels from their own corner. Shape carries what colour may not carry alone:
 * hands-on work is tape, a sign-off a ticket, a check a tag with pointed ends, transport a crate on two wheels.
 */

/** Which ends of a piece of tape are torn: work that stops at the end of a shift and goes on in the next. */
export interface TornEnds {
  readonly start: boolean;
  readonly end: boolean;
}

const TEETH = 5;
const TEAR_DEPTH = 2.5;

/** A length of tape; torn ends are toothed, cut ones straight. */
export function tapePath(width: number, height: number, torn: TornEnds): string {
  const depth = Math.min(TEAR_DEPTH, width / 4);
  const right = torn.end ? teeth(width - depth, width, 0, height) : `L${r(width)} 0 L${r(width)} ${r(height)}`;
  const left = torn.start ? teeth(depth, 0, height, 0) : `L0 ${r(height)} L0 0`;
  return `M${torn.start ? r(depth) : 0} 0 ${right} ${left} Z`;
}

/** A ticket: a bite out of the middle of each end. */
export function ticketPath(width: number, height: number): string {
  const bite = Math.min(height / 5, width / 6);
  const top = height / 2 - bite;
  return (
    `M0 0 L${r(width)} 0 L${r(width)} ${r(top)} A${r(bite)} ${r(bite)} 0 0 0 ${r(width)} ${r(top + 2 * bite)} ` +
    `L${r(width)} ${r(height)} L0 ${r(height)} L0 ${r(top + 2 * bite)} A${r(bite)} ${r(bite)} 0 0 0 0 ${r(top)} Z`
  );
}

/** A tag pointed at both ends, as one hangs on a shackle. */
export function tagPath(width: number, height: number): string {
  const point = Math.min(height / 2, width / 3);
  return (
    `M${r(point)} 0 L${r(width - point)} 0 L${r(width)} ${r(height / 2)} L${r(width - point)} ${r(height)} ` +
    `L${r(point)} ${r(height)} L0 ${r(height / 2)} Z`
  );
}

/** A crate on two wheels. */
export function cratePath(width: number, height: number): string {
  const wheel = Math.min(3, width / 6);
  const floor = height - wheel;
  const wheelAt = (x: number): string =>
    `M${r(x - wheel)} ${r(floor)} A${r(wheel)} ${r(wheel)} 0 0 0 ${r(x + wheel)} ${r(floor)} Z`;
  return `M0 0 L${r(width)} 0 L${r(width)} ${r(floor)} L0 ${r(floor)} Z ${wheelAt(2 * wheel)} ${wheelAt(width - 2 * wheel)}`;
}

/** Which part of a hatch to draw, in its own pixels, so that a cure of weeks costs no more than what is seen of it. */
export interface HatchWindow {
  readonly from: number;
  readonly to: number;
}

const WET_SPACING = 9;
const FIRM_SPACING = 2.4;

/** A dwell: slanting strokes that lie open where it is wet and close up as it grows firm. */
export function hatchPath(width: number, height: number, window: HatchWindow = { from: 0, to: width }): string {
  const strokes: string[] = [];
  for (let x = -height + WET_SPACING / 2; x < width; x += spacingAt((x + height) / (width + height))) {
    if (x + height < window.from || x > window.to) continue;
    strokes.push(stroke(x, width, height));
  }
  return strokes.join('');
}

function spacingAt(share: number): number {
  const firm = Math.min(1, Math.max(0, share));
  return WET_SPACING + (FIRM_SPACING - WET_SPACING) * firm;
}

/** One stroke from the floor at `x` up to the right, cut off at both ends of the box. */
function stroke(x: number, width: number, height: number): string {
  const from = Math.max(0, x);
  const to = Math.min(width, x + height);
  return `M${r(from)} ${r(height - (from - x))}L${r(to)} ${r(height - (to - x))}`;
}

/** What a key date's flag says by its outline: a hard one is cut square, a wished one in a swallow's tail; a late one is notched. */
export interface FlagShape {
  readonly strength: 'hard' | 'wished';
  readonly late: boolean;
}

const NOTCH = 5;

/** A flag that flies to the right of its pole. */
export function flagPath(width: number, height: number, shape: FlagShape): string {
  const tail = shape.strength === 'wished' ? `L${r(width - height / 2.6)} ${r(height / 2)} ` : '';
  const notch = shape.late
    ? `L${2 * NOTCH + 4} ${r(height)} L${NOTCH + 4} ${r(height - NOTCH * 1.4)} L4 ${r(height)} `
    : '';
  return `M0 0 L${r(width)} 0 ${tail}L${r(width)} ${r(height)} ${notch}L0 ${r(height)} Z`;
}

function teeth(inner: number, outer: number, from: number, to: number): string {
  const step = (to - from) / (2 * TEETH);
  return Array.from(
    { length: 2 * TEETH + 1 },
    (_, index) => `L${r(index % 2 === 0 ? inner : outer)} ${r(from + index * step)}`,
  ).join(' ');
}

/** Two decimals are finer than any screen. */
function r(value: number): number {
  return Math.round(value * 100) / 100;
}
