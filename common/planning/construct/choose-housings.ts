import type { Stage } from '../problem/problem';

/** At most this many combinations of bays are weighed for one stage; the first ones by id. */
const MOST_HOUSINGS = 24;

/**
 * The combinations of bays that a stage may be housed in, one bay for each place; a single one where its progress or pin says.
 * Empty only where some place has no bay at all.
 */
export function chooseHousings(stage: Stage, bayIndex: ReadonlyMap<string, number>): Int32Array[] {
  const given = givenBays(stage);
  if (given) return [Int32Array.from(given, (id) => bayIndex.get(id) ?? -1)];
  let housings: number[][] = [[]];
  for (const place of stage.places) {
    const options = [...new Set(place.bayIds)].sort().map((id) => bayIndex.get(id) ?? -1);
    housings = housings.flatMap((housing) => options.map((bay) => [...housing, bay])).slice(0, MOST_HOUSINGS);
  }
  return housings.map((housing) => Int32Array.from(housing));
}

function givenBays(stage: Stage): readonly string[] | null {
  const { progress, pin } = stage;
  if (progress.kind === 'finished') return progress.bayIds;
  if (progress.kind === 'started' && progress.bayIds.length === stage.places.length) return progress.bayIds;
  if (progress.kind === 'to-do' && pin?.bayIds && pin.bayIds.length === stage.places.length) return pin.bayIds;
  return null;
}
