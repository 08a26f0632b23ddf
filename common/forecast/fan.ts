import type { Minute } from '../time/span';
import { quantileOf } from './statistics';

/**
 * A fan to be drawn: `steps` instants that rise, the least finish of all draws first, the greatest last, and the quantiles at even
 * shares between. `sorted` has one finish at least; `steps` is two at least.
 */
export function fanOf(sorted: readonly Minute[], steps: number): Minute[] {
  return Array.from({ length: steps }, (_, step) => quantileOf(sorted, step / (steps - 1)));
}
