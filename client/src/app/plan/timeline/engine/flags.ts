import type { Minute } from '@common/time/span';
import { packLanes } from './lanes';
import { type TimeScale, xOf } from './time-scale';

/** A key date to hang on the wall, with what is written on it. */
export interface FlagInput {
  readonly keyDateId: string;
  readonly productionId: string;
  readonly at: Minute;
  readonly strength: 'hard' | 'wished';
  readonly marginMinutes: number | null;
  readonly text: string;
}

/** Where a flag hangs: `x` is its pole, `lane` the line it flies on, counted from the top. */
export interface FlagPlace {
  readonly x: number;
  readonly width: number;
  readonly lane: number;
}

const CHARACTER_PX = 6.6;
const FLAG_PADDING_PX = 22;
const FLAG_GAP_PX = 6;

/** Hangs flags side by side where there is room and one below the other where there isn't. */
export function hangFlags<Input extends FlagInput>(inputs: readonly Input[], scale: TimeScale): (Input & FlagPlace)[] {
  const placed = inputs.map((input) => ({
    ...input,
    x: xOf(scale, input.at),
    width: Math.round(input.text.length * CHARACTER_PX + FLAG_PADDING_PX),
  }));
  const { laneOf } = packLanes(placed.map(({ x, width }) => ({ from: x, to: x + width + FLAG_GAP_PX })));
  return placed.map((flag, index) => ({ ...flag, lane: laneOf[index] }));
}

/** How many lines a list of flags takes; 0 for none. */
export function flagLines(flags: readonly FlagPlace[]): number {
  return flags.reduce((lines, flag) => Math.max(lines, flag.lane + 1), 0);
}
