/** Where a stage's words stand: on its work, over its dwell, beside it on bare wall, or not at all. */
export interface TapeLabel {
  readonly mark: 'on' | 'none';
  readonly name: 'on' | 'over-dwell' | 'beside' | 'none';
  /** Most pixels that the name may take. */
  readonly nameWidth: number;
}

interface LabelRoom {
  /** Pixels of the widest piece of hands-on work. */
  readonly bodyWidth: number;
  readonly dwellWidth: number;
  /** Pixels from the end of the tape to the next one in the lane. */
  readonly roomAfter: number;
  /** Characters of the name. */
  readonly nameLength: number;
}

const MARK_PX = 24;
const CHARACTER_PX = 6.9;
const LEAST_NAME_PX = 52;
const LEAST_OVER_DWELL_PX = 92;
const MOST_NAME_PX = 260;

/** What fits, in this order: nearly the whole name on the work, beside the tape, over a long dwell; else a part of it; else the mark. */
export function labelFor({ bodyWidth, dwellWidth, roomAfter, nameLength }: LabelRoom): TapeLabel {
  const mark = bodyWidth >= MARK_PX ? 'on' : 'none';
  const wanted = nameLength * CHARACTER_PX;
  const inside = bodyWidth - (mark === 'on' ? MARK_PX + 6 : 6);
  if (inside >= wanted * 0.75) return { mark, name: 'on', nameWidth: inside };
  const beside = Math.min(roomAfter - 12, MOST_NAME_PX);
  if (beside >= Math.max(LEAST_NAME_PX, wanted * 0.6)) return { mark, name: 'beside', nameWidth: beside };
  if (inside >= LEAST_NAME_PX) return { mark, name: 'on', nameWidth: inside };
  if (dwellWidth >= LEAST_OVER_DWELL_PX) return { mark, name: 'over-dwell', nameWidth: dwellWidth - 26 };
  return { mark, name: 'none', nameWidth: 0 };
}
