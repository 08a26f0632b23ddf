import { formatDayAndTime } from '@common/time/format-instant';
import type { PlanNames } from '../wording/plan-names';
import { sayMargin } from '../wording/say-margin';
import { FLAG_HEIGHT } from './engine/board-layout';
import { flagPath } from './engine/shapes';
import type { MarkedFlag } from './flag-inputs';

/** A key date's flag with its place on the wall, in pixels. */
export type PlacedFlag = MarkedFlag & { readonly x: number; readonly width: number; readonly lane: number };

/** The flag's outline: square-cut for a hard date, swallow-tailed for a wished one, notched where it is late. */
export function outlineOfFlag(flag: PlacedFlag): string {
  const late = flag.marginMinutes !== null && flag.marginMinutes < 0;
  return flagPath(flag.width, FLAG_HEIGHT, { strength: flag.strength, late });
}

/** The date, its strength and its margin in words. */
export function titleOfFlag(flag: PlacedFlag, names: PlanNames | null, zone: string): string {
  const strength = flag.strength === 'hard' ? 'hard date' : 'wished date';
  const when = formatDayAndTime(flag.at, zone);
  return `${names?.keyDateInFull(flag.keyDateId)}, ${when}, ${strength}, ${sayMargin(flag.marginMinutes)}`;
}
