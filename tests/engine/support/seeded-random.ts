/** A small seeded source of chance for invented data (mulberry32, Tommy Ettinger, public domain). */
export function seededRandom(seed: number) {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
  return {
    /** A whole number from `low` to `high`, both included. */
    between: (low: number, high: number): number => low + Math.floor(next() * (high - low + 1)),
    /** True this often, from 0 to 1. */
    chance: (share: number): boolean => next() < share,
    pick: <T>(items: readonly T[]): T => items[Math.floor(next() * items.length)],
  };
}
