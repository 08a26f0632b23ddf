import { HOLD_DWELL, HOLD_UNTIL } from '../construct/compiled';
import type { Fit, Layout } from '../construct/layout';
import { NEVER } from '../construct/calendar';

/** Who is in the way in a bay, and until when the bay is too full because of it. */
export interface Taker {
  readonly bay: number;
  readonly stage: number;
  readonly until: number;
}

/** The stage that keeps a trial out of its bays for longest; null where they have room. */
export function findTaker(layout: Layout, stage: number, housing: Int32Array | null, trial: Fit): Taker | null {
  const { work } = layout.compiled;
  let found: Taker | null = null;
  for (let k = 0; housing && k < housing.length; k += 1) {
    const place = work.placeOf[stage] + k;
    const bay = housing[k];
    if (bay < 0) continue;
    const end = holdEnd(layout, stage, place, trial.end, trial.finish);
    const until = layout.bays[bay].clashEnd(trial.start, end, work.placeUnits[place]);
    if (until < 0 || (found && found.until >= until)) continue;
    const taker = whoLeavesAt(layout, stage, bay, until);
    if (taker >= 0) found = { bay, stage: taker, until };
  }
  return found;
}

function holdEnd(layout: Layout, stage: number, place: number, end: number, finish: number): number {
  const { placeHold, placeUntil } = layout.compiled.work;
  if (placeHold[place] === HOLD_DWELL) return finish;
  if (placeHold[place] !== HOLD_UNTIL) return end;
  const last = placeUntil[place];
  if (last < 0) return end;
  return layout.isPlaced[last] === 1 ? Math.max(end, layout.end[last]) : NEVER;
}

/** The stage whose hold of a bay ends at an instant. */
function whoLeavesAt(layout: Layout, except: number, bay: number, instant: number): number {
  const { work, stageCount } = layout.compiled;
  for (let stage = 0; stage < stageCount; stage += 1) {
    const housing = layout.housing[stage];
    if (stage === except || layout.isPlaced[stage] === 0 || !housing) continue;
    for (let k = 0; k < housing.length; k += 1) {
      if (housing[k] !== bay) continue;
      if (holdEnd(layout, stage, work.placeOf[stage] + k, layout.end[stage], layout.finish[stage]) === instant)
        return stage;
    }
  }
  return -1;
}
