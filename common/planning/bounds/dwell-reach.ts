import type { Minute } from '../../time/span';
import type { AdvanceProfile } from '../problem/dwell';
import type { Problem, Stage } from '../problem/problem';
import { firstTrue } from './working-measure';

/** How fast a dwell advances over time, as steps; see `AdvanceProfile`. */
type Advance = Pick<AdvanceProfile, 'from' | 'permille'>;

const atReference: Advance = { from: [0], permille: [1000] };

/**
 * The earliest end of a stage's dwell for work that ends at `from` or later, and the latest end of work for a dwell that is
 * over by `to`; over all the places where it may dwell. Both are monotone.
 */
export interface DwellReach {
  readonly reach: (from: Minute) => Minute;
  readonly retreat: (to: Minute) => Minute;
}

/** The reach of a stage's dwell; both ends are the same instant where it has none. */
export function dwellReach(problem: Problem, stage: Stage): DwellReach {
  const { dwell } = stage;
  if (dwell === null || dwell.minutes === 0) return { reach: (from) => from, retreat: (to) => to };
  const advances = possibleAdvances(problem, stage);
  return {
    reach: (from) => Math.min(...advances.map((advance) => dwellEnd(advance, from, dwell.minutes))),
    retreat: (to) => Math.max(...advances.map((advance) => dwellStart(advance, to, dwell.minutes))),
  };
}

function possibleAdvances(problem: Problem, stage: Stage): Advance[] {
  const keys = stage.dwell?.advance ?? {};
  const kept = stage.places.find((place) => place.hold.kind !== 'work');
  const chosen = stage.progress.kind === 'to-do' ? stage.pin?.bayIds : stage.progress.bayIds;
  const bays = kept === undefined ? ['room'] : kept.bayIds.filter((id) => !chosen?.length || chosen.includes(id));
  const ids = (bays.length === 0 ? ['room'] : bays).map((bay) => keys[bay] ?? keys['room']);
  return ids.map((id) => problem.advances.find((advance) => advance.id === id) ?? atReference);
}

/** Where a dwell ends that begins at `from` and asks for `minutes` at the reference rate; Infinity if it never gets there. */
export function dwellEnd(advance: Advance, from: Minute, minutes: number): Minute {
  let left = minutes * 1000;
  let at = from;
  let step = Math.max(0, firstTrue(advance.from.length, (k) => advance.from[k] > from) - 1);
  for (; ; step++) {
    const rate = advance.permille[step] ?? 1000;
    const until = advance.from[step + 1] ?? Infinity;
    const gained = rate === 0 ? 0 : (until - at) * rate;
    if (rate > 0 && gained >= left) return at + Math.ceil(left / rate);
    if (until === Infinity) return Infinity;
    left -= gained;
    at = until;
  }
}

/** The latest whole minute from which a dwell of `minutes` at the reference rate is over by `to`. */
function dwellStart(advance: Advance, to: Minute, minutes: number): Minute {
  // The end is monotone in the start, so doubling back and halving in finds the last start in time.
  let back = Math.max(1, minutes);
  while (dwellEnd(advance, to - back, minutes) > to) {
    if (back > 1e9) return -Infinity;
    back *= 2;
  }
  let early = to - back;
  let late = to;
  while (late - early > 1) {
    const middle = Math.floor((early + late) / 2);
    if (dwellEnd(advance, middle, minutes) <= to) early = middle;
    else late = middle;
  }
  return dwellEnd(advance, late, minutes) <= to ? late : early;
}
