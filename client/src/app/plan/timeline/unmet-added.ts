import type { Unmet } from '@common/planning';

/** What can't be met after that could be before, or is further off than it was. */
export function unmetAdded(before: readonly Unmet[], after: readonly Unmet[]): Unmet[] {
  const was = new Map(before.map((one) => [keyOf(one), one.by]));
  return after.filter((one) => (was.get(keyOf(one)) ?? -Infinity) < one.by);
}

function keyOf(unmet: Unmet): string {
  return JSON.stringify([
    unmet.rule,
    [...unmet.stageIds].sort(),
    unmet.keyDateId,
    [...unmet.makerIds].sort(),
    [...unmet.bayIds].sort(),
  ]);
}
