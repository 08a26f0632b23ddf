import type { Minute } from '../../time/span';
import type { AdvanceProfile } from './dwell';
import type { Stage } from './problem';

/** The advance profile that holds where a stage dwells: its first place kept beyond the work, or the room; null for rate 1000. */
export function profileWhere(
  advances: readonly AdvanceProfile[],
  stage: Stage,
  bayIds: readonly string[],
): AdvanceProfile | null {
  if (!stage.dwell) return null;
  const kept = stage.places.findIndex((place) => place.hold.kind !== 'work');
  const id = stage.dwell.advance[kept >= 0 ? bayIds[kept] : 'room'];
  return id === undefined ? null : (advances.find((profile) => profile.id === id) ?? null);
}

/** Thousandths of a reference minute gained between two instants; 0 where `until` is not after `from`. */
export function ageAt(profile: AdvanceProfile | null, from: Minute, until: Minute): number {
  if (until <= from) return 0;
  if (!profile) return (until - from) * 1000;
  let age = 0;
  for (let at = from, piece = pieceAt(profile, from); at < until; piece += 1) {
    const end = Math.min(until, profile.from[piece + 1] ?? Infinity);
    age += (end - at) * profile.permille[piece];
    at = end;
  }
  return age;
}

/** The first whole minute by which `age` thousandths of a reference minute are gained; Infinity where they never are. */
export function instantOfAge(profile: AdvanceProfile | null, from: Minute, age: number): Minute {
  if (age <= 0) return from;
  if (!profile) return from + Math.ceil(age / 1000);
  let left = age;
  for (let at = from, piece = pieceAt(profile, from); ; piece += 1) {
    const end = profile.from[piece + 1] ?? Infinity;
    const rate = profile.permille[piece];
    if (rate > 0 && (end - at) * rate >= left) return at + Math.ceil(left / rate);
    if (end === Infinity) return Infinity;
    left -= (end - at) * rate;
    at = end;
  }
}

/** The last whole minute at which no more than `age` thousandths are gained; Infinity where that lasts for ever. */
export function lastInstantWithin(profile: AdvanceProfile | null, from: Minute, age: number): Minute {
  return instantOfAge(profile, from, age + 1) - 1;
}

/** The piece of a profile that holds at an instant; the first one before the profile begins. */
function pieceAt(profile: AdvanceProfile, instant: Minute): number {
  let low = 0;
  let high = profile.from.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (profile.from[middle] <= instant) low = middle;
    else high = middle - 1;
  }
  return low;
}
