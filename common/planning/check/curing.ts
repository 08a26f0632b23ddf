import type { Minute } from '../../time/span';
import type { AdvanceProfile } from '../problem/dwell';
import type { Placement } from '../problem/plan';
import type { Problem, Stage } from '../problem/problem';

/** The profile by which a stage's dwell advances where it is placed; null for the reference temperature throughout. */
export function profileOf(problem: Problem, stage: Stage, placement: Placement): AdvanceProfile | null {
  if (!stage.dwell) return null;
  const kept = stage.places.findIndex((place) => place.hold.kind !== 'work');
  const where = kept >= 0 ? placement.bayIds[kept] : 'room';
  const id = stage.dwell.advance[where];
  return problem.advances.find((profile) => profile.id === id) ?? null;
}

/**
 * Thousandths of a reference minute gained between two instants: the integral of the rate, piece by piece.
 * Negative amounts do not occur; 0 where `until` is not after `from`.
 */
export function agePermille(profile: AdvanceProfile | null, from: Minute, until: Minute): number {
  if (until <= from) return 0;
  if (!profile || profile.from.length === 0) return (until - from) * 1000;
  let age = 0;
  for (let piece = 0; piece < profile.from.length; piece += 1) {
    const start = piece === 0 ? from : Math.max(from, profile.from[piece]);
    const end = piece + 1 < profile.from.length ? Math.min(until, profile.from[piece + 1]) : until;
    if (end > start) age += (end - start) * profile.permille[piece];
  }
  return age;
}
