/**
 * Circles among things that wait for one another: for each thing, the places of what it waits for. Each circle goes from a thing to what
 * it waits for, and so on back to the first; none where there is no circle, and at least one of each tangle. What can not be part of
 * one is taken away first (Kahn, 1962), so that long chains cost no depth of calls.
 */
export function waitingCircles(waitsFor: readonly (readonly number[])[]): readonly (readonly number[])[] {
  const held = thingsInTangles(waitsFor);
  const seen = new Set<number>();
  const circles: number[][] = [];
  for (const start of held) {
    const path: number[] = [];
    const placeOnPath = new Map<number, number>();
    let at: number | undefined = start;
    while (at !== undefined && !seen.has(at)) {
      seen.add(at);
      placeOnPath.set(at, path.length);
      path.push(at);
      at = waitsFor[at].find((next) => held.has(next));
    }
    const opens = at === undefined ? undefined : placeOnPath.get(at);
    if (opens !== undefined) {
      const circle = path.slice(opens);
      const first = circle.indexOf(Math.min(...circle));
      circles.push([...circle.slice(first), ...circle.slice(0, first)]);
    }
  }
  return circles;
}

/** What is left once everything that waits for nothing left is taken away, again and again. */
function thingsInTangles(waitsFor: readonly (readonly number[])[]): ReadonlySet<number> {
  const left = new Set(waitsFor.keys());
  const waiting = waitsFor.map((waits) => waits.length);
  const followers: number[][] = waitsFor.map(() => []);
  waitsFor.forEach((waits, index) => waits.forEach((other) => followers[other].push(index)));
  const free = [...left].filter((index) => waiting[index] === 0);
  for (let next = free.pop(); next !== undefined; next = free.pop()) {
    left.delete(next);
    for (const follower of followers[next]) {
      waiting[follower] -= 1;
      if (waiting[follower] === 0) free.push(follower);
    }
  }
  return left;
}
